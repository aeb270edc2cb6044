import { catalogues, doubtWords, overrides, reviews, runs, users } from '@eremite/schema';
import type { EditionOverride, EditionReview } from '@eremite/shared/contracts/edition';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, eq, inArray, isNull } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';
import type { EditionWords } from '../../edition/edition-head.ts';

type Of<T> = Map<string, T[]>;

/** What people said of some detections, by detection, as an edition keeps it. */
@Injectable()
export class SaidRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  /** Reviews in force, oldest first. */
  async reviews(ids: readonly string[], db = this.db): Promise<Of<EditionReview>> {
    const rows = await db
      .select({
        detectionId: reviews.detectionId,
        runNumber: runs.number,
        outcome: reviews.outcome,
        starlight: reviews.starlight,
        surroundings: reviews.surroundings,
        note: reviews.note,
        by: users.name,
        at: reviews.createdAt,
      })
      .from(reviews)
      .innerJoin(users, eq(users.id, reviews.reviewerId))
      .innerJoin(runs, eq(runs.id, reviews.runId))
      .where(and(inArray(reviews.detectionId, [...ids]), isNull(reviews.supersededAt), isNull(reviews.withdrawnAt)))
      .orderBy(asc(reviews.createdAt));
    return grouped(rows, ({ at, ...row }) => ({ as: 'review', ...row, at: at.toISOString() }) as EditionReview);
  }

  /** All overrides, those taken back among them, oldest first. */
  async overrides(ids: readonly string[], db = this.db): Promise<Of<EditionOverride>> {
    const rows = await db
      .select({
        detectionId: overrides.detectionId,
        catalogueId: overrides.catalogueId,
        catalogueName: catalogues.name,
        rowId: overrides.row,
        objectName: overrides.objectName,
        action: overrides.action,
        note: overrides.note,
        by: users.name,
        at: overrides.createdAt,
        withdrawnAt: overrides.withdrawnAt,
        withdrawnNote: overrides.withdrawnNote,
      })
      .from(overrides)
      .innerJoin(users, eq(users.id, overrides.createdBy))
      .innerJoin(catalogues, eq(catalogues.id, overrides.catalogueId))
      .where(inArray(overrides.detectionId, [...ids]))
      .orderBy(asc(overrides.createdAt));
    return grouped(
      rows,
      ({ at, withdrawnAt, ...row }) =>
        ({ ...row, at: at.toISOString(), withdrawnAt: withdrawnAt?.toISOString() ?? null }) as EditionOverride,
    );
  }

  /** Words on doubts in force, oldest first. */
  async doubtWords(ids: readonly string[], db = this.db): Promise<Of<EditionWords['doubtWords'][number]>> {
    const rows = await db
      .select({
        detectionId: doubtWords.detectionId,
        doubt: doubtWords.doubt,
        word: doubtWords.word,
        note: doubtWords.note,
        by: users.name,
        at: doubtWords.createdAt,
      })
      .from(doubtWords)
      .innerJoin(users, eq(users.id, doubtWords.createdBy))
      .where(and(inArray(doubtWords.detectionId, [...ids]), isNull(doubtWords.withdrawnAt)))
      .orderBy(asc(doubtWords.createdAt));
    return grouped(rows, ({ at, ...row }) => ({ ...row, at: at.toISOString() }));
  }
}

function grouped<R extends { detectionId: string }, T>(
  rows: readonly R[],
  of: (row: Omit<R, 'detectionId'>) => T,
): Of<T> {
  const groups: Of<T> = new Map();
  for (const { detectionId, ...row } of rows) {
    groups.set(detectionId, [...(groups.get(detectionId) ?? []), of(row)]);
  }
  return groups;
}
