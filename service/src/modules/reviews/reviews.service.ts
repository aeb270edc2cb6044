import type { List, ListQuery } from '@eremite/shared/contracts/list';
import type { CreateReviewRequest, Review, ReviewerProgress, SettleRequest } from '@eremite/shared/contracts/review';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import { AccessService, type Need } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { VerdictsService } from '../runs/verdicts.service.ts';
import { ReviewsRepository } from './reviews.repository.ts';

/** What people say of a verdict: reviews of reviewers, the lead's settled word. */
@Injectable()
export class ReviewsService {
  constructor(
    private readonly reviews: ReviewsRepository,
    private readonly verdicts: VerdictsService,
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
  ) {}

  /** The detection, if the account may do what it needs with its survey. */
  async detection(user: SignedInUser, id: string, need: Need) {
    const detection = await this.reviews.detection(id);
    if (!detection) throw new AppError('NOT_FOUND', 'There is no such detection.');
    const { role, survey } = await this.access.survey(user, detection.surveyId, need);
    return { detection, role, survey };
  }

  /** Reviews that the account may see: a reviewer sees the others' only after giving one (blind to each other until then). */
  async list(user: SignedInUser, detectionId: string, query: ListQuery): Promise<List<Review>> {
    const { role } = await this.detection(user, detectionId, 'read');
    const rows = await this.reviews.list(detectionId);
    return pageOf(await this.#visible(rows, user, role), query);
  }

  async #visible(
    rows: Awaited<ReturnType<ReviewsRepository['list']>>,
    user: SignedInUser,
    role: TeamRole,
  ): Promise<Review[]> {
    const mine = new Set(rows.filter((row) => row.reviewerId === user.id).map((row) => row.runId));
    const open = rows.filter((row) => role !== 'reviewer' || mine.has(row.runId));
    return Promise.all(
      open.map(async ({ reviewerId, createdAt, ...row }) => {
        const computed = await this.verdicts.computed(row.runId, row.detectionId);
        return {
          ...row,
          mine: reviewerId === user.id,
          agrees: computed?.starlight === row.starlight && computed.surroundings === row.surroundings,
          createdAt: createdAt.toISOString(),
        } as Review;
      }),
    );
  }

  async create(user: SignedInUser, detectionId: string, request: CreateReviewRequest): Promise<Review> {
    const { detection, role } = await this.detection(user, detectionId, 'review');
    const computed = await this.#computed(detection.surveyId, request.runId, detectionId);
    const agrees = computed.starlight === request.starlight && computed.surroundings === request.surroundings;
    if (!agrees && request.note === '') {
      const detail = `The computed verdict is ${computed.starlight}, ${computed.surroundings}; say in a note why you depart from it.`;
      throw new AppError('VALIDATION_FAILED', detail, [
        { pointer: '/note', detail: 'a note is needed to depart from the computed verdict' },
      ]);
    }
    const id = await this.reviews.transaction(async (tx) => {
      const id = await this.reviews.insert({ detectionId, reviewerId: user.id, ...request }, tx);
      const action = agrees ? 'agreed with a verdict' : 'departed from a verdict';
      const { starlight, surroundings, runId } = request;
      const detail = { reviewId: id, runId, starlight, surroundings, computed };
      await this.ledger.append(
        { surveyId: detection.surveyId, actor: user, action, subject: detection.name, note: request.note, detail },
        tx,
      );
      return id;
    });
    return (await this.#visible(await this.reviews.list(detectionId), user, role)).find((review) => review.id === id)!;
  }

  async settle(user: SignedInUser, detectionId: string, request: SettleRequest): Promise<void> {
    const { detection } = await this.detection(user, detectionId, 'lead');
    const computed = await this.#computed(detection.surveyId, request.runId, detectionId);
    await this.reviews.transaction(async (tx) => {
      await this.reviews.settle({ detectionId, settledBy: user.id, ...request }, tx);
      const detail = {
        runId: request.runId,
        starlight: request.starlight,
        surroundings: request.surroundings,
        computed,
      };
      const entry = { surveyId: detection.surveyId, actor: user, action: 'settled a verdict', subject: detection.name };
      await this.ledger.append({ ...entry, note: request.note, detail }, tx);
    });
  }

  async #computed(surveyId: string, runId: string, detectionId: string) {
    const computed = await this.verdicts.computed(runId, detectionId, surveyId);
    if (!computed) throw new AppError('NOT_FOUND', 'That run has no verdict on this detection.');
    return computed;
  }

  /** How far each reviewer is; says nothing of what was decided. */
  async progress(user: SignedInUser, surveyId: string, query: ListQuery): Promise<List<ReviewerProgress>> {
    await this.access.survey(user, surveyId, 'lead');
    return pageOf(await this.reviews.progress(surveyId), query);
  }

  /** Puts detections on a reviewer's docket, or takes them off. */
  async assign(
    user: SignedInUser,
    surveyId: string,
    request: { detectionIds: string[]; userId: string },
    on: boolean,
  ): Promise<void> {
    const { survey } = await this.access.survey(user, surveyId, 'lead');
    const member = await this.reviews.member(survey.teamId, request.userId);
    if (!member || member.role === 'observer') {
      throw new AppError('VALIDATION_FAILED', 'Only a lead or a reviewer of the team can be given detections.', [
        { pointer: '/userId', detail: 'not a reviewer of this team' },
      ]);
    }
    const known = await this.reviews.detectionsOf(surveyId, request.detectionIds);
    if (known.length !== new Set(request.detectionIds).size)
      throw new AppError('NOT_FOUND', 'Some of these detections are not of this survey.');
    await this.reviews.transaction(async (tx) => {
      await this.reviews[on ? 'assign' : 'unassign'](request.detectionIds, request.userId, tx);
      const action = on ? 'assigned detections' : 'took detections back';
      await this.ledger.append(
        { surveyId, actor: user, action, subject: `${known.length} for ${member.name}`, detail: { ...request } },
        tx,
      );
    });
  }
}
