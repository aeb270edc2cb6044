import { HI_REST_FREQUENCY_MHZ, SPEED_OF_LIGHT_KMS } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

const C = SPEED_OF_LIGHT_KMS;

/**
 * What a column of velocities holds: `optical` cz, `radio` c(1 - f/f₀), `relativistic` c(f₀² - f²)/(f₀² + f²), all
 * in km/s; `redshift` z without unit; `frequency` of the observed HI line in MHz.
 */
export const VELOCITY_CONVENTIONS = ['optical', 'radio', 'relativistic', 'redshift', 'frequency'] as const;
export type VelocityConvention = (typeof VELOCITY_CONVENTIONS)[number];

function refuse(convention: string, value: number, why: string): never {
  throw new DomainError(`velocity (${convention}): ${value} ${why}`);
}

/**
 * Optical cz of a velocity in any convention. The frame of rest is not changed.
 *
 * @param convention what `value` is
 * @param value km/s; z for `redshift`; MHz for `frequency`. Negative velocities are legal.
 * @returns optical cz, km/s
 * @throws {DomainError} for a value that is not finite or that no line could have (radio velocity of c, f <= 0 ...)
 *
 * Source: Greisen et al. (2006), A&A 446, 747.
 */
export function toOpticalCz(convention: VelocityConvention, value: number): number {
  if (!Number.isFinite(value)) refuse(convention, value, 'is not a finite number');
  switch (convention) {
    case 'optical':
      if (value <= -C) refuse(convention, value, 'km/s would mean 1 + z <= 0');
      return value;
    case 'redshift':
      if (value <= -1) refuse(convention, value, 'would mean 1 + z <= 0');
      return C * value;
    case 'radio':
      if (value >= C) refuse(convention, value, 'km/s is not below the speed of light');
      return value / (1 - value / C);
    case 'relativistic': {
      const beta = value / C;
      if (Math.abs(beta) >= 1) refuse(convention, value, 'km/s is not below the speed of light');
      // (1 + β)/√(1 - β²) - 1, written so that small velocities keep their digits.
      const root = Math.sqrt((1 - beta) * (1 + beta));
      return (C * (beta + (beta * beta) / (1 + root))) / root;
    }
    case 'frequency':
      if (value <= 0) refuse(convention, value, 'MHz is not a frequency');
      return (C * (HI_REST_FREQUENCY_MHZ - value)) / value;
    default:
      return refuse(
        String(convention),
        value,
        `has an unknown convention; known are ${VELOCITY_CONVENTIONS.join(', ')}`,
      );
  }
}

/**
 * A velocity in any convention from optical cz, the inverse of {@link toOpticalCz}.
 *
 * @param convention what to return
 * @param czKms optical cz, km/s, above -c
 * @returns km/s; z for `redshift`; MHz for `frequency`
 * @throws {DomainError} for a cz that is not finite or at most -c
 *
 * An unnoticed mix of optical and radio is 20 km/s at 2500 km/s and 323 km/s at 10 000 km/s.
 * Source: Greisen et al. (2006), A&A 446, 747.
 */
export function fromOpticalCz(convention: VelocityConvention, czKms: number): number {
  if (!(czKms > -C && czKms < Infinity)) refuse('optical', czKms, 'km/s would mean 1 + z <= 0 or is not finite');
  const z = czKms / C;
  switch (convention) {
    case 'optical':
      return czKms;
    case 'redshift':
      return z;
    case 'radio':
      return czKms / (1 + z);
    case 'relativistic':
      return (C * z * (2 + z)) / ((1 + z) ** 2 + 1);
    case 'frequency':
      return HI_REST_FREQUENCY_MHZ / (1 + z);
    default:
      return refuse(String(convention), czKms, `cannot be given in it; known are ${VELOCITY_CONVENTIONS.join(', ')}`);
  }
}

/**
 * Optical-convention line width from a radio-convention one, ΔV_opt = ΔV_rad (1+z)².
 *
 * @param widthKms width in radio velocity, km/s
 * @param czKms optical cz of the line, km/s
 * @throws {DomainError} for values that are not finite
 *
 * Source: derivative of cz = v/(1 - v/c); methods in use across HI work.
 */
export function toOpticalWidth(widthKms: number, czKms: number): number {
  const width = widthKms * (1 + czKms / C) ** 2;
  if (!Number.isFinite(width)) throw new DomainError(`toOpticalWidth: got ${widthKms} at ${czKms} km/s`);
  return width;
}
