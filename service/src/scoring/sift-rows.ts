import type { CatalogueKind } from '@eremite/shared/contracts/words';
import { sharedMemory } from '../matching/memory.ts';
import { concatColumns, selectRows } from '../tiles/column-rows.ts';
import { asRoleTable, type RoleTable } from '../tiles/role-table.ts';
import { type CatalogueDigest, digestOf, mergeDigests } from './catalogue-digest.ts';
import { keptRows, type RowSelection } from './row-selection.ts';

/** Part of a table after sifting: the rows that can matter to the run, and what there is to know of all of them. */
export interface SiftedRows {
  roles: RoleTable;
  digest: CatalogueDigest;
}

/** Sifts a table or a part of one. The rows kept lie in memory that threads share. */
export function siftRows(kind: CatalogueKind, roles: RoleTable, selection: RowSelection): SiftedRows {
  const kept = keptRows(kind, roles, selection);
  const rows = kept ? selectRows(roles, kept, sharedMemory) : roles;
  return { roles: asRoleTable(rows), digest: digestOf(roles) };
}

/** Joins the sifted parts of a table, in whatever order they come: rows in file order, as if the whole had been sifted. */
export function joinSifted(parts: readonly SiftedRows[]): SiftedRows {
  const whole = concatColumns(parts.map(({ roles }) => roles));
  const told = Object.entries(whole.columns).filter(
    // A limit column in which nothing is a limit says nothing.
    ([name, column]) => !name.startsWith('magLimit:') || (column as Uint8Array).some((flag) => flag !== 0),
  );
  const row = whole.columns['row'] as Uint32Array;
  const inOrder = Uint32Array.from(row, (_, i) => i).sort((a, b) => row[a]! - row[b]!);
  const columns = { rows: whole.rows, columns: Object.fromEntries(told) };
  return {
    roles: asRoleTable(selectRows(columns, inOrder, sharedMemory)),
    digest: mergeDigests(parts.map(({ digest }) => digest)),
  };
}
