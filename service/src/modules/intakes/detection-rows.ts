import type { BulkColumn } from '../../database/bulk.ts';
import { textAt, type TextColumn } from '../../tiles/column-pack.ts';
import { nameRole, type NumberRole, numberRole, type RoleTable } from '../../tiles/role-table.ts';

const NUMBERS: readonly [string, NumberRole][] = [
  ['ra_deg', 'raDeg'],
  ['dec_deg', 'decDeg'],
  ['velocity_kms', 'czKms'],
  ['width50_kms', 'width50Kms'],
  ['flux_jy_kms', 'fluxJyKms'],
  ['signal_to_noise', 'signalToNoise'],
  ['reliability', 'reliability'],
  ['distance_mpc', 'distanceMpc'],
  ['distance_error_mpc', 'distanceErrorMpc'],
];

export const DETECTION_COLUMNS: readonly BulkColumn[] = [
  { name: 'id', type: 'uuid' },
  { name: 'survey_id', type: 'uuid' },
  { name: 'catalogue_id', type: 'uuid' },
  { name: 'row', type: 'int4' },
  { name: 'name', type: 'text' },
  ...NUMBERS.map(([name]) => ({ name, type: 'float8' as const })),
];
const BATCH = 2000;

/** Rows of the table `detections`, in file order. */
export function* detectionRows(
  roles: RoleTable,
  surveyId: string,
  catalogueId: string,
  newId: () => string,
): Generator<unknown[][]> {
  const names = detectionNames(roles);
  const numbers = NUMBERS.map(([, role]) => numberRole(roles, role));
  for (let from = 0; from < roles.rows; from += BATCH) {
    const batch: unknown[][] = [];
    for (let i = from; i < Math.min(roles.rows, from + BATCH); i++) {
      batch.push([
        newId(),
        surveyId,
        catalogueId,
        roles.columns.row[i],
        names[i],
        ...numbers.map((values) => values?.[i] ?? null),
      ]);
    }
    yield batch;
  }
}

/** The name of each row, or its number where it has none; a name met again carries its row number too. */
export function detectionNames(roles: RoleTable): string[] {
  const column: TextColumn | undefined = nameRole(roles);
  const seen = new Set<string>();
  return Array.from({ length: roles.rows }, (_, i) => {
    const row = roles.columns.row[i]!;
    const name = (column && textAt(column, i).trim()) || String(row);
    const unique = seen.has(name) ? `${name} (row ${row})` : name;
    seen.add(unique);
    return unique;
  });
}
