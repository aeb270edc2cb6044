import { type Memory, plainMemory } from '../matching/memory.ts';
import type { Column } from './column-pack.ts';
import { concatColumns, selectRows } from './column-rows.ts';
import { asRoleTable, type RoleTable } from './role-table.ts';
import { openPack } from './tight-pack.ts';

/**
 * Joins the packed role columns of tiles into one table, column by column, so that no more than one is held twice.
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
  const packs = blobs.map((blob) => openPack(blob));
  const first = packs[0];
  if (!first) {
    const none = { row: new Uint32Array(0), raDeg: new Float64Array(0), decDeg: new Float64Array(0) };
    return asRoleTable({ rows: 0, columns: none });
  }
  const rows = packs.reduce((sum, pack) => sum + pack.rows, 0);
  const columns: Record<string, Column> = {};
  let indices: Uint32Array | undefined;
  // The row numbers come first, since the others may be put in their order.
  for (const name of ['row', ...first.names.filter((other) => other !== 'row')]) {
    const parts = packs.map((pack) => ({ rows: pack.rows, columns: only(name, pack.column(name)) }));
    let joined = concatColumns(parts, order === 'file' && name !== 'row' ? plainMemory : memory);
    const column = joined.columns[name];
    // A limit column in which nothing is a limit says nothing.
    if (!column || (name.startsWith('magLimit:') && (column as Uint8Array).every((flag) => flag === 0))) continue;
    if (order === 'file') {
      if (name === 'row') indices = fileOrder(column as Uint32Array);
      if (indices) joined = selectRows(joined, indices, memory);
    }
    columns[name] = joined.columns[name]!;
  }
  return asRoleTable({ rows, columns });
}

const only = (name: string, column: Column | undefined): Record<string, Column> => (column ? { [name]: column } : {});

function fileOrder(row: Uint32Array): Uint32Array {
  return Uint32Array.from(row, (_, i) => i).sort((a, b) => row[a]! - row[b]!);
}
