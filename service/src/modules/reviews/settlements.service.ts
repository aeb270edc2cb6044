import type { Moved } from '@eremite/shared/contracts/evidence-moved';
import type { Settlement, SettleRequest } from '@eremite/shared/contracts/review';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { requireSeen } from '../../common/etag.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { Database } from '../../database/database.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { AttachmentsService } from './attachments.service.ts';
import { CarryOverService } from './carry-over.service.ts';
import { DetectionAccess } from './detection-access.ts';
import { ReviewsRepository } from './reviews.repository.ts';

type Row = NonNullable<Awaited<ReturnType<ReviewsRepository['settlement']>>>;

/** The lead's word, which ends what reviewers may differ in. */
@Injectable()
export class SettlementsService {
  constructor(
    private readonly reviews: ReviewsRepository,
    private readonly access: DetectionAccess,
    private readonly carrying: CarryOverService,
    private readonly attachments: AttachmentsService,
    private readonly ledger: LedgerService,
  ) {}

  /** What is settled, or nothing. */
  async get(user: SignedInUser, detectionId: string): Promise<{ settlement: Settlement | null }> {
    await this.access.detection(user, detectionId, 'read');
    const row = await this.reviews.settlement(detectionId);
    return { settlement: row ? await this.#toContract(row, user) : null };
  }

  /**
   * Settles a detection. One that another lead settled is not overwritten unseen.
   *
   * @param ifMatch names the settlement its author saw, where there was one
   * @throws {AppError} CHANGED_MEANWHILE with the settlement in force
   */
  async settle(user: SignedInUser, detectionId: string, request: SettleRequest, ifMatch?: string): Promise<void> {
    const { detection } = await this.access.detection(user, detectionId, 'lead');
    const { attachmentIds, ...word } = request;
    const computed = await this.access.computed(detection.surveyId, word.runId, detectionId);
    await this.reviews.transaction(async (tx) => {
      await this.reviews.lock(detectionId, tx);
      const before = await this.reviews.settlement(detectionId, tx);
      if (before && (ifMatch !== undefined || before.settledBy !== user.id)) {
        requireSeen(ifMatch, before.id, await this.#toContract(before, user, tx));
      }
      const id = await this.reviews.settle({ detectionId, settledBy: user.id, ...word }, tx);
      await this.attachments.attach(user, detectionId, id, attachmentIds, tx);
      const { note, ...after } = word;
      const detail = {
        detectionId,
        settlementId: id,
        ...after,
        computed,
        before: before ? wordsOf(before) : null,
        after,
      };
      const entry = { surveyId: detection.surveyId, actor: user, action: 'settled a verdict', subject: detection.name };
      await this.ledger.append({ ...entry, note, detail }, tx);
      await this.carrying.catchUpSettlement(detection.surveyId, id, tx);
    });
  }

  /** Opens a settled detection again. */
  async reopen(user: SignedInUser, detectionId: string, note: string): Promise<void> {
    const { detection } = await this.access.detection(user, detectionId, 'lead');
    await this.reviews.transaction(async (tx) => {
      const before = await this.reviews.settlement(detectionId, tx);
      if (!before) throw new AppError('CONFLICT', 'It is not settled.');
      await this.reviews.unsettle(detectionId, tx);
      const entry = { surveyId: detection.surveyId, actor: user, action: 'opened a settled verdict again' };
      const detail = { detectionId, settlementId: before.id, before: wordsOf(before), after: null };
      await this.ledger.append({ ...entry, subject: detection.name, note, detail }, tx);
    });
  }

  async #toContract({ settledBy, createdAt, moved, carriedFrom: _, ...row }: Row, user: SignedInUser, db?: Database) {
    const files = await this.attachments.of([row.id], db);
    return {
      ...row,
      mine: settledBy === user.id,
      createdAt: createdAt.toISOString(),
      moved: (moved as Moved[] | null) ?? [],
      attachments: files.get(row.id) ?? [],
    } as Settlement;
  }
}

const wordsOf = ({ starlight, surroundings, outcome, note, by }: Row) => ({
  starlight,
  surroundings,
  outcome,
  note,
  by,
});
