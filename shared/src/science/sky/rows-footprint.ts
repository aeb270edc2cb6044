import { DEGREE } from '../constants.ts';
import { Footprint } from './footprint.ts';
import { cellSide, neighbours } from './healpix.ts';
import { Moc } from './moc.ts';
import { coarser, countRows, findHoles, type Hole, medianCount, rowsByCell } from './occupancy.ts';

/** A footprint estimated from rows, or why the rows cannot tell. */
export type RowsFootprint =
  | { readonly known: true; readonly footprint: Footprint; readonly order: number; readonly rowsPerCell: number }
  | { readonly known: false; readonly reason: string };

/** Rows a cell should hold, so that an empty one is no accident: exp(-5) = 0.7 per cent. */
export const LEAST_ROWS_PER_CELL = 5;
/** Cells from 1.7′ (order 11) to 55′ (order 6); coarser ones say nothing at the scale of a beam. */
const FINEST = 11;
const COARSEST = 6;
/** Fewer cells than this have no inside to judge the edge by. */
const LEAST_CELLS = 12;
/** Larger share of gaps among the cells than this means that the rows are too patchy at this order. */
const MOST_HOLES = 0.05;
/** An edge cell with less than this share of the rows of cells inside is taken to be mostly outside. */
const EDGE_SHARE = 0.5;
/** Holes that chance would make less often than this over the whole region are real. */
const CHANCE_HOLES = 0.01;

const sizeOf = (order: number) => `${((cellSide(order) / DEGREE) * 60).toFixed(1)} arcmin`;

/** Cells covered: occupied ones and chance gaps, without edge cells that are mostly outside. */
function coveredCells(
  order: number,
  rows: ReadonlyMap<number, number>,
  holes: readonly Hole[],
  typical: number,
): { cells: number[]; filled: number; dropped: number } {
  const filled = holes
    .filter(({ enclosed, expected }) => enclosed && rows.size * Math.exp(-expected) > CHANCE_HOLES)
    .map((hole) => hole.cell);
  const covered = new Set([...rows.keys(), ...filled]);
  const around = new Map<number, number[]>();
  const isEdge = new Set<number>();
  for (const cell of covered) {
    const near = neighbours(order, cell);
    if (near.every((other) => covered.has(other))) continue;
    isEdge.add(cell);
    around.set(cell, near);
  }
  const dropped = [...isEdge].filter((cell) => {
    const inside = around.get(cell)!.filter((near) => covered.has(near) && !isEdge.has(near));
    const expected =
      inside.length > 0 ? inside.reduce((sum, near) => sum + (rows.get(near) ?? 0), 0) / inside.length : typical;
    return (rows.get(cell) ?? 0) < EDGE_SHARE * expected;
  });
  for (const cell of dropped) covered.delete(cell);
  return { cells: [...covered], filled: filled.length, dropped: dropped.length };
}

/**
 * Footprint of a catalogue estimated from where its rows are.
 *
 * @param raDeg right ascension (ICRS), degrees; NaN for rows without a position
 * @param decDeg declination (ICRS), degrees
 * @returns cells at the finest order, from 11 (1.7′) to 6 (55′), at which at least five rows are expected in a cell,
 *   both on average and at the median; or the reason why no order will do
 * @throws {DomainError} for columns of unequal length or a position out of range
 *
 * A cell at the edge is left out unless it holds half the rows of the cells inside. A gap of one cell is filled only
 * where chance would make such gaps; larger gaps (bright stars, missing tiles) stay gaps. The edge is known to a cell,
 * and where the depth changes across the sky only the dense part may be found: a stated footprint is always better.
 * Source: common practice; the limit of five rows from Poisson statistics.
 */
export function rowsFootprint(raDeg: ArrayLike<number>, decDeg: ArrayLike<number>): RowsFootprint {
  let occupancy = countRows(FINEST, raDeg, decDeg);
  const total = occupancy.rows.reduce((sum, count) => sum + count, 0);
  if (total === 0) return { known: false, reason: 'the table has no row with a position' };
  for (; occupancy.order >= COARSEST; occupancy = coarser(occupancy)) {
    const { order } = occupancy;
    const typical = medianCount(occupancy);
    if (total / occupancy.cells.length < LEAST_ROWS_PER_CELL || typical < LEAST_ROWS_PER_CELL) continue;
    const rows = rowsByCell(occupancy);
    const holes = findHoles(order, rows);
    const expected = total / (rows.size + holes.length);
    if (expected < LEAST_ROWS_PER_CELL || holes.length > MOST_HOLES * rows.size) continue;
    const { cells, filled, dropped } = coveredCells(order, rows, holes, typical);
    if (cells.length < LEAST_CELLS) {
      return {
        known: false,
        reason:
          `the ${total} rows fill only ${cells.length} ${cells.length === 1 ? 'cell' : 'cells'} of ${sizeOf(order)}, ` +
          'too few to tell where the coverage ends; state the footprint',
      };
    }
    const notes = [
      `estimated from ${total} rows in cells of ${sizeOf(order)}, ${expected.toFixed(1)} rows a cell`,
      `${dropped} edge cells left out as mostly empty, ${filled} chance gaps filled`,
      `the edge is known to ${sizeOf(order)} only`,
    ];
    const footprint = new Footprint('rows', Moc.fromCells(order, cells), cellSide(order), notes);
    return { known: true, footprint, order, rowsPerCell: expected };
  }
  return {
    known: false,
    reason:
      `the ${total} rows are too sparse or too patchy to show what was covered: not even cells of ` +
      `${sizeOf(COARSEST)} hold five rows each; state the footprint`,
  };
}
