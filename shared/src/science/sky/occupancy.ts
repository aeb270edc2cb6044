import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { cellOf, neighbours } from './healpix.ts';

/** Occupied cells of one order, ascending, with the number of rows in each. */
export interface Occupancy {
  readonly order: number;
  readonly cells: Float64Array;
  readonly rows: Float64Array;
}

/** Adds up the rows of equal cells; `cells` must ascend. */
function joinEqual(order: number, cells: Float64Array, rowsOf: (i: number) => number): Occupancy {
  const joined = new Float64Array(cells.length);
  const rows = new Float64Array(cells.length);
  let size = 0;
  for (let i = 0; i < cells.length; i++) {
    if (size > 0 && joined[size - 1] === cells[i]) rows[size - 1]! += rowsOf(i);
    else {
      joined[size] = cells[i]!;
      rows[size++] = rowsOf(i);
    }
  }
  return { order, cells: joined.slice(0, size), rows: rows.slice(0, size) };
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
  const cells = new Float64Array(raDeg.length);
  let known = 0;
  for (let i = 0; i < raDeg.length; i++) {
    const ra = raDeg[i]!;
    const dec = decDeg[i]!;
    if (!Number.isNaN(ra) && !Number.isNaN(dec)) cells[known++] = cellOf(order, ra * DEGREE, dec * DEGREE);
  }
  return joinEqual(order, cells.slice(0, known).sort(), () => 1);
}

/** The same rows in cells of the next coarser order. */
export function coarser({ order, cells, rows }: Occupancy): Occupancy {
  const parents = cells.map((cell) => Math.floor(cell / 4));
  return joinEqual(order - 1, parents, (i) => rows[i]!);
}

/** Middle value of the counts of occupied cells; 0 without any. */
export function medianCount({ rows }: Occupancy): number {
  return rows.slice().sort()[Math.floor(rows.length / 2)] ?? 0;
}

/** Rows by cell, for look-ups. */
export function rowsByCell({ cells, rows }: Occupancy): Map<number, number> {
  const byCell = new Map<number, number>();
  for (let i = 0; i < cells.length; i++) byCell.set(cells[i]!, rows[i]!);
  return byCell;
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
export function findHoles(order: number, rows: ReadonlyMap<number, number>): Hole[] {
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
