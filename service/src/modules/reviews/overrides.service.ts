import type { List, ListQuery } from '@eremite/shared/contracts/list';
import type { CreateOverrideRequest, Override } from '@eremite/shared/contracts/review';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { requireSeen } from '../../common/etag.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { TileStore } from '../../tiles/tile-store.ts';
import { CataloguesService } from '../catalogues/catalogues.service.ts';
import type { Database } from '../../database/database.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { AttachmentsService } from './attachments.service.ts';
import { DetectionAccess, seen } from './detection-access.ts';
import { type OverrideRow, OverridesRepository } from './overrides.repository.ts';
import { ReviewsRepository } from './reviews.repository.ts';

/**
 * A person accepts or rejects a catalogue row as a detection's counterpart. The word is bound to the two sources, not to
 * a run: the next run takes it up, and earlier runs stay as they were.
 */
@Injectable()
export class OverridesService {
  constructor(
    private readonly overrides: OverridesRepository,
    private readonly reviews: ReviewsRepository,
    private readonly access: DetectionAccess,
    private readonly catalogues: CataloguesService,
    private readonly tiles: TileStore,
    private readonly attachments: AttachmentsService,
    private readonly ledger: LedgerService,
  ) {}

  async list(user: SignedInUser, detectionId: string, query: ListQuery): Promise<List<Override>> {
    const { detection, role } = await this.access.detection(user, detectionId, 'read');
    const before = await this.access.seesBefore(user, role, detection);
    const rows = seen(await this.overrides.list(detectionId), user, before);
    return pageOf(await this.#toContracts(rows, user), query);
  }

  /**
   * Accepts or rejects. Another person's word on the same object is not overwritten unseen.
   *
   * @param ifMatch names the override its author saw, where there was one
   * @throws {AppError} CHANGED_MEANWHILE with the override in force
   */
  async create(
    user: SignedInUser,
    detectionId: string,
    request: CreateOverrideRequest,
    ifMatch?: string,
  ): Promise<Override> {
    const { detection } = await this.access.detection(user, detectionId, 'review');
    const catalogue = await this.overrides.catalogue(request.catalogueId);
    if (!catalogue || catalogue.surveyId !== detection.surveyId || catalogue.state !== 'published') {
      throw new AppError('NOT_FOUND', 'There is no such catalogue in use in this survey any more.');
    }
    const objectName = await this.catalogues.rowName(request.catalogueId, request.rowId);
    if (objectName === undefined) throw new AppError('NOT_FOUND', `${catalogue.name} has no row ${request.rowId}.`);
    const { catalogueId, rowId: row, action, note, attachmentIds } = request;
    const place = await this.tiles.readRow(catalogueId, row);
    const id = await this.reviews.transaction(async (tx) => {
      await this.reviews.lock(detectionId, tx);
      const pair = { detectionId, catalogueId, row };
      const before = await this.overrides.inForce(pair, tx);
      if (before && (ifMatch !== undefined || before.createdById !== user.id)) {
        requireSeen(ifMatch, before.id, (await this.#toContracts([before], user, tx))[0]);
      }
      await this.overrides.withdrawPair(pair, user.id, `superseded: ${note}`, tx);
      const where = { raDeg: place?.raDeg ?? null, decDeg: place?.decDeg ?? null };
      const id = await this.overrides.insert({ ...pair, objectName, ...where, action, note, createdBy: user.id }, tx);
      await this.attachments.attach(user, detectionId, id, attachmentIds, tx);
      const verb = action === 'accept' ? 'accepted a counterpart' : 'rejected a counterpart';
      const was = before ? { action: before.action, by: before.by, note: before.note } : null;
      const object = { overrideId: id, catalogueId, catalogue: catalogue.name, row, objectName };
      const detail = { detectionId, ...object, before: was, after: { action } };
      const subject = `${detection.name}: ${objectName}`;
      await this.ledger.append({ surveyId: detection.surveyId, actor: user, action: verb, subject, note, detail }, tx);
      return id;
    });
    return this.#one(id, user);
  }

  /** Takes an override back: its author or a lead may. */
  async withdraw(user: SignedInUser, id: string, note: string): Promise<Override> {
    const found = await this.overrides.find(id);
    if (!found) throw new AppError('NOT_FOUND', 'There is no such override.');
    const { role } = await this.access.detection(user, found.detectionId, 'review');
    if (role !== 'lead' && found.createdById !== user.id)
      throw new AppError('NOT_ALLOWED', 'Only its author or a lead may take an override back.');
    await this.reviews.transaction(async (tx) => {
      if (!(await this.overrides.withdraw(id, user.id, note, tx)))
        throw new AppError('CONFLICT', 'It was taken back already.');
      const entry = {
        surveyId: found.surveyId,
        actor: user,
        action: 'took an override back',
        subject: `${found.detectionName}: ${found.objectName}`,
      };
      const before = { action: found.action, by: found.by, note: found.note };
      const detail = { detectionId: found.detectionId, overrideId: id, before, after: null };
      await this.ledger.append({ ...entry, note, detail }, tx);
    });
    return this.#one(id, user);
  }

  async #one(id: string, user: SignedInUser): Promise<Override> {
    return (await this.#toContracts([(await this.overrides.find(id))!], user))[0]!;
  }

  async #toContracts(rows: readonly OverrideRow[], user: SignedInUser, db?: Database): Promise<Override[]> {
    const files = await this.attachments.of(
      rows.map(({ id }) => id),
      db,
    );
    return rows.map(
      ({ surveyId: _, detectionName: __, createdById, carriedFrom, ...row }) =>
        ({
          ...row,
          mine: createdById === user.id,
          carried: carriedFrom !== null,
          createdAt: row.createdAt.toISOString(),
          withdrawnAt: row.withdrawnAt?.toISOString() ?? null,
          attachments: files.get(row.id) ?? [],
        }) as Override,
    );
  }
}
