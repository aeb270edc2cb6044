import { type Memory, plainMemory } from '../matching/memory.ts';
import { type PackedColumns, unpackColumns } from './column-pack.ts';
import { concatColumns, selectRows } from './column-rows.ts';
import { asRoleTable, type RoleTable } from './role-table.ts';

/**
 * Joins the packed role columns of tiles into one table.
 *
 * @param order `file`: ascending row numbers; `sky`: as the tiles come
 * @param memory maker of the memory of the joined columns
 * @throws {ColumnPackError} when a blob is not what was written
 */
export function joinRoles(
  blobs: readonly Uint8Array[],
  order: 'file' | 'sky' = 'file',
  memory: Memory = plainMemory,
): RoleTable {
  const parts = blobs.map((blob) => unpackColumns(blob));
  const none = { row: new Uint32Array(0), raDeg: new Float64Array(0), decDeg: new Float64Array(0) };
  let table: PackedColumns = parts.length ? concatColumns(parts, order === 'file' ? plainMemory : memory) : { rows: 0, columns: none };
  // A limit column in which nothing is a limit says nothing.
  const told = Object.entries(table.columns).filter(
    ([name, column]) => !name.startsWith('magLimit:') || (column as Uint8Array).some((flag) => flag !== 0),
  );
  table = { rows: table.rows, columns: Object.fromEntries(told) };
  if (order === 'file') {
    const row = table.columns['row'] as Uint32Array;
    const indices = Uint32Array.from(row, (_, i) => i).sort((a, b) => row[a]! - row[b]!);
    table = selectRows(table, indices, memory);
  }
  return asRoleTable(table);
}
