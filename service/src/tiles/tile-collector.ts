import { TILE_CELLS, tileCells } from './cells.ts';
import type { Column, PackedColumns } from './column-pack.ts';
import { alike } from './original-cells.ts';
import { packOriginals, sameColumns } from './original-pack.ts';
import { RowPlaces } from './row-places.ts';
import { Scratch } from './scratch.ts';
import { scatterColumn } from './scatter-columns.ts';
import { packTight } from './tight-pack.ts';
import type { Tile } from './tile.ts';

/** Rows in one tile at most, so that a crowded cell is still read in pieces. */
const MOST_ROWS = 32_768;

/**
 * Sorts the rows of a catalogue into tiles as they come. What is held in memory is bounded: past `bufferBytes` all
 * that is held goes out as tiles, and a cell met again gets a further part. Within a tile rows are in file order.
 */
export class TileCollector {
  private held: { roles: PackedColumns; originals: PackedColumns }[] = [];
  private heldBytes = 0;
  private readonly parts = new Uint32Array(TILE_CELLS);
  private readonly places = new RowPlaces();
  private readonly scratch = new Scratch();

  constructor(private readonly bufferBytes = 48 * 1024 ** 2) {}

  /**
   * @param roles rows of the next chunk, in file order
   * @param originals the same rows' original cells, columns in file order
   * @returns the tiles that are complete, mostly none; each is packed when it is asked for, and all must be taken
   *   before the next chunk is added
   */
  add(roles: PackedColumns, originals: PackedColumns): Iterable<Tile> {
    if (roles.rows === 0) return [];
    this.held.push({ roles, originals });
    this.heldBytes += bytesOf(roles) + bytesOf(originals);
    return this.heldBytes > this.bufferBytes ? this.flush() : [];
  }

  /** The tiles of all that is still held, and the table of places. Nothing may be added after. */
  *finish(): Iterable<Tile> {
    yield* this.flush();
    yield* this.places.finish();
  }

  private *flush(): Iterable<Tile> {
    const { held } = this;
    [this.held, this.heldBytes] = [[], 0];
    if (held.length === 0) return;
    const originals = alike(held.map((piece) => piece.originals));
    const same = sameColumns(held.map(({ roles }, i) => ({ roles, originals: originals[i]! })));
    const order = Object.keys(originals[0]!.columns);
    const rowNumbers = joined(held.map(({ roles }) => roles.columns['row'] as Uint32Array));
    const cells = joined(
      held.map(({ roles: { columns } }) =>
        tileCells(columns['raDeg'] as Float64Array, columns['decDeg'] as Float64Array),
      ),
    );
    const starts = startsOf(cells);
    const places = placesOf(cells, starts);
    this.scratch.reset();
    const roles = sorted(taken(held.map((piece) => piece.roles)), places, this.scratch);
    const apart = sorted(taken(originals, same), places, this.scratch);
    for (let i = 0; i < cells.length; i++) {
      const cell = cells[i]!;
      const within = places[i]! - starts[cell]!;
      this.places.put(i, cell, this.parts[cell]! + Math.floor(within / MOST_ROWS), within % MOST_ROWS);
    }
    for (let cell = 0; cell < TILE_CELLS; cell++) {
      for (let from = starts[cell]!; from < starts[cell + 1]!; from += MOST_ROWS) {
        const to = Math.min(starts[cell + 1]!, from + MOST_ROWS);
        yield {
          cell,
          part: this.parts[cell]!++,
          count: to - from,
          roles: packTight(slice(roles, from, to)),
          originals: packOriginals(slice(apart, from, to), order, same),
        };
      }
    }
    yield* this.places.commit(rowNumbers);
  }
}

function joined(pieces: readonly Uint32Array[]): Uint32Array {
  const all = new Uint32Array(pieces.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const piece of pieces) {
    all.set(piece, at);
    at += piece.length;
  }
  return all;
}

/** Where the rows of each cell begin once they are sorted; one entry more than there are cells. */
function startsOf(cells: Uint32Array): Uint32Array {
  const starts = new Uint32Array(TILE_CELLS + 1);
  for (let i = 0; i < cells.length; i++) starts[cells[i]! + 1]!++;
  for (let cell = 0; cell < TILE_CELLS; cell++) starts[cell + 1]! += starts[cell]!;
  return starts;
}

/** Where each row goes: by cell, and within a cell as they came. A counting sort. */
function placesOf(cells: Uint32Array, starts: Uint32Array): Uint32Array {
  const next = starts.slice();
  const places = new Uint32Array(cells.length);
  for (let i = 0; i < cells.length; i++) places[i] = next[cells[i]!]!++;
  return places;
}

/** Pieces by column, taken out of the tables so that each can be given up once it has been sorted. */
function taken(
  tables: readonly PackedColumns[],
  without: { has(name: string): boolean } = new Set<string>(),
): Map<string, Column[]> {
  const byName = new Map<string, Column[]>();
  for (const name of Object.keys(tables[0]!.columns)) {
    if (without.has(name)) continue;
    byName.set(
      name,
      tables.map(({ columns }) => columns[name]!),
    );
  }
  for (const table of tables) table.columns = {};
  return byName;
}

function sorted(pieces: Map<string, Column[]>, places: Uint32Array, scratch: Scratch): PackedColumns {
  const columns: Record<string, Column> = {};
  for (const [name, list] of pieces) {
    columns[name] = scatterColumn(list, places, scratch);
    pieces.delete(name);
  }
  return { rows: places.length, columns };
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

/** Bytes of a table, an array shared by two columns or tables counted each time. */
function bytesOf({ columns }: PackedColumns): number {
  let bytes = 0;
  for (const column of Object.values(columns)) {
    bytes += 'kind' in column ? column.offsets.byteLength + column.bytes.length : column.byteLength;
  }
  return bytes;
}
