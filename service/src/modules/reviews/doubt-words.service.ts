import type { List, ListQuery } from '@eremite/shared/contracts/list';
import type { DoubtWord, DoubtWordRequest } from '@eremite/shared/contracts/review';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { requireSeen } from '../../common/etag.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { Database } from '../../database/database.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { VerdictsService } from '../runs/verdicts.service.ts';
import { AttachmentsService } from './attachments.service.ts';
import { DetectionAccess, seen } from './detection-access.ts';
import { type DoubtWordRow, DoubtWordsRepository } from './doubt-words.repository.ts';
import { ReviewsRepository } from './reviews.repository.ts';

/** A person clears a doubt by what the catalogues cannot know, or confirms it. The computed grade stays beside the word. */
@Injectable()
export class DoubtWordsService {
  constructor(
    private readonly words: DoubtWordsRepository,
    private readonly reviews: ReviewsRepository,
    private readonly verdicts: VerdictsService,
    private readonly access: DetectionAccess,
    private readonly attachments: AttachmentsService,
    private readonly ledger: LedgerService,
  ) {}

  async list(user: SignedInUser, detectionId: string, query: ListQuery): Promise<List<DoubtWord>> {
    const { detection, role } = await this.access.detection(user, detectionId, 'read');
    const before = await this.access.seesBefore(user, role, detection);
    return pageOf(await this.#toContracts(seen(await this.words.list(detectionId), user, before), user), query);
  }

  /** @throws {AppError} CHANGED_MEANWHILE with another person's word in force that the author has not seen */
  async create(user: SignedInUser, detectionId: string, request: DoubtWordRequest, ifMatch?: string) {
    const { detection } = await this.access.detection(user, detectionId, 'review');
    await this.access.computed(detection.surveyId, request.runId, detectionId);
    const judged = await this.verdicts.doubt(request.runId, detectionId, request.doubt);
    if (!judged) throw new AppError('NOT_FOUND', `That run has no doubt "${request.doubt}" on this detection.`);
    const { attachmentIds, ...word } = request;
    const id = await this.reviews.transaction(async (tx) => {
      await this.reviews.lock(detectionId, tx);
      const before = await this.words.inForce(detectionId, word.doubt, tx);
      if (before) {
        if (ifMatch !== undefined || before.createdById !== user.id)
          requireSeen(ifMatch, before.id, (await this.#toContracts([before], user, tx))[0]);
        await this.words.withdraw(before.id, user.id, `superseded: ${word.note}`, tx);
      }
      const id = await this.words.insert({ ...word, detectionId, grade: judged.grade, createdBy: user.id }, tx);
      await this.attachments.attach(user, detectionId, id, attachmentIds, tx);
      const was = before ? { word: before.word, by: before.by, note: before.note } : null;
      const detail = { detectionId, doubtWordId: id, grade: judged.grade, before: was, after: { word: word.word } };
      const action = word.word === 'cleared' ? 'cleared a doubt' : 'confirmed a doubt';
      const subject = `${detection.name}: ${word.doubt}`;
      await this.ledger.append(
        { surveyId: detection.surveyId, actor: user, action, subject, note: word.note, detail },
        tx,
      );
      return id;
    });
    return (await this.#toContracts([(await this.words.find(id))!], user))[0]!;
  }

  /** Takes a word back: its author or a lead may. */
  async withdraw(user: SignedInUser, id: string, note: string): Promise<DoubtWord> {
    const found = await this.words.find(id);
    if (!found) throw new AppError('NOT_FOUND', 'There is no such word on a doubt.');
    const { role } = await this.access.detection(user, found.detectionId, 'review');
    if (role !== 'lead' && found.createdById !== user.id)
      throw new AppError('NOT_ALLOWED', 'Only its author or a lead may take it back.');
    await this.reviews.transaction(async (tx) => {
      if (!(await this.words.withdraw(id, user.id, note, tx)))
        throw new AppError('CONFLICT', 'It was taken back already.');
      const before = { word: found.word, by: found.by, note: found.note };
      const detail = { detectionId: found.detectionId, doubtWordId: id, before, after: null };
      const entry = { surveyId: found.surveyId, actor: user, action: 'took a word on a doubt back', note, detail };
      await this.ledger.append({ ...entry, subject: `${found.detectionName}: ${found.doubt}` }, tx);
    });
    return (await this.#toContracts([(await this.words.find(id))!], user))[0]!;
  }

  async #toContracts(rows: readonly DoubtWordRow[], user: SignedInUser, db?: Database): Promise<DoubtWord[]> {
    const files = await this.attachments.of(
      rows.map(({ id }) => id),
      db,
    );
    return rows.map(
      ({ surveyId: _, detectionName: __, createdById, ...row }) =>
        ({
          ...row,
          mine: createdById === user.id,
          createdAt: row.createdAt.toISOString(),
          withdrawnAt: row.withdrawnAt?.toISOString() ?? null,
          attachments: files.get(row.id) ?? [],
        }) as DoubtWord,
    );
  }
}
