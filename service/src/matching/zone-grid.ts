import type { Numbers } from './sky-position.ts';
import type { ZoneLayout } from './zone-layout.ts';

/**
 * Rows sorted into the cells of a zone layout. Plain data over typed arrays: built over SharedArrayBuffers it can be
 * posted to another thread without a copy.
 *
 * A *slot* is a place in this order; within a cell rows keep the order of the input, except in heavy cells, which are
 * sorted by declination.
 */
export interface ZoneGrid {
  layout: ZoneLayout;
  rows: number;
  /** first slot of each cell; cells + 1 entries */
  starts: Uint32Array;
  /** right ascension in [0, 360) and declination of each slot, degrees, interleaved: 2 entries a slot */
  coords: Numbers;
  /** index in the input of each slot */
  row: Uint32Array;
}

/** Maker of the memory of a grid: plain, or shared between threads. */
export type Memory = (bytes: number) => ArrayBufferLike;
export const plainMemory: Memory = (bytes) => new ArrayBuffer(bytes);
export const sharedMemory: Memory = (bytes) => new SharedArrayBuffer(bytes);

/** A grid with room for the rows and nothing in it yet; `placeBlocks` fills it. */
export function emptyGrid(layout: ZoneLayout, rows: number, memory: Memory): ZoneGrid {
  const cells = layout.cellsBefore[layout.zones]!;
  const starts = new Uint32Array(memory(4 * (cells + 1)));
  starts[cells] = rows;
  return { layout, rows, starts, ...roomForRows(rows, memory) };
}

/** Room for coordinates and row numbers of so many rows. */
export function roomForRows(rows: number, memory: Memory): Pick<ZoneGrid, 'coords' | 'row'> {
  return { coords: new Float64Array(memory(16 * rows)), row: new Uint32Array(memory(4 * rows)) };
}
