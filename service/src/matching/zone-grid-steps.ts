import { DomainError } from '@eremite/shared/science/domain-error';
import { sortHeavyCells } from './heavy-cells.ts';
import { checkPosition, wrapRaDeg } from './sky-position.ts';
import type { GridSource, ZoneGrid } from './zone-grid.ts';
import { cellOf, type ZoneLayout, zoneOf } from './zone-layout.ts';

/*
 * The steps of building a grid, each on a range, so that threads can share them. Rows are first spread over blocks of
 * zones and then placed block by block, because a block fits into a processor's cache and a large catalogue does not.
 * In order: measureRows of every range of rows, layoutZones, countBlocks of every range, blockStarts over all
 * counts in the order of the ranges, spreadRows of every range, placeBlocks of every range of blocks. The order of rows
 * is kept at every step, so the result does not depend on the ranges.
 */

const MOST_BLOCKS = 32;
export const blocksOf = ({ zones }: ZoneLayout): number => Math.min(MOST_BLOCKS, zones);
const blockOf = (zone: number, blocks: number, zones: number): number => Math.floor((zone * blocks) / zones);

/** Lowest and highest declination of some rows, degrees, and how many they are. */
export interface RowsMeasured {
  low: number;
  high: number;
  rows: number;
}

/**
 * Checks and measures the rows from one index up to another.
 *
 * @returns low above high if there is no row
 * @throws {DomainError} if the arrays differ in length or a row has no position
 */
export function measureRows({ raDeg, decDeg, only }: GridSource, from: number, to: number): RowsMeasured {
  if (raDeg.length !== decDeg.length || (only && only.length !== raDeg.length)) {
    const others = only ? ` and ${only.length} values` : '';
    throw new DomainError(`${raDeg.length} right ascensions against ${decDeg.length} declinations${others}`);
  }
  let low = 90;
  let high = -90;
  let rows = 0;
  for (let i = from; i < to; i++) {
    if (only && !Number.isFinite(only[i]!)) continue;
    const ra = raDeg[i]!;
    const dec = decDeg[i]!;
    if (!(ra >= 0 && ra < 360 && dec >= -90 && dec <= 90)) checkPosition('row', i, ra, dec);
    if (dec < low) low = dec;
    if (dec > high) high = dec;
    rows++;
  }
  return { low, high, rows };
}

/** @returns rows of the range in each block */
export function countBlocks(layout: ZoneLayout, source: GridSource, from: number, to: number): Uint32Array {
  const { decDeg, only } = source;
  const blocks = blocksOf(layout);
  const counts = new Uint32Array(blocks);
  for (let i = from; i < to; i++) {
    if (only && !Number.isFinite(only[i]!)) continue;
    counts[blockOf(zoneOf(layout, decDeg[i]!), blocks, layout.zones)]!++;
  }
  return counts;
}

/**
 * @param counts of all ranges, in their order
 * @returns first slot of each block with the number of rows at the end, and for each range its first slot in each block
 */
export function blockStarts(counts: Uint32Array[], blocks: number): { starts: Uint32Array; next: Uint32Array[] } {
  const starts = new Uint32Array(blocks + 1);
  const next = counts.map(() => new Uint32Array(blocks));
  let slot = 0;
  for (let block = 0; block < blocks; block++) {
    starts[block] = slot;
    counts.forEach((ofRange, range) => {
      next[range]![block] = slot;
      slot += ofRange[block]!;
    });
  }
  starts[blocks] = slot;
  return { starts, next };
}

/**
 * Writes the indices of the rows of the range to `spread`, sorted by block. `next` is that range's from `blockStarts`,
 * used up by this.
 */
export function spreadRows(
  layout: ZoneLayout,
  { decDeg, only }: GridSource,
  from: number,
  to: number,
  next: Uint32Array,
  spread: Uint32Array,
): void {
  const blocks = blocksOf(layout);
  for (let i = from; i < to; i++) {
    if (only && !Number.isFinite(only[i]!)) continue;
    spread[next[blockOf(zoneOf(layout, decDeg[i]!), blocks, layout.zones)]!++] = i;
  }
}

/** Puts the rows of a range of blocks into the cells of the grid and fills the `starts` of those cells. */
export function placeBlocks(grid: ZoneGrid, spread: Uint32Array, starts: Uint32Array, from: number, to: number): void {
  const { layout } = grid;
  const blocks = blocksOf(layout);
  for (let block = from; block < to; block++) {
    const firstZone = Math.ceil((block * layout.zones) / blocks);
    const endZone = Math.ceil(((block + 1) * layout.zones) / blocks);
    const firstCell = layout.cellsBefore[firstZone]!;
    const endCell = layout.cellsBefore[endZone]!;
    placeRows(grid, spread, starts[block]!, starts[block + 1]!, firstCell, endCell);
    sortHeavyCells(grid, starts[block + 1]!, firstCell, endCell);
  }
}

/** Sorts the rows of one block by cell, by counting. */
function placeRows(
  grid: ZoneGrid,
  spread: Uint32Array,
  from: number,
  to: number,
  firstCell: number,
  endCell: number,
): void {
  const { layout, row, raDeg, decDeg } = grid;
  const next = new Uint32Array(endCell - firstCell);
  const cells = new Uint32Array(to - from);
  for (let i = from; i < to; i++) {
    const index = spread[i]!;
    const cell = cellOf(layout, zoneOf(layout, decDeg[index]!), wrapRaDeg(raDeg[index]!)) - firstCell;
    cells[i - from] = cell;
    next[cell]!++;
  }
  let slot = from;
  for (let cell = 0; cell < next.length; cell++) {
    const rows = next[cell]!;
    next[cell] = slot;
    grid.starts[firstCell + cell] = slot;
    slot += rows;
  }
  for (let i = from; i < to; i++) row[next[cells[i - from]!]!++] = spread[i]!;
}
