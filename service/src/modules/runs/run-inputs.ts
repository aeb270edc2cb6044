import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { Moc } from '@eremite/shared/science/sky/moc';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import type { CatalogueSettings } from '../../scoring/engine-catalogue.ts';
import type { EngineInput } from '../../scoring/engine-input.ts';
import { TileStore } from '../../tiles/tile-store.ts';
import type { PackedTable } from './packed-input.ts';
import { type RunRow, RunsRepository } from './runs.repository.ts';

export type CatalogueRow = Awaited<ReturnType<RunsRepository['publishedCatalogues']>>[number];

/** People's words as they stood when a run was started, as its row keeps them. */
export interface StoredDecisions {
  cosmology: EngineInput['survey'];
  overrides: Awaited<ReturnType<RunsRepository['overridesInForce']>>;
  distances: Awaited<ReturnType<RunsRepository['distancesInForce']>>;
}

/** A table of a run, still in the database. */
export interface RunTable {
  about: Pick<PackedTable, 'identity' | 'settings' | 'coverage'>;
  rows: number;
  /** Its tiles, packed, a few at a time. */
  pieces(): AsyncIterable<Uint8Array[]>;
}

/** Everything a run depends on, its tables not yet read. */
export type RunSource = Omit<EngineInput, 'catalogues'> & { tables: RunTable[] };

/** Finds everything a run depends on, as it stood when the run was started. */
@Injectable()
export class RunInputs {
  constructor(
    private readonly runs: RunsRepository,
    private readonly tiles: TileStore,
  ) {}

  /** @throws {AppError} RUN_FAILED where a table is gone */
  async open(run: RunRow): Promise<RunSource> {
    const inputs = run.inputs as { catalogueId: string; name: string }[];
    const found = await this.runs.cataloguesOfRun(
      run.surveyId,
      inputs.map((input) => input.catalogueId),
    );
    const tables = inputs.map(({ catalogueId, name }): RunTable => {
      const table = found.find((entry) => entry.id === catalogueId);
      if (!table) throw new AppError('RUN_FAILED', `${name} is no longer published.`);
      return { about: aboutTable(table), rows: table.rows, pieces: () => this.tiles.packedPieces(catalogueId) };
    });
    return {
      ...engineDecisions(run.decisions as StoredDecisions),
      criteria: run.criteriaSettings as CriteriaSettings,
      tables,
    };
  }

  /** People's words in force that concern some tables of a survey, and its cosmology. */
  async decisionsNow(
    survey: { id: string; h0: number; omegaM: number },
    tables: readonly { id: string }[],
  ): Promise<StoredDecisions> {
    const ids = new Set(tables.map((table) => table.id));
    const overrides = await this.runs.overridesInForce(survey.id);
    const distances = await this.runs.distancesInForce(survey.id);
    return {
      cosmology: { h0: survey.h0, omegaM: survey.omegaM },
      overrides: overrides.filter((entry) => ids.has(entry.detectionCatalogueId) && ids.has(entry.catalogueId)),
      distances: distances.filter((entry) => ids.has(entry.detectionCatalogueId)),
    };
  }
}

/** What the engine is told of a published table besides its rows. */
export function aboutTable(table: CatalogueRow): Pick<PackedTable, 'identity' | 'settings' | 'coverage'> {
  const { moc, note } = table.coverage as { moc: string | null; note: string };
  const region = moc ? Moc.parse(moc) : null;
  return {
    identity: { id: table.id, hash: table.contentHash },
    settings: table.settings as CatalogueSettings,
    coverage: { region: region && { order: region.order, ranges: region.ranges }, note },
  };
}

/** Stored decisions in the engine's terms. */
export function engineDecisions({
  cosmology,
  overrides,
  distances,
}: StoredDecisions): Pick<EngineInput, 'survey' | 'decisions'> {
  return {
    survey: cosmology,
    decisions: {
      overrides: overrides.map(
        ({ row, ...override }) => ({ ...override, rowId: row }) as EngineInput['decisions']['overrides'][number],
      ),
      distances: distances.map(({ detectionCatalogueId, detectionRow, ...distance }) => ({
        ...distance,
        catalogueId: detectionCatalogueId,
        row: detectionRow,
      })),
    },
  };
}
