import { DomainError } from '@eremite/shared/science/domain-error';

/** Numbers a row, over an ArrayBuffer or a SharedArrayBuffer. */
export type Numbers = Float64Array<ArrayBufferLike>;

/** @returns the right ascension in [0, 360), unchanged if it lies there already; degrees */
export function wrapRaDeg(raDeg: number): number {
  if (raDeg >= 0 && raDeg < 360) return raDeg;
  const wrapped = raDeg - 360 * Math.floor(raDeg / 360);
  return wrapped < 360 ? wrapped : 0; // a tiny negative number rounds up to 360
}

/** @throws {DomainError} naming the index if the position is missing or its declination is out of range */
export function checkPosition(what: string, index: number, raDeg: number, decDeg: number): void {
  if (Number.isFinite(raDeg) && decDeg >= -90 && decDeg <= 90) return;
  throw new DomainError(`${what} ${index} has no position on the sky: (${raDeg}, ${decDeg}) degrees`);
}

/** @throws {DomainError} naming the index if the radius is not in [0, 180] degrees */
export function checkRadius(what: string, index: number, radiusDeg: number): void {
  if (radiusDeg >= 0 && radiusDeg <= 180) return;
  throw new DomainError(`${what} ${index} has a search radius of ${radiusDeg} degrees, not one from 0 to 180`);
}
