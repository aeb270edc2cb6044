import { DomainError } from '../domain-error.ts';

/**
 * Stellar mass from an optical colour.
 *
 * @param gMinusI rest-frame g - i, AB mag
 * @param absoluteI absolute i magnitude, AB
 * @returns log10 of the stellar mass in solar masses; about 0.1 dex (Chabrier initial mass function)
 * @throws {DomainError} if an input is not finite
 *
 * Calibrated for log M* above about 7.5 and -0.2 < g - i < 1.6. Source: Taylor et al. (2011), MNRAS 418, 1587, eq. 8, form from memory.
 */
export function stellarMassFromColour(gMinusI: number, absoluteI: number): number {
  if (![gMinusI, absoluteI].every(Number.isFinite)) {
    throw new DomainError(`stellarMassFromColour: got g-i ${gMinusI}, M_i ${absoluteI}`);
  }
  return 1.15 + 0.7 * gMinusI - 0.4 * absoluteI;
}

/** Absolute W1 magnitude of the Sun that goes with the relation below, Vega. */
export const CLUVER_SOLAR_W1 = 3.24;
/** M/L in W1 where there is no colour, or only a limit. */
export const CONSTANT_W1_RATIO = 0.6;

/**
 * Stellar mass from WISE.
 *
 * @param absoluteW1 absolute W1 magnitude, Vega
 * @param w1MinusW2 W1 - W2, Vega mag, clipped to [-0.2, 0.6]; NaN where W2 is missing or a limit, then M/L = 0.6
 * @returns stellar mass, solar masses
 * @throws {DomainError} if the magnitude is not finite
 *
 * Source: Cluver et al. (2014), ApJ 782, 90: log (M/L) = -1.96 (W1 - W2) - 0.03.
 */
export function stellarMassFromW1(absoluteW1: number, w1MinusW2: number): number {
  if (!Number.isFinite(absoluteW1)) throw new DomainError(`stellarMassFromW1: got M_W1 ${absoluteW1}`);
  const light = 10 ** (-0.4 * (absoluteW1 - CLUVER_SOLAR_W1));
  if (!Number.isFinite(w1MinusW2)) return CONSTANT_W1_RATIO * light;
  const colour = Math.min(0.6, Math.max(-0.2, w1MinusW2));
  return light * 10 ** (-1.96 * colour - 0.03);
}
