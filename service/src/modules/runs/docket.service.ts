import type { List } from '@eremite/shared/contracts/list';
import type { docketItem, docketQuery } from '@eremite/shared/contracts/review';
import { Injectable } from '@nestjs/common';
import type { z } from 'zod';
import { AccessService } from '../../common/access.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { RunsService } from './runs.service.ts';
import { VerdictsRepository } from './verdicts.repository.ts';
import { VerdictsService } from './verdicts.service.ts';

type Item = z.output<typeof docketItem>;

/** The queue of detections to review, on the latest finished run. */
@Injectable()
export class DocketService {
  constructor(
    private readonly runs: RunsService,
    private readonly verdicts: VerdictsService,
    private readonly repository: VerdictsRepository,
    private readonly access: AccessService,
  ) {}

  async list(user: SignedInUser, surveyId: string, query: z.output<typeof docketQuery>): Promise<List<Item>> {
    await this.access.survey(user, surveyId, 'read');
    const run = await this.runs.latestDone(surveyId);
    if (!run) return { items: [], nextCursor: null, total: 0 };
    const filter = {
      ...(query.assigned === 'me' && { assignedTo: user.id }),
      ...(query.state === 'open' && { notReviewedBy: user.id }),
      ...(query.state === 'done' && { reviewedBy: user.id }),
    };
    const page = await this.verdicts.page(run.id, filter, { ...query, sort: query.sort ?? 'docket' });
    const said = await this.repository.said(page.items.map((item) => item.detectionId));
    const items = page.items.map((item) => ({
      ...item,
      assignedTo: said.assigned.filter((entry) => entry.detectionId === item.detectionId).map((entry) => entry.name),
      reviewedByMe: said.reviews.some(
        (entry) => entry.detectionId === item.detectionId && entry.runId === run.id && entry.reviewerId === user.id,
      ),
    }));
    return { ...page, items };
  }
}
