import type { List, ListQuery } from '@eremite/shared/contracts/list';
import type { CreateOverrideRequest, Override } from '@eremite/shared/contracts/review';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { CataloguesService } from '../catalogues/catalogues.service.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { ReviewsRepository } from './reviews.repository.ts';
import { ReviewsService } from './reviews.service.ts';

type Row = NonNullable<Awaited<ReturnType<ReviewsRepository['override']>>>;
const toContract = ({ surveyId: _, detectionName: __, createdById: ___, ...row }: Row): Override =>
  ({ ...row, createdAt: row.createdAt.toISOString(), withdrawnAt: row.withdrawnAt?.toISOString() ?? null }) as Override;

/**
 * A person accepts or rejects a catalogue row as a detection's counterpart. The word is bound to the two sources, not to
 * a run: the next run takes it up, and earlier runs stay as they were.
 */
@Injectable()
export class OverridesService {
  constructor(
    private readonly overrides: ReviewsRepository,
    private readonly reviews: ReviewsService,
    private readonly catalogues: CataloguesService,
    private readonly ledger: LedgerService,
  ) {}

  async list(user: SignedInUser, detectionId: string, query: ListQuery): Promise<List<Override>> {
    await this.reviews.detection(user, detectionId, 'read');
    return pageOf((await this.overrides.overridesOf(detectionId)).map(toContract), query);
  }

  async create(user: SignedInUser, detectionId: string, request: CreateOverrideRequest): Promise<Override> {
    const { detection } = await this.reviews.detection(user, detectionId, 'review');
    const catalogue = await this.overrides.catalogue(request.catalogueId);
    if (!catalogue || catalogue.surveyId !== detection.surveyId || catalogue.state !== 'published') {
      throw new AppError('NOT_FOUND', 'There is no such catalogue in this survey.');
    }
    const objectName = await this.catalogues.rowName(request.catalogueId, request.rowId);
    if (objectName === undefined) throw new AppError('NOT_FOUND', `${catalogue.name} has no row ${request.rowId}.`);
    const id = await this.overrides.transaction(async (tx) => {
      const { catalogueId, rowId: row, action, note } = request;
      await this.overrides.withdrawPair(detectionId, catalogueId, row, user.id, `superseded: ${note}`, tx);
      const id = await this.overrides.insertOverride(
        { detectionId, catalogueId, row, objectName, action, note, createdBy: user.id },
        tx,
      );
      const verb = action === 'accept' ? 'accepted a counterpart' : 'rejected a counterpart';
      const detail = { overrideId: id, catalogueId, catalogue: catalogue.name, row, objectName };
      await this.ledger.append(
        {
          surveyId: detection.surveyId,
          actor: user,
          action: verb,
          subject: `${detection.name}: ${objectName}`,
          note,
          detail,
        },
        tx,
      );
      return id;
    });
    return toContract((await this.overrides.override(id))!);
  }

  /** Takes an override back: its author or a lead may. */
  async withdraw(user: SignedInUser, id: string, note: string): Promise<Override> {
    const found = await this.overrides.override(id);
    if (!found) throw new AppError('NOT_FOUND', 'There is no such override.');
    const { role } = await this.reviews.detection(user, found.detectionId, 'review');
    if (role !== 'lead' && found.createdById !== user.id)
      throw new AppError('NOT_ALLOWED', 'Only its author or a lead may take an override back.');
    await this.overrides.transaction(async (tx) => {
      if (!(await this.overrides.withdraw(id, user.id, note, tx)))
        throw new AppError('CONFLICT', 'It was taken back already.');
      const entry = {
        surveyId: found.surveyId,
        actor: user,
        action: 'took an override back',
        subject: `${found.detectionName}: ${found.objectName}`,
      };
      await this.ledger.append({ ...entry, note, detail: { overrideId: id } }, tx);
    });
    return toContract((await this.overrides.override(id))!);
  }
}
