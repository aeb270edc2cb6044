import type { ColumnRole, IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { Intake, IntakeCheck, IntakeColumn, SettingsQuestion } from '@eremite/shared/contracts/intake';
import { Moc } from '@eremite/shared/science/sky/moc';
import { type ByteSource } from '../tables/table.ts';
import { bandCountsOf } from './band-counts.ts';
import { type Coverage, coverageOf } from './coverage.ts';
import { openCatalogue, type OpenCatalogue, type ReadOptions } from './open-catalogue.ts';
import type { PartRows } from './join-parts.ts';
import { cellAt } from './sample.ts';
import { SettingsError } from './resolved.ts';
import { assertReadable, streamCatalogue } from './stream-catalogue.ts';

/** All that the wizard shows of an upload, found by reading every row once. */
export interface Inspection {
  format: string;
  tables: Intake['tables'];
  /** What each file gave, where there are several. */
  parts: PartRows[];
  columns: IntakeColumn[];
  preview: string[][];
  check: IntakeCheck;
  magnitudes: Intake['magnitudes'];
  coverage: Intake['coverage'];
  duplicates: Intake['duplicates'];
  /** Settings that cannot be carried out; with one of these the rows are only counted. */
  faults: { pointer: string; detail: string }[];
  /** The settings as the person wrote them, with the columns that were taken by guess written out. */
  filled: IntakeSettings;
}

const PREVIEW_ROWS = 50;
const MOST_CELL = 500;

/**
 * Reads an uploaded file under settings and says what would become of it. Any readable table is accepted: what is
 * wrong with the settings is part of the answer.
 *
 * @throws {TableError} for a file that is no readable table
 */
export async function inspect(
  source: ByteSource | string,
  settings: IntakeSettings,
  options: ReadOptions = {},
): Promise<Inspection> {
  const catalogue = await openCatalogue(source, settings, options);
  const { open, table, resolution } = catalogue;
  const { faults, ...found } = await checkAll(catalogue, settings);
  const { check } = found;
  return {
    format: open.format,
    tables: open.tables.map(({ index, name, declaredRows, columns }) => ({
      index,
      name,
      rows: index === table.index ? check.rows : declaredRows,
      columns: columns.length,
    })),
    parts: [...catalogue.parts],
    columns: columnsOf(catalogue),
    preview: previewOf(catalogue),
    ...found,
    faults,
    filled: {
      ...settings,
      table: table.index,
      name: resolution.resolved.name,
      // A region sent as a FITS file is shown as what was read.
      ...(settings.footprint?.type === 'moc' ? { footprint: resolution.resolved.footprint } : {}),
      columns: takenColumns(catalogue, settings),
    },
  };
}

async function checkAll(
  catalogue: OpenCatalogue,
  settings: IntakeSettings,
): Promise<Pick<Inspection, 'check' | 'magnitudes' | 'coverage' | 'duplicates' | 'faults'>> {
  const { resolution } = catalogue;
  try {
    assertReadable(catalogue);
  } catch (error) {
    if (!(error instanceof SettingsError)) throw error;
    const asked = resolution.questions.map(({ pointer }) => pointer);
    const more = error.faults
      .filter(({ pointer }) => !asked.includes(pointer))
      .map(({ pointer, detail }): SettingsQuestion => ({ level: 'ask', pointer, text: detail }));
    let rows = 0;
    for await (const chunk of catalogue.chunks()) rows += chunk.rows + (chunk.broken?.length ?? 0);
    const questions = [...more, ...resolution.questions];
    const check = { rows, usable: 0, sidelined: 0, leftOut: 0, reasons: [], questions, ready: false };
    const nothing = { magnitudes: [], coverage: null, duplicates: { count: 0, pairs: [] } };
    return { check, ...nothing, faults: [...error.faults] };
  }
  const positions: [Float64Array, Float64Array][] = [];
  const wantsArea = settings.footprint === undefined || settings.footprint.type === 'rows';
  const { check, facts, duplicates } = await streamCatalogue(catalogue, settings, ({ roles }) => {
    if (wantsArea) positions.push([roles.columns['raDeg'] as Float64Array, roles.columns['decDeg'] as Float64Array]);
  });
  const { resolved } = resolution;
  const coverage = coverageOf(resolved, joined(positions.map(([ra]) => ra)), joined(positions.map(([, dec]) => dec)));
  if (wantsArea && check.usable > 0 && resolved.kind !== 'hi') {
    const said =
      settings.footprint === undefined ? 'The area covered is not stated' : 'The area is taken from the rows';
    check.questions.push({ level: 'assumed', pointer: '/footprint', text: `${said}: ${coverage.note}` });
  }
  return {
    check,
    magnitudes: bandCountsOf(resolved.bands, facts),
    coverage: shown(coverage),
    duplicates,
    faults: [],
  };
}

/** Range edges beyond which a region is coarsened to be shown; what is published keeps them all. */
const MOST_EDGES = 20_000;

function shown({ type, moc, areaSqDeg, note }: Coverage): Inspection['coverage'] {
  let region: Moc | null = moc;
  while (region && region.ranges.length > MOST_EDGES && region.order > 3) region = region.degraded(region.order - 1);
  return { type, areaSqDeg, moc: region?.toAscii() ?? null, note };
}

function joined(parts: readonly Float64Array[]): Float64Array {
  const all = new Float64Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    all.set(part, at);
    at += part.length;
  }
  return all;
}

/** The columns with what each seems to hold. */
export function columnsOf({ table, resolution }: OpenCatalogue): IntakeColumn[] {
  return table.columns.map(({ name, unit, ucd, description, type }, i) => {
    const guess = resolution.guesses.find(({ column }) => column === i);
    return {
      name,
      unit: unit ?? null,
      ucd: ucd ?? null,
      description: description ?? null,
      type,
      guess: guess?.role ?? null,
      confidence: guess?.confidence ?? 0,
    };
  });
}

function previewOf({ firstChunk }: OpenCatalogue): string[][] {
  if (!firstChunk) return [];
  return Array.from({ length: Math.min(PREVIEW_ROWS, firstChunk.rows) }, (_, i) =>
    firstChunk.columns.map((data) => cellAt(data, i).slice(0, MOST_CELL)),
  );
}

/**
 * Roles with their columns, guesses written out. A guess that was not taken (too unsure, or of no use in a table of this
 * kind) is written as null, so that what is shown is what is done; other roles stay open.
 */
function takenColumns({ resolution }: OpenCatalogue, settings: IntakeSettings): IntakeSettings['columns'] {
  const { magnitudes, ...roles } = resolution.resolved.columns;
  const guessed = resolution.guesses.map(({ role }) => role);
  const { magnitude: _single, ...given } = settings.columns ?? {};
  const refused = guessed.filter((role) => role in roles && role !== 'magnitude').map((role) => [role, null]);
  const taken = Object.entries(roles).filter(([, column]) => column !== null) as [ColumnRole, string][];
  const bands = magnitudes.length > 0 || guessed.some((role) => role.startsWith('magnitude')) ? { magnitudes } : {};
  return { ...Object.fromEntries(refused), ...given, ...Object.fromEntries(taken), ...bands };
}
