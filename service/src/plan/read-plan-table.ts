import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { basename } from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { type CatalogueReading, readCatalogue } from '../intake/read-table.ts';
import { SettingsError } from '../intake/resolved.ts';
import { sharedMemory } from '../matching/memory.ts';
import { type CatalogueDigest, mergeDigests } from '../scoring/catalogue-digest.ts';
import { engineCatalogue } from '../scoring/engine-catalogue.ts';
import type { EngineCatalogue } from '../scoring/engine-input.ts';
import type { RowSelection } from '../scoring/row-selection.ts';
import { siftRows } from '../scoring/sift-rows.ts';
import { TableError } from '../tables/table.ts';
import type { RoleTable } from '../tiles/role-table.ts';

/** What is read of one table of a plan. */
export interface PlanTableTask {
  path: string;
  /** As the plan names it. */
  file: string;
  /** Place among the tables of the plan. */
  index: number;
  settings: IntakeSettings;
  /** Where rows can matter; without it all are kept. */
  selection?: RowSelection;
}

/** A table of a plan, as plain data: it may have been read in another thread. */
export interface PlanTable {
  file: string;
  sha256: string;
  reading: Omit<CatalogueReading, 'roles' | 'coverage'> & {
    coverage: Pick<CatalogueReading['coverage'], 'type' | 'areaSqDeg' | 'note'>;
  };
  catalogue: EngineCatalogue;
}

async function hashOf(path: string): Promise<string> {
  const hash = createHash('sha256');
  await pipeline(createReadStream(path, { highWaterMark: 1 << 20 }), hash);
  return hash.digest('hex');
}

/** Reads a table into memory that threads share; or says in a sentence each what keeps it from being read. */
export async function readPlanTable(
  { path, file, index, settings, selection }: PlanTableTask,
  onProgress: (fraction: number) => void = () => undefined,
): Promise<{ table: PlanTable } | { faults: string[] }> {
  try {
    const digests: CatalogueDigest[] = [];
    const keep = (piece: RoleTable): RoleTable => {
      const { roles: kept, digest } = siftRows(settings.kind!, piece, selection!);
      digests.push(digest);
      return kept;
    };
    const { roles, coverage, ...reading } = await readCatalogue(path, settings, {
      onProgress,
      memory: sharedMemory,
      ...(selection && { keep }),
    });
    const faults = faultsOf(file, reading);
    if (faults.length > 0) return { faults };
    const { resolved } = reading;
    const { type, moc, areaSqDeg, note } = coverage;
    const name = settings.name ?? basename(file).replace(/\.[^.]+$/, '');
    const sha256 = await hashOf(path);
    const rows = engineCatalogue({ id: String(index), hash: sha256 }, { ...resolved, name }, roles, {
      region: moc && { order: moc.order, ranges: moc.ranges },
      note: `What it covers: ${note}`,
    });
    const catalogue = selection ? { ...rows, digest: mergeDigests(digests) } : rows;
    return { table: { file, sha256, reading: { ...reading, coverage: { type, areaSqDeg, note } }, catalogue } };
  } catch (error) {
    if (error instanceof SettingsError) {
      return { faults: error.faults.map(({ pointer, detail }) => `${file}: settings${pointer}: ${detail}`) };
    }
    if (error instanceof TableError) return { faults: [`${file}: ${error.message} ${error.mend}`] };
    throw error;
  }
}

/** What no default can mend: a table without a position. */
function faultsOf(file: string, { resolved, table }: Pick<CatalogueReading, 'resolved' | 'table'>): string[] {
  const { columns } = resolved;
  const names = table.columns.map(({ name }) => name).slice(0, 20);
  const missing: string[] = [];
  if (columns.ra === null && columns.raHours === null) missing.push('right ascension (columns.ra)');
  if (columns.dec === null && columns.decDegrees === null) missing.push('declination (columns.dec)');
  return missing.map((what) => `${file}: which column holds the ${what}? The table has ${names.join(', ')}.`);
}
