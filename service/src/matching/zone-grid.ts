import type { Memory } from './memory.ts';
import type { Numbers } from './sky-position.ts';
import type { ZoneLayout } from './zone-layout.ts';

/** The rows a grid is made of. */
export interface GridSource {
  /** right ascensions, degrees; values outside [0, 360) mean the same place as inside */
  raDeg: Numbers;
  decDeg: Numbers;
  /** if given, only rows with a finite number here are taken into the grid; the positions of the others are not read */
  only?: Numbers;
}

/**
 * Rows sorted into the cells of a zone layout: an index of 4 bytes a row over positions that stay where they are. Plain
 * data over typed arrays: built over SharedArrayBuffers it can be posted to another thread without a copy.
 *
 * A *slot* is a place in the sorted order; within a cell rows keep the order of the input, except in heavy cells, which
 * are sorted by declination. Searching is fastest if the input is itself in sky order, as tiles are.
 */
export interface ZoneGrid {
  layout: ZoneLayout;
  /** rows in the grid; fewer than positions where `only` left some out */
  rows: number;
  /** first slot of each cell; cells + 1 entries */
  starts: Uint32Array;
  /** index in the input of the row in each slot */
  row: Uint32Array;
  /** the positions given, degrees, in the order of the input */
  raDeg: Numbers;
  decDeg: Numbers;
}

/** A grid with room for the rows and none in it yet; `placeBlocks` fills it. */
export function emptyGrid(layout: ZoneLayout, rows: number, { raDeg, decDeg }: GridSource, memory: Memory): ZoneGrid {
  const cells = layout.cellsBefore[layout.zones]!;
  const starts = new Uint32Array(memory(4 * (cells + 1)));
  starts[cells] = rows;
  return { layout, rows, starts, row: new Uint32Array(memory(4 * rows)), raDeg, decDeg };
}
