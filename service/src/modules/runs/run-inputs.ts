import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { Moc } from '@eremite/shared/science/sky/moc';
import { Injectable } from '@nestjs/common';
import { type CatalogueSettings, engineCatalogue } from '../../scoring/engine-catalogue.ts';
import type { EngineCatalogue, EngineInput } from '../../scoring/engine-input.ts';
import { TileStore } from '../../tiles/tile-store.ts';
import { type RunRow, RunsRepository } from './runs.repository.ts';

type Decisions = {
  cosmology: EngineInput['survey'];
  overrides: Awaited<ReturnType<RunsRepository['overridesInForce']>>;
  distances: Awaited<ReturnType<RunsRepository['distancesInForce']>>;
};

/** Reads everything a run depends on into memory, as it stood when the run was started. */
@Injectable()
export class RunInputs {
  constructor(
    private readonly runs: RunsRepository,
    private readonly tiles: TileStore,
  ) {}

  async load(
    run: RunRow,
    signal: AbortSignal,
    progress: (fraction: number, message: string) => void,
  ): Promise<EngineInput> {
    const inputs = run.inputs as { catalogueId: string; name: string }[];
    const tables = await this.runs.publishedCatalogues(
      run.surveyId,
      inputs.map((input) => input.catalogueId),
    );
    const catalogues: EngineCatalogue[] = [];
    for (const { catalogueId, name } of inputs) {
      signal.throwIfAborted();
      progress(catalogues.length / inputs.length, `reading ${name}`);
      const table = tables.find((entry) => entry.id === catalogueId);
      if (!table) throw new Error(`${name} is no longer published`);
      const { moc, note } = table.coverage as { moc: string | null; note: string };
      const roles = await this.tiles.readRoles(catalogueId);
      const region = moc ? Moc.parse(moc) : null;
      const coverage = { region: region && { order: region.order, ranges: region.ranges }, note };
      catalogues.push(
        engineCatalogue(
          { id: catalogueId, hash: table.contentHash },
          table.settings as CatalogueSettings,
          roles,
          coverage,
        ),
      );
    }
    const { cosmology, overrides, distances } = run.decisions as Decisions;
    return {
      survey: cosmology,
      criteria: run.criteriaSettings as CriteriaSettings,
      catalogues,
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
}
