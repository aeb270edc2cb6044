import { DomainError } from '@eremite/shared/science/domain-error';
import { checkPosition, type Numbers, wrapRaDeg } from './sky-position.ts';
import type { ZoneGrid } from './zone-grid.ts';
import { cellOf, type ZoneLayout, zoneOf } from './zone-layout.ts';

/*
 * The steps of building a grid, each on a range of rows, so that threads can share them: declinationRange of every
 * range, layoutZones, countRows of every range into counts of its own, startsOf once over all counts in the order of
 * the ranges, placeRows of every range, sortHeavyCells. The result does not depend on the number of ranges.
 */

/**
 * Checks the positions from one row up to another and finds their lowest and highest declination, degrees.
 *
 * @returns [0, 0] if there is no row
 * @throws {DomainError} if the arrays differ in length or a row has no position
 */
export function declinationRange(raDeg: Numbers, decDeg: Numbers, from: number, to: number): [number, number] {
  if (raDeg.length !== decDeg.length) {
    throw new DomainError(`${raDeg.length} right ascensions against ${decDeg.length} declinations`);
  }
  let low = 90;
  let high = -90;
  for (let i = from; i < to; i++) {
    const ra = raDeg[i]!;
    const dec = decDeg[i]!;
    if (!(ra >= 0 && ra < 360 && dec >= -90 && dec <= 90)) checkPosition('row', i, ra, dec);
    if (dec < low) low = dec;
    if (dec > high) high = dec;
  }
  return from < to ? [low, high] : [0, 0];
}

/** Writes the cell of each row of the range to `cells` and adds it to `counts`, one entry a cell. */
export function countRows(
  layout: ZoneLayout,
  raDeg: Numbers,
  decDeg: Numbers,
  from: number,
  to: number,
  cells: Uint32Array,
  counts: Uint32Array,
): void {
  for (let i = from; i < to; i++) {
    const cell = cellOf(layout, zoneOf(layout, decDeg[i]!), wrapRaDeg(raDeg[i]!));
    cells[i] = cell;
    counts[cell] = counts[cell]! + 1;
  }
}

/**
 * Fills the first slot of each cell and turns the counts of the ranges, in their order, into the next free slot of each
 * cell for that range (in place: the same arrays are returned).
 */
export function startsOf(starts: Uint32Array, counts: Uint32Array[]): Uint32Array[] {
  let slot = 0;
  for (let cell = 0; cell < starts.length - 1; cell++) {
    starts[cell] = slot;
    for (const ofRange of counts) {
      const rows = ofRange[cell]!;
      ofRange[cell] = slot;
      slot += rows;
    }
  }
  starts[starts.length - 1] = slot;
  return counts;
}

/** Puts the rows of the range into their slots. `next` is that range's array from `startsOf`, used up by this. */
export function placeRows(
  grid: ZoneGrid,
  raDeg: Numbers,
  decDeg: Numbers,
  from: number,
  to: number,
  cells: Uint32Array,
  next: Uint32Array,
): void {
  const { coords, row } = grid;
  for (let i = from; i < to; i++) {
    const cell = cells[i]!;
    const slot = next[cell]!;
    next[cell] = slot + 1;
    coords[2 * slot] = wrapRaDeg(raDeg[i]!);
    coords[2 * slot + 1] = decDeg[i]!;
    row[slot] = i;
  }
}
