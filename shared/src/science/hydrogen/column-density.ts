import { ARCSECOND, HI_REST_FREQUENCY_MHZ, SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import type { FluxVelocity } from './hi-mass.ts';

/** Column density of 1 K km/s of optically thin HI, cm^-2. */
export const COLUMN_DENSITY_PER_K_KMS = 1.823e18;
/** Column density of one solar mass of HI per square parsec, cm^-2. */
export const COLUMN_DENSITY_PER_SOLAR_MASS_PC2 = 1.2478735e20;

const BOLTZMANN = 1.380649e-23;
const EXPONENT: Record<FluxVelocity, number> = { optical: 2, source: 3, radio: 4, local: 0 };

/**
 * Brightness temperature of 1 Jy per beam at the 21-cm line.
 *
 * @param majorArcsec beam FWHM along the major axis, arcsec, positive
 * @param minorArcsec beam FWHM along the minor axis, arcsec, positive
 * @returns kelvin per Jy/beam
 * @throws {DomainError} if an axis is not positive
 *
 * Source: Rayleigh-Jeans law with the solid angle of a Gaussian beam, 6.0574e5 / (b_maj b_min).
 */
export function kelvinPerJansky(majorArcsec: number, minorArcsec: number): number {
  if (!(majorArcsec > 0 && minorArcsec > 0)) {
    throw new DomainError(`kelvinPerJansky: beam axes must be positive, got ${majorArcsec} x ${minorArcsec}`);
  }
  const wavelengthM = SPEED_OF_LIGHT_KMS / (HI_REST_FREQUENCY_MHZ * 1000);
  const solidAngle = (Math.PI / (4 * Math.LN2)) * majorArcsec * minorArcsec * ARCSECOND ** 2;
  return (1e-26 * wavelengthM ** 2) / (2 * BOLTZMANN * solidAngle);
}

/**
 * Mean HI column density over a beam.
 *
 * @param fluxJyBeamKms flux per beam, Jy/beam km/s, not negative
 * @param majorArcsec beam FWHM along the major axis, arcsec
 * @param minorArcsec beam FWHM along the minor axis, arcsec
 * @param redshift redshift, > -1
 * @param velocity the velocity the flux was integrated in (`local` leaves the redshift out)
 * @returns column density, cm^-2: a lower limit to the peak where the source is not resolved
 * @throws {DomainError} if flux, beam or redshift is out of range
 *
 * Source: N = 1.823e18 int T_B dv; factor (1+z)^2 for optical, ^3 source-frame, ^4 radio velocity (Meyer et al. 2017).
 */
export function columnDensity(
  fluxJyBeamKms: number,
  majorArcsec: number,
  minorArcsec: number,
  redshift = 0,
  velocity: FluxVelocity = 'optical',
): number {
  if (!(fluxJyBeamKms >= 0 && redshift > -1)) {
    throw new DomainError(`columnDensity: expected flux >= 0 and z > -1, got ${fluxJyBeamKms}, ${redshift}`);
  }
  const kelvinKms = kelvinPerJansky(majorArcsec, minorArcsec) * fluxJyBeamKms;
  return COLUMN_DENSITY_PER_K_KMS * kelvinKms * (1 + redshift) ** EXPONENT[velocity];
}
