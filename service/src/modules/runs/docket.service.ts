import type { DocketItem, DocketQuery } from '@eremite/shared/contracts/docket';
import type { Moved } from '@eremite/shared/contracts/evidence-moved';
import type { List } from '@eremite/shared/contracts/list';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { RunsService } from './runs.service.ts';
import { EVERYONE, type VerdictFilter } from './verdict-filter.repository.ts';
import { VerdictsRepository } from './verdicts.repository.ts';
import { VerdictsService } from './verdicts.service.ts';

/** The queue of detections to review, on the latest finished run. */
@Injectable()
export class DocketService {
  constructor(
    private readonly runs: RunsService,
    private readonly verdicts: VerdictsService,
    private readonly repository: VerdictsRepository,
    private readonly access: AccessService,
  ) {}

  async list(user: SignedInUser, surveyId: string, query: DocketQuery): Promise<List<DocketItem>> {
    const { role } = await this.access.survey(user, surveyId, 'read');
    const run = await this.runs.latestDone(surveyId);
    if (!run) return { items: [], nextCursor: null, total: 0 };
    const sees = role === 'reviewer' ? user.id : EVERYONE;
    const page = await this.verdicts.page(run.id, filterOf(query, user.id, sees), {
      ...query,
      sort: query.sort ?? 'docket',
    });
    const ids = page.items.map((item) => item.detectionId);
    const said = await this.repository.said(ids);
    const facts = await this.repository.docketFacts(run.id, ids, { userId: user.id, sees });
    const factsOf = new Map(facts.map((fact) => [fact.detectionId, fact]));
    const assignedTo = new Map<string, string[]>();
    for (const { detectionId, name } of said.assigned)
      assignedTo.set(detectionId, [...(assignedTo.get(detectionId) ?? []), name]);
    const mine = new Set(
      said.reviews
        .filter((entry) => entry.runId === run.id && entry.reviewerId === user.id)
        .map((entry) => entry.detectionId),
    );
    const items = page.items.map((item): DocketItem => {
      const fact = factsOf.get(item.detectionId);
      return {
        ...item,
        assignedTo: assignedTo.get(item.detectionId) ?? [],
        reviewedByMe: mine.has(item.detectionId),
        disagreement: fact?.seen ? fact.disagreement : null,
        moved: (fact?.moved ?? []) as Moved[],
      };
    });
    return { ...page, items };
  }
}

function filterOf(query: DocketQuery, userId: string, sees: string): VerdictFilter {
  const { assigned, state, starlight, surroundings, doubtGrade, search, settled } = query;
  const assignee = assigned === 'me' ? userId : assigned;
  return {
    viewer: sees,
    starlight,
    surroundings,
    doubtGrade,
    search,
    settled,
    ...(assigned === 'nobody' && { unassigned: true }),
    ...(assigned !== 'nobody' && assigned !== 'all' && { assignedTo: assignee }),
    ...(state === 'open' && { notReviewedBy: userId }),
    ...(state === 'done' && { reviewedBy: userId }),
    ...(query.returned && { returnedTo: sees }),
    ...(query.disagreement && { disagreementSeenBy: sees }),
    ...(query.outcome && { outcome: { is: query.outcome, seenBy: sees } }),
  };
}
