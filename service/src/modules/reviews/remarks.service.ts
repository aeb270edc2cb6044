import type { List, ListQuery } from '@eremite/shared/contracts/list';
import type { CreateRemarkRequest, Remark } from '@eremite/shared/contracts/remark';
import { Inject, Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { ENV, type Env } from '../../config/env.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { MailService } from '../mail/mail.service.ts';
import { AttachmentsService } from './attachments.service.ts';
import { DetectionAccess, seen } from './detection-access.ts';
import { RemarksRepository } from './remarks.repository.ts';
import { ReviewsRepository } from './reviews.repository.ts';

/** Remarks on a detection and questions to a colleague; those mentioned are told by e-mail. */
@Injectable()
export class RemarksService {
  constructor(
    private readonly remarks: RemarksRepository,
    private readonly reviews: ReviewsRepository,
    private readonly access: DetectionAccess,
    private readonly attachments: AttachmentsService,
    private readonly mail: MailService,
    private readonly ledger: LedgerService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  /** A reviewer who has not spoken yet sees the own ones and those that ask her. */
  async list(user: SignedInUser, detectionId: string, query: ListQuery): Promise<List<Remark>> {
    const { detection, role } = await this.access.detection(user, detectionId, 'read');
    const before = await this.access.seesBefore(user, role, detection);
    const rows = await this.remarks.list(await this.reviews.lineage(detectionId));
    const asked = rows.filter((row) => (row.mentions as string[]).includes(user.id));
    const open = new Set([...seen(rows, user, before), ...asked]);
    return pageOf(
      await this.#describe(
        rows.filter((row) => open.has(row)),
        user,
      ),
      query,
    );
  }

  async create(user: SignedInUser, detectionId: string, request: CreateRemarkRequest): Promise<Remark> {
    const { detection, survey } = await this.access.detection(user, detectionId, 'review');
    const ids = [...new Set(request.mentions)];
    const asked = ids.length > 0 ? await this.remarks.members(survey.teamId, ids) : [];
    if (asked.length !== ids.length)
      throw new AppError('VALIDATION_FAILED', 'Only members of the team can be asked.', [
        { pointer: '/mentions', detail: 'not a member of this team' },
      ]);
    const { text, attachmentIds } = request;
    const id = await this.reviews.transaction(async (tx) => {
      const id = await this.remarks.insert({ detectionId, authorId: user.id, text, mentions: ids }, tx);
      await this.attachments.attach(user, detectionId, id, attachmentIds, tx);
      const action = ids.length > 0 ? 'asked a colleague' : 'remarked';
      const detail = { detectionId, remarkId: id, asked: asked.map(({ name }) => name) };
      await this.ledger.append(
        { surveyId: survey.id, actor: user, action, subject: detection.name, note: text, detail },
        tx,
      );
      return id;
    });
    const address = `${this.env.publicUrl ?? `http://localhost:${this.env.port}`}/surveys/${survey.id}/detections/${detectionId}?tab=history`;
    for (const { email } of asked) {
      await this.mail.send({
        teamId: survey.teamId,
        to: email,
        subject: `${user.name} asks you about ${detection.name}`,
        text: `${user.name} asks you about ${detection.name} in the survey "${survey.name}":\n\n${text}\n\nAnswer here:\n\n${address}\n`,
      });
    }
    const rows = await this.remarks.list([detectionId]);
    return (
      await this.#describe(
        rows.filter((row) => row.id === id),
        user,
      )
    )[0]!;
  }

  async #describe(rows: Awaited<ReturnType<RemarksRepository['list']>>, user: SignedInUser): Promise<Remark[]> {
    const files = await this.attachments.of(rows.map(({ id }) => id));
    const ids = [...new Set(rows.flatMap((row) => row.mentions as string[]))];
    const names = new Map((ids.length > 0 ? await this.remarks.names(ids) : []).map((row) => [row.userId, row.name]));
    return rows.map(({ createdById, createdAt, mentions, ...row }) => ({
      ...row,
      mine: createdById === user.id,
      mentions: (mentions as string[]).map((userId) => ({ userId, name: names.get(userId) ?? 'someone' })),
      createdAt: createdAt.toISOString(),
      attachments: files.get(row.id) ?? [],
    }));
  }
}
