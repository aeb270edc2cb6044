import { HI_REST_FREQUENCY_MHZ, SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/** Constant of the velocity form of the HI mass, solar masses per Mpc^2 per Jy km/s: the value the trade prints (Roberts 1962; Giovanelli & Haynes 1988). */
export const HI_MASS_CONSTANT = 2.356e5;
/** Constant of the frequency form, solar masses per Mpc^2 per Jy Hz. Source: Meyer et al. (2017), PASA 34, e052. */
export const HI_MASS_CONSTANT_JY_HZ = 49.7;

const PLANCK_JS = 6.62607015e-34;
const HYDROGEN_ATOM_KG = 1.67353284e-27;
const SOLAR_MASS_KG = 1.98840987e30;
const MEGAPARSEC_M = 3.0856775814913673e22;
const JANSKY = 1e-26;

/**
 * The HI mass constants that follow from a spontaneous emission coefficient, to show how far the trade values depend on it.
 *
 * @param einsteinAPerSecond A10 of the 21-cm line, s^-1 (published values run from 2.85e-15 to 2.8843e-15)
 * @returns `perJyHz`, solar masses per Mpc^2 per Jy Hz, and `perJyKms`, per Jy km/s at zero redshift
 * @throws {DomainError} if the coefficient is not positive
 *
 * Source: M = 16 pi m_H D^2 S / (3 h nu A10), optically thin gas with a spin temperature far above 0.07 K.
 */
export function hiMassConstants(einsteinAPerSecond: number): { perJyHz: number; perJyKms: number } {
  if (!(einsteinAPerSecond > 0))
    throw new DomainError(`hiMassConstants: A10 must be positive, got ${einsteinAPerSecond}`);
  const restHz = HI_REST_FREQUENCY_MHZ * 1e6;
  const kilograms =
    (16 * Math.PI * HYDROGEN_ATOM_KG * MEGAPARSEC_M ** 2 * JANSKY) / (3 * PLANCK_JS * restHz * einsteinAPerSecond);
  const perJyHz = kilograms / SOLAR_MASS_KG;
  return { perJyHz, perJyKms: (perJyHz * restHz) / SPEED_OF_LIGHT_KMS };
}
