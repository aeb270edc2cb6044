import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/** Published forms of the baryonic Tully-Fisher relation. */
export type TullyFisherForm = 'mcgaugh2012' | 'lelli2019' | 'bradford2016';

/**
 * log10 M_b = slope log10 V + intercept; V in km/s, M_b in solar masses.
 * McGaugh (2012), AJ 143, 40: 47 V_f^4 (+-6, from memory), flat speed.
 * Lelli et al. (2019), MNRAS 484, 3267: flat speed (intercept from memory).
 * Bradford et al. (2016), ApJ 832, 11: from line widths, scatter 0.25 dex; the one to use for W20 and W50.
 */
export const TULLY_FISHER_FORMS: Record<TullyFisherForm, { slope: number; intercept: number }> = {
  mcgaugh2012: { slope: 4, intercept: Math.log10(47) },
  lelli2019: { slope: 3.85, intercept: 1.99 },
  bradford2016: { slope: 3.24, intercept: 3.21 },
};

/**
 * Baryonic mass that belongs to a rotation speed.
 *
 * @param speedKms rotation speed, km/s, positive
 * @param form which published relation
 * @returns log10 of the baryonic mass in solar masses
 * @throws {DomainError} if the speed is not positive
 *
 * Below about 30 km/s the forms differ by more than 0.4 dex: an outlier needs more than 0.5 dex and a known inclination.
 */
export function baryonicMassFromSpeed(speedKms: number, form: TullyFisherForm = 'bradford2016'): number {
  if (!(speedKms > 0)) throw new DomainError(`baryonicMassFromSpeed: speed must be positive, got ${speedKms} km/s`);
  const { slope, intercept } = TULLY_FISHER_FORMS[form];
  return slope * Math.log10(speedKms) + intercept;
}

/**
 * How far a source lies above (+) the relation in mass.
 *
 * @param logBaryonicMass log10 of the baryonic mass in solar masses
 * @param speedKms rotation speed, km/s
 * @param form which published relation
 * @returns residual, dex
 * @throws {DomainError} if the speed is not positive
 */
export function tullyFisherResidual(logBaryonicMass: number, speedKms: number, form?: TullyFisherForm): number {
  return logBaryonicMass - baryonicMassFromSpeed(speedKms, form);
}

/**
 * Rotation speed from a line width and an inclination.
 *
 * @param widthKms corrected line width, km/s, positive
 * @param inclinationRad inclination, radians, in (0, pi/2]; for a source without stars it is unknown
 * @returns W / (2 sin i), km/s
 * @throws {DomainError} if an input is out of range
 */
export function speedFromWidth(widthKms: number, inclinationRad: number): number {
  if (!(widthKms > 0 && inclinationRad > 0 && inclinationRad <= 90 * DEGREE)) {
    throw new DomainError(`speedFromWidth: got ${widthKms} km/s at ${inclinationRad} rad`);
  }
  return widthKms / (2 * Math.sin(inclinationRad));
}
