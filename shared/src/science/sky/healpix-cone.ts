import { DomainError } from '../domain-error.ts';
import { cellArea } from './healpix.ts';
import { descend } from './healpix-descent.ts';
import { separation } from './separation.ts';

/** Slack for rounding in separations, radians: a cell that only just touches a cone is kept. */
const SLACK = 1e-14;
const MOST_CELLS = 50_000_000;

/**
 * Ranges of cells that together cover a cone: each point of the cone is in one of them. Some lie just outside.
 *
 * @param order order of the cells, 0..24
 * @param lon longitude of the axis, radians
 * @param lat latitude of the axis, radians
 * @param radius opening (half) angle, radians, in [0, π]
 * @returns sorted, disjoint ranges [start, end) of nested indices, flat in pairs
 * @throws {DomainError} for arguments out of range
 */
export function coneRanges(order: number, lon: number, lat: number, radius: number): number[] {
  if (!(radius >= 0 && radius <= Math.PI)) {
    throw new DomainError(`coneRanges: expected a radius from 0 to π radians, got ${radius}`);
  }
  return descend(
    order,
    (cellLon, cellLat, cellRadius) => {
      const distance = separation(lon, lat, cellLon, cellLat);
      if (distance > radius + cellRadius + SLACK) return 'outside';
      return distance + cellRadius <= radius ? 'inside' : 'undecided';
    },
    () => true,
  );
}

/**
 * Cells that together cover a cone; see {@link coneRanges}.
 *
 * @returns nested indices, ascending
 * @throws {DomainError} for arguments out of range, or for a cone of more than fifty million cells
 */
export function conesCells(order: number, lon: number, lat: number, radius: number): number[] {
  const expected = (2 * Math.PI * (1 - Math.cos(radius))) / cellArea(order);
  if (expected > MOST_CELLS) {
    throw new DomainError(`conesCells: about ${Math.round(expected)} cells of order ${order}; use coneRanges`);
  }
  const ranges = coneRanges(order, lon, lat, radius);
  const cells: number[] = [];
  for (let i = 0; i < ranges.length; i += 2) {
    for (let cell = ranges[i]!; cell < ranges[i + 1]!; cell++) cells.push(cell);
  }
  return cells;
}
