import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { cellOf, neighbours } from './healpix.ts';

/** Occupied cells of one order with the number of rows in each. */
export interface Occupancy {
  readonly order: number;
  readonly rows: ReadonlyMap<number, number>;
}

/**
 * Counts rows in cells.
 *
 * @param order HEALPix order
 * @param raDeg right ascension (ICRS), degrees; rows with NaN are passed over
 * @param decDeg declination (ICRS), degrees, as long as `raDeg`
 * @throws {DomainError} for columns of unequal length or a position out of range
 */
export function countRows(order: number, raDeg: ArrayLike<number>, decDeg: ArrayLike<number>): Occupancy {
  if (raDeg.length !== decDeg.length) {
    throw new DomainError(`countRows: ${raDeg.length} right ascensions but ${decDeg.length} declinations`);
  }
  const rows = new Map<number, number>();
  for (let i = 0; i < raDeg.length; i++) {
    const ra = raDeg[i]!;
    const dec = decDeg[i]!;
    if (Number.isNaN(ra) || Number.isNaN(dec)) continue;
    const cell = cellOf(order, ra * DEGREE, dec * DEGREE);
    rows.set(cell, (rows.get(cell) ?? 0) + 1);
  }
  return { order, rows };
}

/** The same rows in cells of the next coarser order. */
export function coarser({ order, rows }: Occupancy): Occupancy {
  const merged = new Map<number, number>();
  for (const [cell, count] of rows) {
    const parent = Math.floor(cell / 4);
    merged.set(parent, (merged.get(parent) ?? 0) + count);
  }
  return { order: order - 1, rows: merged };
}

/** Middle value of the counts of occupied cells; 0 without any. */
export function medianCount({ rows }: Occupancy): number {
  const counts = [...rows.values()].sort((a, b) => a - b);
  return counts[Math.floor(counts.length / 2)] ?? 0;
}

/** An empty cell among occupied ones. */
export interface Hole {
  readonly cell: number;
  /** Whether every neighbour is occupied. */
  readonly enclosed: boolean;
  /** Mean rows of the occupied neighbours: what the hole should hold. */
  readonly expected: number;
}

/** Empty cells of which at most two neighbours are empty too: gaps inside, not the outside. */
export function findHoles({ order, rows }: Occupancy): Hole[] {
  const touched = new Map<number, number>();
  for (const cell of rows.keys()) {
    for (const near of neighbours(order, cell)) if (!rows.has(near)) touched.set(near, (touched.get(near) ?? 0) + 1);
  }
  const holes: Hole[] = [];
  for (const [cell, occupied] of touched) {
    if (occupied < 5) continue;
    const around = neighbours(order, cell);
    if (occupied < around.length - 2) continue;
    const sum = around.reduce((total, near) => total + (rows.get(near) ?? 0), 0);
    holes.push({ cell, enclosed: occupied === around.length, expected: sum / occupied });
  }
  return holes;
}
