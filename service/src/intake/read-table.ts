import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import type { IntakeCheck, SettingsQuestion, SidelinedRow } from '@eremite/shared/contracts/intake';
import { sigmaOfError } from '@eremite/shared/science/counterpart/position-error';
import { type Memory, plainMemory } from '../matching/memory.ts';
import type { ByteSource, TableFacts, TableFormat } from '../tables/table.ts';
import type { PackedColumns } from '../tiles/column-pack.ts';
import { concatColumns } from '../tiles/column-rows.ts';
import { asRoleTable, type RoleTable } from '../tiles/role-table.ts';
import type { CatalogueFacts } from './catalogue-facts.ts';
import { type Coverage, coverageOf } from './coverage.ts';
import { openCatalogue, type ReadOptions } from './open-catalogue.ts';
import type { ResolvedSettings } from './resolved.ts';
import { streamCatalogue } from './stream-catalogue.ts';

export interface CatalogueReading {
  format: TableFormat;
  table: TableFacts;
  resolved: ResolvedSettings;
  /** All that was left open, in sentences: defaults taken, warnings, and questions a person would be asked. */
  questions: SettingsQuestion[];
  /** Sentences of what was assumed, questions that took a default included: for a summary. */
  assumed: string[];
  check: IntakeCheck;
  /** The first rows put aside; `check.sidelined` counts them all. */
  sidelined: SidelinedRow[];
  /** Usable rows in file order. */
  roles: RoleTable;
  facts: CatalogueFacts;
  coverage: Coverage;
  /** 1-D sigma of rows without an error of their own, arcsec: `resolved.positionErrorArcsec` by its meaning. */
  positionErrorArcsec: number | null;
}

const MAX_SIDELINED = 1000;

export interface KeepOptions {
  /** Maker of the memory of the rows. */
  memory?: Memory;
  /** Rows of each piece that are to be kept; all unless given. `check` and `facts` are of all rows in any case. */
  keep?: (piece: RoleTable) => RoleTable;
}

/**
 * Reads one catalogue whole into memory: what a plan does, and what a check of an upload does without the rows.
 *
 * @param source path of the file, or its bytes
 * @param settings as a person wrote them; whatever they leave open takes its documented default
 * @throws {TableError} for a file that cannot be read as a table
 * @throws {SettingsError} for settings that do not fit it, every fault named
 */
export async function readCatalogue(
  source: ByteSource | string,
  settings: IntakeSettings,
  { memory = plainMemory, keep, ...options }: ReadOptions & KeepOptions = {},
): Promise<CatalogueReading> {
  const catalogue = await openCatalogue(source, settings, options);
  const { resolved } = catalogue.resolution;
  const parts: PackedColumns[] = [];
  const places: PackedColumns[] = [];
  const sidelined: SidelinedRow[] = [];
  const { check, facts, questions } = await streamCatalogue(catalogue, settings, (extracted) => {
    const rows = extracted.roles;
    parts.push(keep ? keep(asRoleTable(rows)) : rows);
    // The area that rows cover is told from all of them.
    if (keep && resolved.footprint.type === 'rows') places.push(placesOf(rows));
    for (const { row } of extracted.sidelined) if (sidelined.length < MAX_SIDELINED) sidelined.push(row);
  });
  const roles = joined(parts, memory);
  const { raDeg, decDeg } = places.length > 0 ? joined(places, plainMemory).columns : roles.columns;
  const coverage = coverageOf(resolved, raDeg, decDeg);
  if (settings.footprint === undefined && resolved.kind !== 'hi') {
    questions.push({
      level: 'assumed',
      pointer: '/footprint',
      text: `The area covered is not stated: ${coverage.note}`,
    });
  }
  return {
    format: catalogue.open.format,
    table: catalogue.table,
    resolved,
    questions,
    assumed: questions.filter(({ level }) => level !== 'warning').map(({ text }) => text),
    check,
    sidelined,
    roles,
    facts,
    coverage,
    positionErrorArcsec: commonPositionError(resolved),
  };
}

function placesOf({ rows, columns }: PackedColumns): PackedColumns {
  const { row, raDeg, decDeg } = columns;
  return { rows, columns: { row: row!, raDeg: raDeg!, decDeg: decDeg! } };
}

function joined(parts: PackedColumns[], memory: Memory): RoleTable {
  const empty = { row: new Uint32Array(0), raDeg: new Float64Array(0), decDeg: new Float64Array(0) };
  const { rows, columns } = parts.length ? concatColumns(parts, memory) : { rows: 0, columns: empty };
  // A limit column in which nothing is a limit says nothing.
  const told = Object.entries(columns).filter(
    ([name, column]) => !name.startsWith('magLimit:') || (column as Uint8Array).some((flag) => flag !== 0),
  );
  return asRoleTable({ rows, columns: Object.fromEntries(told) });
}

/** Position error of a whole catalogue as the 1-D sigma, arcsec; null where none is stated. */
export function commonPositionError({ positionErrorArcsec, errorMeaning }: ResolvedSettings): number | null {
  return positionErrorArcsec === null ? null : sigmaOfError(positionErrorArcsec, errorMeaning);
}
