import type { Detection, UpdateDetectionRequest } from '@eremite/shared/contracts/detection';
import { detectionsQuery } from '@eremite/shared/contracts/detection';
import type { List } from '@eremite/shared/contracts/list';
import { Injectable } from '@nestjs/common';
import type { z } from 'zod';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { offsetOf, pageByOffset } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { DETECTION_SORTS, type DetectionRow, DetectionsRepository } from './detections.repository.ts';

type DistanceRow = Awaited<ReturnType<DetectionsRepository['distances']>>[number];

/** HI detections of a survey: what its published lists hold, with the distances people have replaced. */
@Injectable()
export class DetectionsService {
  constructor(
    private readonly detections: DetectionsRepository,
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
  ) {}

  async list(user: SignedInUser, surveyId: string, query: z.output<typeof detectionsQuery>): Promise<List<Detection>> {
    await this.access.survey(user, surveyId, 'read');
    const { limit, cursor, sort, search } = query;
    if (sort !== undefined && !DETECTION_SORTS.some((name) => name === sort.replace(/^-/, ''))) {
      throw new AppError(
        'VALIDATION_FAILED',
        `Detections are sorted by ${DETECTION_SORTS.join(', ')}; found "${sort}".`,
        [{ pointer: '/sort', detail: 'unknown' }],
      );
    }
    const offset = offsetOf(cursor);
    const filter = { surveyId, search };
    const [rows, total] = await Promise.all([
      this.detections.page(filter, sort, limit, offset),
      this.detections.count(filter),
    ]);
    return pageByOffset(await this.#describe(rows), total, offset);
  }

  /** Names and places of all detections, in the order of their lists. */
  async positions(user: SignedInUser, surveyId: string) {
    await this.access.survey(user, surveyId, 'read');
    return this.detections.positions(surveyId);
  }

  async get(user: SignedInUser, id: string): Promise<Detection> {
    return (await this.#describe([await this.#row(user, id, 'read')]))[0]!;
  }

  /** Replaces the distance, or with null returns to the table's; either is written in the ledger with its reason. */
  async replaceDistance(user: SignedInUser, id: string, request: UpdateDetectionRequest): Promise<Detection> {
    const row = await this.#row(user, id, 'review');
    const { distanceMpc, errorMpc, source, note } = request;
    if (distanceMpc !== null && source === '') {
      throw new AppError('VALIDATION_FAILED', 'Say where the distance comes from.', [
        { pointer: '/source', detail: 'a source is needed with a distance' },
      ]);
    }
    const before = await this.get(user, id);
    await this.detections.transaction(async (tx) => {
      await this.detections.withdrawDistances(id, tx);
      if (distanceMpc !== null) {
        await this.detections.insertDistance(
          { detectionId: id, distanceMpc, errorMpc, source, note, createdBy: user.id },
          tx,
        );
      }
      const detail = {
        detectionId: id,
        before: { distanceMpc: before.distanceMpc, errorMpc: before.distanceErrorMpc },
        after:
          distanceMpc === null
            ? { distanceMpc: row.distanceMpc, errorMpc: row.distanceErrorMpc }
            : { distanceMpc, errorMpc, source },
      };
      const action = distanceMpc === null ? 'distance returned to the table' : 'distance replaced';
      await this.ledger.append({ surveyId: row.surveyId, actor: user, action, subject: row.name, note, detail }, tx);
    });
    return this.get(user, id);
  }

  async #row(user: SignedInUser, id: string, need: 'read' | 'review'): Promise<DetectionRow> {
    const row = await this.detections.find(id);
    if (!row) throw new AppError('NOT_FOUND', 'There is no such detection.');
    await this.access.survey(user, row.surveyId, need);
    return row;
  }

  async #describe(rows: DetectionRow[]): Promise<Detection[]> {
    const replaced = await this.detections.distances(rows.map(({ id }) => id));
    const byId = new Map(replaced.map((row) => [row.distance.detectionId, row]));
    return rows.map((row) => toDetection(row, byId.get(row.id)));
  }
}

function toDetection(row: DetectionRow, replaced: DistanceRow | undefined): Detection {
  if (!replaced) return { ...row, distanceOverride: null };
  const { distanceMpc, errorMpc, source, note, createdAt } = replaced.distance;
  return {
    ...row,
    distanceMpc,
    distanceErrorMpc: errorMpc,
    distanceOverride: { distanceMpc, errorMpc, source, note, by: replaced.by, at: createdAt.toISOString() },
  };
}
