import type { PackedColumns } from './column-pack.ts';
import { packTight, unpackTight } from './tight-pack.ts';
import type { Tile } from './tile.ts';

/** Cell number under which the table of places is kept: none of the sky. */
export const PLACES_CELL = -1;
/** Data rows of the file that one block of places answers for. */
const BLOCK_BITS = 16;

/** Which block of places knows a data row (1-based). */
export const blockOf = (row: number): number => (row - 1) >>> BLOCK_BITS;

/**
 * Where each row of the file went: block `n` holds, in file order, the places of the usable rows among data rows
 * n * 65536 + 1 to (n + 1) * 65536. With it a row is found by number, and rows are paged in file order.
 */
export class RowPlaces {
  private cells = new Int32Array(0);
  private parts = new Uint32Array(0);
  private offsets = new Uint32Array(0);
  private block = 0;
  private count = 0;
  private readonly pending = {
    row: new Uint32Array(1 << BLOCK_BITS),
    cell: new Int32Array(1 << BLOCK_BITS),
    part: new Uint32Array(1 << BLOCK_BITS),
    at: new Uint32Array(1 << BLOCK_BITS),
  };

  /** Notes the place of row `i` of the table being cut up. */
  put(i: number, cell: number, part: number, at: number): void {
    if (i >= this.cells.length) this.grow(i + 1);
    this.cells[i] = cell;
    this.parts[i] = part;
    this.offsets[i] = at;
  }

  /** Takes over what was put, for the rows of these numbers; returns the blocks that are now complete. */
  commit(rows: Uint32Array): Tile[] {
    const done: Tile[] = [];
    const { row, cell, part, at } = this.pending;
    for (let i = 0; i < rows.length; i++) {
      const block = blockOf(rows[i]!);
      if (block !== this.block) {
        done.push(...this.finish());
        this.block = block;
      }
      const next = this.count++;
      row[next] = rows[i]!;
      cell[next] = this.cells[i]!;
      part[next] = this.parts[i]!;
      at[next] = this.offsets[i]!;
    }
    return done;
  }

  finish(): Tile[] {
    const { count, block } = this;
    if (count === 0) return [];
    const columns = Object.fromEntries(
      Object.entries(this.pending).map(([name, values]) => [name, values.slice(0, count)]),
    );
    this.count = 0;
    const roles = packTight({ rows: count, columns });
    return [{ cell: PLACES_CELL, part: block, count, roles, originals: new Uint8Array(0) }];
  }

  private grow(length: number): void {
    const room = Math.max(length, this.cells.length * 2, 1024);
    const copy = <T extends Int32Array | Uint32Array>(from: T, to: T): T => (to.set(from), to);
    this.cells = copy(this.cells, new Int32Array(room));
    this.parts = copy(this.parts, new Uint32Array(room));
    this.offsets = copy(this.offsets, new Uint32Array(room));
  }
}

export interface RowPlace {
  row: number;
  cell: number;
  part: number;
  at: number;
}

/** Reads a block back, rows ascending. */
export function placesOf(blob: Uint8Array): RowPlace[] {
  const { rows, columns }: PackedColumns = unpackTight(blob);
  const column = (name: string) => columns[name] as Uint32Array | Int32Array;
  const [row, cell, part, at] = [column('row'), column('cell'), column('part'), column('at')];
  return Array.from({ length: rows }, (_, i) => ({ row: row[i]!, cell: cell[i]!, part: part[i]!, at: at[i]! }));
}
