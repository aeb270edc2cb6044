import { packColumns, type PackedColumns, unpackColumns } from './column-pack.ts';
import type { Tile } from './tile-collector.ts';

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
  private pending: { row: number[]; cell: number[]; part: number[]; at: number[] } = empty();

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
    for (let i = 0; i < rows.length; i++) {
      const block = blockOf(rows[i]!);
      if (block !== this.block) {
        done.push(...this.finish());
        this.block = block;
      }
      this.pending.row.push(rows[i]!);
      this.pending.cell.push(this.cells[i]!);
      this.pending.part.push(this.parts[i]!);
      this.pending.at.push(this.offsets[i]!);
    }
    return done;
  }

  finish(): Tile[] {
    const { row, cell, part, at } = this.pending;
    this.pending = empty();
    if (row.length === 0) return [];
    const columns = {
      row: Uint32Array.from(row),
      cell: Int32Array.from(cell),
      part: Uint32Array.from(part),
      at: Uint32Array.from(at),
    };
    const roles = packColumns({ rows: row.length, columns });
    return [{ cell: PLACES_CELL, part: this.block, count: row.length, roles, originals: new Uint8Array(0) }];
  }

  private grow(length: number): void {
    const room = Math.max(length, this.cells.length * 2, 1024);
    const copy = <T extends Int32Array | Uint32Array>(from: T, to: T): T => (to.set(from), to);
    this.cells = copy(this.cells, new Int32Array(room));
    this.parts = copy(this.parts, new Uint32Array(room));
    this.offsets = copy(this.offsets, new Uint32Array(room));
  }
}

const empty = () => ({ row: [] as number[], cell: [] as number[], part: [] as number[], at: [] as number[] });

export interface RowPlace {
  row: number;
  cell: number;
  part: number;
  at: number;
}

/** Reads a block back, rows ascending. */
export function placesOf(blob: Uint8Array): RowPlace[] {
  const { rows, columns }: PackedColumns = unpackColumns(blob);
  const column = (name: string) => columns[name] as Uint32Array | Int32Array;
  const [row, cell, part, at] = [column('row'), column('cell'), column('part'), column('at')];
  return Array.from({ length: rows }, (_, i) => ({ row: row[i]!, cell: cell[i]!, part: part[i]!, at: at[i]! }));
}
