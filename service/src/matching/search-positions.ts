import type { Numbers } from './sky-position.ts';

/** Where to search: one entry a position. */
export interface SearchPositions {
  raDeg: Numbers;
  decDeg: Numbers;
  /** radius of each position, seconds of arc, 0 to 648000; a row exactly at the radius is found */
  radiusArcsec: Numbers;
}
