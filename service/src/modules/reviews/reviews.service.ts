import type { Attachment } from '@eremite/shared/contracts/attachment';
import type { Moved } from '@eremite/shared/contracts/evidence-moved';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import type { CreateReviewRequest, Review } from '@eremite/shared/contracts/review';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { VerdictsService } from '../runs/verdicts.service.ts';
import { AttachmentsService } from './attachments.service.ts';
import { CarryOverService } from './carry-over.service.ts';
import { DetectionAccess } from './detection-access.ts';
import { type ReviewRow, ReviewsRepository } from './reviews.repository.ts';

/** What reviewers say of a verdict. */
@Injectable()
export class ReviewsService {
  constructor(
    private readonly reviews: ReviewsRepository,
    private readonly verdicts: VerdictsService,
    private readonly access: DetectionAccess,
    private readonly carrying: CarryOverService,
    private readonly attachments: AttachmentsService,
    private readonly ledger: LedgerService,
  ) {}

  /** Reviews that the account may see: a reviewer sees the others' only after giving one (blind to each other until then). */
  async list(user: SignedInUser, detectionId: string, query: ListQuery): Promise<List<Review>> {
    const { detection, role } = await this.access.detection(user, detectionId, 'read');
    const rows = await this.reviews.list(await this.reviews.lineage(detectionId));
    return pageOf(await this.#describe(visible(rows, user, role), user, detection), query);
  }

  async create(user: SignedInUser, detectionId: string, request: CreateReviewRequest): Promise<Review> {
    const { detection, role } = await this.access.detection(user, detectionId, 'review');
    const { attachmentIds, ...word } = request;
    const computed = await this.access.computed(detection.surveyId, word.runId, detectionId);
    const agrees = word.outcome === 'verdict' && sameWords(computed, word);
    if (!agrees && word.note === '') throw needsNote(word.outcome, computed);
    const lineage = await this.reviews.lineage(detectionId);
    const id = await this.reviews.transaction(async (tx) => {
      await this.reviews.lock(detectionId, tx);
      const rows = await this.reviews.list(lineage, tx);
      const blind = visible(rows, user, role).every((row) => row.reviewerId === user.id);
      const before = rows.find((row) => row.reviewerId === user.id && row.runId === word.runId);
      const id = await this.reviews.insert({ detectionId, reviewerId: user.id, blind, ...word }, tx);
      await this.attachments.attach(user, detectionId, id, attachmentIds, tx);
      const { starlight, surroundings, outcome, runId } = word;
      const detail = {
        detectionId,
        reviewId: id,
        runId,
        starlight,
        surroundings,
        outcome,
        computed,
        blind,
        before: before ? wordsOf(before) : null,
        after: wordsOf(word),
        ...(attachmentIds.length > 0 && { attachmentIds }),
      };
      const action = agrees ? 'agreed with a verdict' : 'departed from a verdict';
      await this.ledger.append(
        { surveyId: detection.surveyId, actor: user, action, subject: detection.name, note: word.note, detail },
        tx,
      );
      await this.carrying.catchUp(detection.surveyId, id, tx);
      return id;
    });
    const rows = visible(await this.reviews.list(lineage), user, role);
    return (await this.#describe(rows, user, detection)).find((review) => review.id === id)!;
  }

  /** Takes one's own word back; what it had replaced on the run holds again. */
  async withdraw(user: SignedInUser, id: string): Promise<void> {
    const row = await this.reviews.find(id);
    if (!row) throw new AppError('NOT_FOUND', 'There is no such review.');
    await this.access.detection(user, row.detectionId, 'review');
    if (row.reviewerId !== user.id) throw new AppError('NOT_ALLOWED', 'Only its author may take a review back.');
    await this.reviews.transaction(async (tx) => {
      if (!(await this.reviews.withdraw(row, tx))) throw new AppError('CONFLICT', 'It was taken back already.');
      const { surveyId, detectionId, runId } = row;
      const detail = { detectionId, reviewId: id, runId, before: wordsOf(row), after: null };
      await this.ledger.append({ surveyId, actor: user, action: 'took a review back', subject: row.name, detail }, tx);
    });
  }

  async #describe(rows: ReviewRow[], user: SignedInUser, detection: { id: string; surveyId: string }) {
    const { given, carried } = apart(rows, detection.id);
    const files = await this.attachments.of(given.map(({ id }) => id));
    const latest = await this.verdicts.latestRun(detection.surveyId);
    const returned = latest ? await this.reviews.returnsOf(latest.id, [detection.id]) : [];
    return Promise.all(
      given.map(async ({ reviewerId, createdAt, carriedFrom, ...row }): Promise<Review> => {
        const computed = await this.verdicts.computed(row.runId, row.detectionId);
        const root = carriedFrom ?? row.id;
        const to = carried.filter((entry) => entry.carriedFrom === root).map((entry) => entry.runNumber);
        const back = returned.find((entry) => entry.reviewId === root);
        return {
          ...row,
          mine: reviewerId === user.id,
          agrees: row.outcome === 'verdict' && computed !== undefined && sameWords(computed, row),
          createdAt: createdAt.toISOString(),
          carriedTo: to.length > 0 ? Math.max(...to) : null,
          returned: back && latest ? { runNumber: latest.number, moved: back.moved as Moved[] } : null,
          attachments: files.get(row.id) ?? ([] as Attachment[]),
        } as Review;
      }),
    );
  }
}

/** Of the rows in force, those that an account may see; carried rows count as having spoken, for they are one's own words. */
function visible(rows: readonly ReviewRow[], user: SignedInUser, role: string): ReviewRow[] {
  if (role !== 'reviewer') return [...rows];
  const spokenOn = new Set(rows.filter((row) => row.reviewerId === user.id).map((row) => row.runId));
  const roots = new Set(rows.filter((row) => spokenOn.has(row.runId)).map((row) => row.carriedFrom ?? row.id));
  return rows.filter((row) => spokenOn.has(row.runId) || roots.has(row.id));
}

/** The words that were given, and the rows that only carry one of them on. */
function apart(rows: readonly ReviewRow[], detectionId: string): { given: ReviewRow[]; carried: ReviewRow[] } {
  const ids = new Set(rows.map(({ id }) => id));
  const isCopy = (row: ReviewRow) => row.carriedFrom !== null && ids.has(row.carriedFrom);
  return {
    given: rows.filter((row) => !isCopy(row) && (row.carriedFrom === null || row.detectionId === detectionId)),
    carried: rows.filter((row) => row.carriedFrom !== null),
  };
}

const sameWords = (a: { starlight: string; surroundings: string }, b: { starlight: string; surroundings: string }) =>
  a.starlight === b.starlight && a.surroundings === b.surroundings;
const wordsOf = (row: { starlight: string; surroundings: string; outcome: string; note: string }) => ({
  starlight: row.starlight,
  surroundings: row.surroundings,
  outcome: row.outcome,
  note: row.note,
});

function needsNote(outcome: string, computed: { starlight: string; surroundings: string }): AppError {
  const detail =
    outcome === 'verdict'
      ? `The computed verdict is ${computed.starlight}, ${computed.surroundings}; say in a note why you depart from it.`
      : `Say in a note why your answer is "${outcome}".`;
  return new AppError('VALIDATION_FAILED', detail, [
    { pointer: '/note', detail: 'a note is needed to depart from the computed verdict' },
  ]);
}
