import { DomainError } from '../domain-error.ts';

/**
 * log10 C_x of log SFR = log L_x - log C_x, Kroupa initial mass function, SFR in solar masses a year.
 * L_x is nu L_nu in erg/s, except 1.4 GHz in erg/s/Hz.
 * Source: Kennicutt & Evans (2012), ARA&A 50, 531, Table 1 (FUV verified, the others from memory).
 */
export const STAR_FORMATION_LOG_C = {
  FUV: 43.35,
  NUV: 43.17,
  Halpha: 41.27,
  TIR: 43.41,
  '24um': 42.69,
  '70um': 43.23,
  '1.4GHz': 28.2,
} as const;

export type StarFormationTracer = keyof typeof STAR_FORMATION_LOG_C;

const MEGAPARSEC_CM = 3.0856775814913673e24;
const LIGHT_MICRON_HZ = 2.99792458e14;
const JANSKY_CGS = 1e-23;
/** Nominal luminosity of the Sun, erg/s (IAU 2015). */
export const SOLAR_LUMINOSITY_ERG = 3.828e33;

/**
 * nu L_nu of a flux density.
 *
 * @param fluxMjy flux density, mJy, corrected for extinction, positive
 * @param wavelengthMicron wavelength, micron, positive
 * @param luminosityMpc luminosity distance, Mpc, positive
 * @returns nu L_nu, erg/s
 * @throws {DomainError} if an input is not positive
 */
export function nuLuminosity(fluxMjy: number, wavelengthMicron: number, luminosityMpc: number): number {
  if (!(fluxMjy > 0 && wavelengthMicron > 0 && luminosityMpc > 0)) {
    throw new DomainError(`nuLuminosity: got ${fluxMjy} mJy, ${wavelengthMicron} micron, ${luminosityMpc} Mpc`);
  }
  const flux = fluxMjy * 1e-3 * JANSKY_CGS * (LIGHT_MICRON_HZ / wavelengthMicron);
  return 4 * Math.PI * (luminosityMpc * MEGAPARSEC_CM) ** 2 * flux;
}

/**
 * nu L_nu of an AB magnitude.
 *
 * @param magnitudeAb AB magnitude
 * @param extinctionMag extinction in the band, mag
 * @param wavelengthMicron pivot wavelength, micron
 * @param luminosityMpc luminosity distance, Mpc
 * @returns nu L_nu, erg/s
 * @throws {DomainError} if an input is out of range
 */
export function nuLuminosityOfAb(
  magnitudeAb: number,
  extinctionMag: number,
  wavelengthMicron: number,
  luminosityMpc: number,
): number {
  return nuLuminosity(3.631e6 * 10 ** (-0.4 * (magnitudeAb - extinctionMag)), wavelengthMicron, luminosityMpc);
}

/**
 * Star-formation rate of a luminosity; of a limit it is a limit.
 *
 * @param luminosityErg nu L_nu, erg/s (erg/s/Hz at 1.4 GHz), positive
 * @param tracer which light
 * @returns solar masses a year, Kroupa initial mass function
 * @throws {DomainError} if the luminosity is not positive
 *
 * TIR and 24 micron assume ordinary dust: a metal-poor dwarf is invisible there, so their silence says almost nothing.
 *
 * Method: limits.
 */
export function starFormationRate(luminosityErg: number, tracer: StarFormationTracer): number {
  if (!(luminosityErg > 0))
    throw new DomainError(`starFormationRate: luminosity must be positive, got ${luminosityErg}`);
  return luminosityErg / 10 ** STAR_FORMATION_LOG_C[tracer];
}

/**
 * Star-formation rate from WISE W4, log SFR = 0.915 log(nu L_nu / L_sun) - 8.01.
 *
 * @param luminosityErg nu L_nu at 22.8 micron, erg/s, positive
 * @returns solar masses a year
 * @throws {DomainError} if the luminosity is not positive
 *
 * Source: Cluver et al. (2017), ApJ 850, 68 (from memory).
 */
export function starFormationRateW4(luminosityErg: number): number {
  if (!(luminosityErg > 0))
    throw new DomainError(`starFormationRateW4: luminosity must be positive, got ${luminosityErg}`);
  return 10 ** (0.915 * Math.log10(luminosityErg / SOLAR_LUMINOSITY_ERG) - 8.01);
}
