import { DEGREE } from '@eremite/shared/science/constants';
import { cellCount, cellOf } from '@eremite/shared/science/sky/healpix';
import { coneRanges } from '@eremite/shared/science/sky/healpix-cone';

/** Order of the cells that a catalogue is cut into: 1.8 degrees wide, 12,288 on the whole sky. */
export const TILE_ORDER = 5;
export const TILE_CELLS = cellCount(TILE_ORDER);

/** Nested cell of each position, degrees ICRS. */
export function tileCells(raDeg: Float64Array, decDeg: Float64Array): Uint32Array {
  const cells = new Uint32Array(raDeg.length);
  for (let i = 0; i < cells.length; i++) cells[i] = cellOf(TILE_ORDER, raDeg[i]! * DEGREE, decDeg[i]! * DEGREE);
  return cells;
}

/** Cells that a cone can touch, as ranges [first, last] of nested indices. */
export function cellsOfCone(raDeg: number, decDeg: number, radiusArcsec: number): [number, number][] {
  const flat = coneRanges(TILE_ORDER, raDeg * DEGREE, decDeg * DEGREE, (radiusArcsec / 3600) * DEGREE);
  const ranges: [number, number][] = [];
  for (let i = 0; i + 1 < flat.length; i += 2) ranges.push([flat[i]!, flat[i + 1]! - 1]);
  return ranges;
}
