import type { SurveyOverview } from '@eremite/shared/contracts/survey';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { SurveysService } from '../surveys/surveys.service.ts';
import { RunsService } from './runs.service.ts';
import { VerdictsRepository } from './verdicts.repository.ts';

/** A survey at a glance, by its latest finished run. */
@Injectable()
export class OverviewService {
  constructor(
    private readonly surveys: SurveysService,
    private readonly runs: RunsService,
    private readonly verdicts: VerdictsRepository,
    private readonly access: AccessService,
  ) {}

  async get(user: SignedInUser, surveyId: string): Promise<SurveyOverview> {
    const { role } = await this.access.survey(user, surveyId, 'read');
    const run = await this.runs.latestDone(surveyId);
    const marks = await this.verdicts.marks(surveyId, run?.id ?? null);
    const awaiting =
      role === 'observer' || !run
        ? 0
        : await this.verdicts.count(run.id, { assignedTo: user.id, notReviewedBy: user.id });
    return {
      survey: await this.surveys.get(user, surveyId),
      counts: { starlight: run?.counts?.starlight ?? {}, surroundings: run?.counts?.surroundings ?? {} },
      marks: marks as SurveyOverview['marks'],
      reviewed: run ? await this.verdicts.count(run.id, { reviewed: 'yes' }) : 0,
      awaitingMe: awaiting,
    };
  }
}
