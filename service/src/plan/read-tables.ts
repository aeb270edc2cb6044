import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { basename } from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { type CatalogueReading, readCatalogue } from '../intake/read-table.ts';
import { SettingsError } from '../intake/resolved.ts';
import { engineCatalogue } from '../scoring/engine-catalogue.ts';
import type { EngineCatalogue } from '../scoring/engine-input.ts';
import { TableError } from '../tables/table.ts';
import { PlanError, type ReadPlan } from './read-plan.ts';

export interface PlanTable {
  file: string;
  sha256: string;
  reading: Omit<CatalogueReading, 'roles'>;
  catalogue: EngineCatalogue;
}

async function hashOf(path: string): Promise<string> {
  const hash = createHash('sha256');
  await pipeline(createReadStream(path, { highWaterMark: 1 << 20 }), hash);
  return hash.digest('hex');
}

/**
 * Reads the tables of a plan.
 *
 * @throws {PlanError} with the faults of all tables, a line each
 */
export async function readTables(
  { plan, files }: ReadPlan,
  onProgress: (fraction: number, message: string) => void,
): Promise<PlanTable[]> {
  const tables: PlanTable[] = [];
  const centres: [number, number][] = [];
  const faults: string[] = [];
  // The list of detections comes first: cones of other tables lie around it.
  const isHi = (i: number) => plan.tables[i]!.settings.kind === 'hi';
  const order = files.map((_, i) => i).sort((a, b) => Number(isHi(b)) - Number(isHi(a)) || a - b);
  for (const [done, i] of order.entries()) {
    const path = files[i]!;
    const { file } = plan.tables[i]!;
    const settings = withCentres(plan.tables[i]!.settings, centres);
    try {
      const { roles, ...reading } = await readCatalogue(path, settings, {
        onProgress: (fraction) => onProgress((done + fraction) / files.length, `reading ${file}`),
      });
      faults.push(...faultsOf(file, reading));
      const { resolved, coverage } = reading;
      const name = settings.name ?? basename(file).replace(/\.[^.]+$/, '');
      const sha256 = await hashOf(path);
      const catalogue = engineCatalogue({ id: String(i), hash: sha256 }, { ...resolved, name }, roles, {
        region: coverage.moc && { order: coverage.moc.order, ranges: coverage.moc.ranges },
        note: `What it covers: ${coverage.note}`,
      });
      if (resolved.kind === 'hi') {
        const { raDeg, decDeg } = roles.columns;
        for (let row = 0; row < roles.rows; row++) centres.push([raDeg[row]!, decDeg[row]!]);
      }
      tables[i] = { file, sha256, reading, catalogue };
    } catch (error) {
      if (error instanceof SettingsError) {
        for (const { pointer, detail } of error.faults) faults.push(`${file}: settings${pointer}: ${detail}`);
      } else if (error instanceof TableError) faults.push(`${file}: ${error.message} ${error.mend}`);
      else throw error;
    }
  }
  if (faults.length === 0 && !tables.some(({ catalogue }) => catalogue.kind === 'hi')) {
    faults.push('No table of the plan is of kind "hi": there are no detections to judge.');
  }
  if (faults.length > 0) throw new PlanError(faults);
  return tables;
}

/** Settings whose cones, if they name no centres, lie around the detections read so far. */
function withCentres(settings: IntakeSettings, centres: [number, number][]): IntakeSettings {
  const { type, value } = settings.footprint ?? {};
  if (type !== 'cones' || typeof value !== 'object' || value === null || 'centres' in value) return settings;
  return { ...settings, footprint: { type, value: { ...value, centres } } };
}

/** What no default can mend: a table without a position. */
function faultsOf(file: string, { resolved, table }: Omit<CatalogueReading, 'roles'>): string[] {
  const { columns } = resolved;
  const names = table.columns.map(({ name }) => name).slice(0, 20);
  const missing: string[] = [];
  if (columns.ra === null && columns.raHours === null) missing.push('right ascension (columns.ra)');
  if (columns.dec === null && columns.decDegrees === null) missing.push('declination (columns.dec)');
  return missing.map((what) => `${file}: which column holds the ${what}? The table has ${names.join(', ')}.`);
}
