import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import type { WhatIf } from '@eremite/shared/contracts/what-if';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { Learnt } from '../../scoring/engine.ts';
import { PreviewTables } from './preview-tables.ts';
import { PreviewThread } from './preview-thread.ts';
import { engineDecisions, type StoredDecisions } from './run-inputs.ts';
import { RunsRepository } from './runs.repository.ts';
import { RunsService } from './runs.service.ts';
import { VerdictsRepository } from './verdicts.repository.ts';

/** Distances are supposed from a third of the one in use to three times it. */
const SPAN = 3;
/** And where there is none, Mpc. */
const ANYWHERE = { fromMpc: 2, toMpc: 200 };

/** What one verdict of a run would be at other distances, by the run's own criteria, tables and lessons. */
@Injectable()
export class WhatIfService {
  constructor(
    private readonly runs: RunsService,
    private readonly repository: RunsRepository,
    private readonly verdicts: VerdictsRepository,
    private readonly tables: PreviewTables,
    private readonly thread: PreviewThread,
  ) {}

  async distances(user: SignedInUser, runId: string, detectionId: string): Promise<WhatIf> {
    const { surveyId, inputs } = await this.runs.finished(user, runId);
    const run = (await this.repository.find(runId))!;
    const found = await this.verdicts.find(runId, detectionId);
    const [place] = await this.repository.detectionPlaces(surveyId, [detectionId]);
    if (!found || !place) throw new AppError('NOT_FOUND', 'That run has no verdict on this detection.');
    const { distance } = found.detail as Pick<VerdictDetail, 'distance'>;
    const nominal = distance.angularMpc;
    const range = nominal === null ? ANYWHERE : { fromMpc: nominal / SPAN, toMpc: nominal * SPAN };
    const fraction = nominal !== null && distance.errorMpc !== null ? distance.errorMpc / nominal : null;
    const ids = inputs.map(({ catalogueId }) => catalogueId);
    const catalogues = (await this.repository.cataloguesOfRun(surveyId, ids)).sort(
      (a, b) => ids.indexOf(a.id) - ids.indexOf(b.id),
    );
    const settings = run.criteriaSettings as CriteriaSettings;
    const about = {
      ...engineDecisions(run.decisions as StoredDecisions),
      // Draws and shifted positions take many times as long as a verdict.
      criteria: {
        ...settings,
        robustness: { ...settings.robustness, draws: 0 },
        control: { ...settings.control, offsetsPerSource: 0 },
      },
    };
    // Of a large table as much is read as the nearest distance needs: neighbours are then spread widest over the sky.
    const { catalogueId, row } = place;
    const nearest = { catalogueId, row, distanceMpc: range.fromMpc, errorMpc: null, source: 'supposed' };
    const widest = { ...about, decisions: { ...about.decisions, distances: [nearest] } };
    const { tables, notes } = await this.tables.read(catalogues, [place], widest);
    const task = { input: { ...about, tables }, learnt: run.learnt as Learnt | null };
    const answer = await this.thread.suppose({
      ...task,
      suppose: { catalogueId, row, distances: { ...range, fraction } },
    });
    return { ...answer, distanceFraction: fraction, notes };
  }
}
