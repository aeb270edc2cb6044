import { type Field, MOST_FIELD_OBJECTS } from '@eremite/shared/contracts/field';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { CatalogueSettings } from '../../scoring/engine-catalogue.ts';
import { TileStore } from '../../tiles/tile-store.ts';
import { cutField, fieldTable } from './field-table.ts';
import { RunsRepository } from './runs.repository.ts';
import { RunsService } from './runs.service.ts';
import { VerdictsRepository } from './verdicts.repository.ts';

/** What the tables of a run hold about a detection, whether or not it bears on the verdict. */
@Injectable()
export class FieldService {
  constructor(
    private readonly runs: RunsService,
    private readonly repository: RunsRepository,
    private readonly verdicts: VerdictsRepository,
    private readonly tiles: TileStore,
  ) {}

  async get(user: SignedInUser, runId: string, detectionId: string, radiusArcsec: number): Promise<Field> {
    const run = await this.runs.finished(user, runId);
    const row = await this.verdicts.find(runId, detectionId);
    const [place] = await this.repository.detectionPlaces(run.surveyId, [detectionId]);
    if (!row || !place) throw new AppError('NOT_FOUND', 'That run has no verdict on this detection.');
    const { raDeg, decDeg, velocityKms } = row.item as VerdictItem;
    const centre = {
      raDeg: ((raDeg % 360) + 360) % 360,
      decDeg,
      czKms: velocityKms,
      own: { catalogueId: place.catalogueId, row: place.row },
    };
    const ids = run.inputs.map(({ catalogueId }) => catalogueId);
    const catalogues = await this.repository.cataloguesOfRun(run.surveyId, ids);
    const tables: Field['tables'] = [];
    for (const { catalogueId } of run.inputs) {
      const catalogue = catalogues.find(({ id }) => id === catalogueId);
      if (!catalogue || catalogue.kind === 'groups') continue;
      const { kind, name, beamArcsec, bands } = catalogue.settings as CatalogueSettings;
      const source = { catalogueId, name, kind, beamArcsec: kind === 'hi' ? beamArcsec : null };
      const roles = await this.tiles.readRolesNear(catalogueId, centre.raDeg, decDeg, radiusArcsec);
      tables.push(fieldTable({ ...source, bands: bands.map((band) => band.name) }, roles, centre, radiusArcsec));
    }
    tables.sort((a, b) => Number(b.kind === 'hi') - Number(a.kind === 'hi'));
    return { radiusArcsec, ...cutField(tables, MOST_FIELD_OBJECTS) };
  }
}
