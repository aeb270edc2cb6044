import { TILE_CELLS, tileCells } from './cells.ts';
import { type Column, type PackedColumns, packColumns } from './column-pack.ts';
import { concatColumns, selectRows } from './column-rows.ts';
import { alike } from './original-cells.ts';
import { RowPlaces } from './row-places.ts';
import type { Tile } from './tile.ts';

/** Rows in one tile at most, so that a crowded cell is still read in pieces. */
const MOST_ROWS = 32_768;

/**
 * Sorts the rows of a catalogue into tiles as they come. What is held in memory is bounded: past `bufferBytes` all
 * that is held goes out as tiles, and a cell met again gets a further part. Within a tile rows are in file order.
 */
export class TileCollector {
  private roles: PackedColumns[] = [];
  private originals: PackedColumns[] = [];
  private held = 0;
  private readonly parts = new Uint32Array(TILE_CELLS);
  private readonly places = new RowPlaces();

  constructor(private readonly bufferBytes = 96 * 1024 ** 2) {}

  /**
   * @param roles rows of the next chunk, in file order
   * @param originals the same rows' original cells, columns in file order
   * @returns the tiles that are complete, mostly none
   */
  add(roles: PackedColumns, originals: PackedColumns): Tile[] {
    if (roles.rows === 0) return [];
    this.roles.push(roles);
    this.originals.push(originals);
    this.held += bytesOf(roles) + bytesOf(originals);
    return this.held > this.bufferBytes ? this.flush() : [];
  }

  /** The tiles of all that is still held, and the table of places. Nothing may be added after. */
  finish(): Tile[] {
    return [...this.flush(), ...this.places.finish()];
  }

  private flush(): Tile[] {
    if (this.roles.length === 0) return [];
    const roles = concatColumns(this.roles);
    const originals = concatColumns(alike(this.originals));
    [this.roles, this.originals, this.held] = [[], [], 0];
    const cells = tileCells(roles.columns['raDeg'] as Float64Array, roles.columns['decDeg'] as Float64Array);
    const order = orderByCell(cells);
    const sorted = selectRows(roles, order);
    const sortedOriginals = selectRows(originals, order);
    const tiles: Tile[] = [];
    for (let from = 0; from < order.length;) {
      const cell = cells[order[from]!]!;
      let to = from + 1;
      while (to < order.length && to - from < MOST_ROWS && cells[order[to]!] === cell) to++;
      const part = this.parts[cell]!++;
      for (let i = from; i < to; i++) this.places.put(order[i]!, cell, part, i - from);
      tiles.push({
        cell,
        part,
        count: to - from,
        roles: packColumns(slice(sorted, from, to)),
        originals: packColumns(slice(sortedOriginals, from, to)),
      });
      from = to;
    }
    return [...tiles, ...this.places.commit(roles.columns['row'] as Uint32Array)];
  }
}

/** Places in the table ordered by cell, and within a cell as they came: a counting sort. */
function orderByCell(cells: Uint32Array): Uint32Array {
  const starts = new Uint32Array(TILE_CELLS + 1);
  for (let i = 0; i < cells.length; i++) starts[cells[i]! + 1]!++;
  for (let cell = 0; cell < TILE_CELLS; cell++) starts[cell + 1]! += starts[cell]!;
  const order = new Uint32Array(cells.length);
  for (let i = 0; i < cells.length; i++) order[starts[cells[i]!]!++] = i;
  return order;
}

/** Rows [from, to): numbers as views, text with offsets of its own. */
function slice({ columns }: PackedColumns, from: number, to: number): PackedColumns {
  const part: Record<string, Column> = {};
  for (const [name, column] of Object.entries(columns)) {
    if (!('kind' in column)) part[name] = column.subarray(from, to);
    else {
      const start = column.offsets[from]!;
      const offsets = column.offsets.slice(from, to + 1);
      for (let i = 0; i < offsets.length; i++) offsets[i]! -= start;
      part[name] = { kind: 'text', offsets, bytes: column.bytes.subarray(start, column.offsets[to]) };
    }
  }
  return { rows: to - from, columns: part };
}

function bytesOf({ columns }: PackedColumns): number {
  let bytes = 0;
  for (const column of Object.values(columns)) {
    bytes += 'kind' in column ? column.offsets.byteLength + column.bytes.length : column.byteLength;
  }
  return bytes;
}
