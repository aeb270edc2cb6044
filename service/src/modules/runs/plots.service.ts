import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { SurveyPlots } from '@eremite/shared/contracts/plot';
import { Injectable } from '@nestjs/common';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { type TableAnswer, tableOf } from '../../edition/columns/table-column.ts';
import { CriteriaService } from '../criteria/criteria.service.ts';
import { PLOT_COLUMNS } from './plot-columns.ts';
import { plotPoint, type PlottedVerdict } from './plot-point.ts';
import { RunsService } from './runs.service.ts';
import { VerdictsRepository } from './verdicts.repository.ts';

/** The numbers of a run as they are plotted. */
@Injectable()
export class PlotsService {
  constructor(
    private readonly runs: RunsService,
    private readonly criteria: CriteriaService,
    private readonly verdicts: VerdictsRepository,
  ) {}

  async get(user: SignedInUser, runId: string): Promise<SurveyPlots> {
    const run = await this.runs.finished(user, runId);
    const { settings } = await this.criteria.get(user, run.criteriaId);
    const { massToLightR } = (settings as CriteriaSettings).counterpart;
    const rows = (await this.verdicts.plotted(runId)) as PlottedVerdict[];
    return { runNumber: run.number, massToLightR, points: rows.map((row) => plotPoint(row, massToLightR)) };
  }

  async table(user: SignedInUser, runId: string): Promise<{ answer: TableAnswer; name: string }> {
    const { runNumber, massToLightR, points } = await this.get(user, runId);
    const description = `Numbers behind the plots of run ${runNumber}; stars from light at M/L_r = ${massToLightR}`;
    return { answer: tableOf(PLOT_COLUMNS, points, description), name: `run-${runNumber}-plots` };
  }
}
