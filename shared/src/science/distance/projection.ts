import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';

/** Light-years in a parsec, from the au, c and the Julian year. Source: IAU (2012, 2015) definitions. */
export const LIGHT_YEARS_PER_PARSEC = 3.2615637771674333;

/** Distance in Mpc from one in millions of light-years. */
export function megaLightYearsToMpc(megaLightYears: number): number {
  return megaLightYears / LIGHT_YEARS_PER_PARSEC;
}

function assertDistance(where: string, angularMpc: number): void {
  if (!(angularMpc > 0 && angularMpc < Infinity)) {
    throw new DomainError(`${where}: expected a positive distance, got ${angularMpc} Mpc`);
  }
}

/**
 * Projected length of an angle at an angular-diameter distance, D_A θ.
 *
 * @param angle radians, >= 0
 * @param angularMpc angular-diameter distance, Mpc, > 0
 * @returns kpc
 * @throws {DomainError} for values out of range
 */
export function projectedKpc(angle: number, angularMpc: number): number {
  assertDistance('projectedKpc', angularMpc);
  if (!(angle >= 0 && angle < Infinity)) throw new DomainError(`projectedKpc: got the angle ${angle}`);
  return angle * angularMpc * 1000;
}

/** Kiloparsecs in one minute of arc at an angular-diameter distance in Mpc. */
export function kpcPerArcmin(angularMpc: number): number {
  return projectedKpc(DEGREE / 60, angularMpc);
}

/**
 * Angle of a projected length at an angular-diameter distance, R/D_A (small angle, the inverse of projectedKpc).
 *
 * @param lengthKpc kpc, >= 0
 * @param angularMpc Mpc, > 0
 * @returns radians; may exceed π for a length larger than the distance
 * @throws {DomainError} for values out of range
 */
export function angleOfKpc(lengthKpc: number, angularMpc: number): number {
  assertDistance('angleOfKpc', angularMpc);
  if (!(lengthKpc >= 0 && lengthKpc < Infinity)) throw new DomainError(`angleOfKpc: got the length ${lengthKpc} kpc`);
  return lengthKpc / 1000 / angularMpc;
}
