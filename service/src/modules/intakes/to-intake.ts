import { createHash } from 'node:crypto';
import type { Intake, IntakeCheck } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { Inspection } from '../../intake/inspect.ts';
import { companionsOf } from './companions.ts';
import type { IntakeRow } from './intakes.repository.ts';

/** The check as it is stored: with what else was found, the faults that forbid publishing and the settings with guesses written out. */
export interface StoredCheck extends IntakeCheck {
  faults: Inspection['faults'];
  filled: IntakeSettings;
  /** Absent in checks stored before these were looked at. */
  magnitudes?: Intake['magnitudes'];
  coverage?: Intake['coverage'];
  duplicates?: Intake['duplicates'];
  parts?: Inspection['parts'];
}

/** The columns of an intake's row that an inspection fills. */
export function inspectedValues({ format, tables, columns, preview, check, ...found }: Inspection) {
  const stored: StoredCheck = { ...check, ...found };
  return { format, tables, columns, preview, rows: check.rows, check: stored };
}

/** Of the column names in order: tables of one shape share their settings. */
export function headerHash(columns: readonly { name: string }[]): string {
  return createHash('sha256')
    .update(JSON.stringify(columns.map(({ name }) => name)))
    .digest('hex');
}

export const storedCheck = (row: Pick<IntakeRow, 'check'>): StoredCheck => row.check as StoredCheck;

/** The contract's form of a row. */
export function toIntake(row: IntakeRow): Intake {
  const { filled, magnitudes = [], coverage = null, duplicates, parts = [], ...check } = storedCheck(row);
  const { id, surveyId, fileName, bytes, sha256, format, rows, catalogueId } = row;
  const companions = companionsOf(row);
  const sizes = [bytes, ...companions.flatMap((file) => (file.role === 'part' ? [file.bytes] : []))];
  return {
    id,
    surveyId,
    fileName,
    bytes,
    sha256,
    readMe: companions.find(({ role }) => role === 'readMe')?.fileName ?? null,
    parts: parts.map((part, i) => ({ ...part, bytes: sizes[i] ?? null })),
    state: row.state as Intake['state'],
    format,
    tables: row.tables as Intake['tables'],
    columns: row.columns as Intake['columns'],
    preview: row.preview as Intake['preview'],
    rows,
    settings: filled,
    check,
    magnitudes,
    coverage,
    duplicates: duplicates ?? { count: 0, pairs: [] },
    warnings: row.warnings as string[],
    catalogueId,
    createdAt: row.createdAt.toISOString(),
  };
}
