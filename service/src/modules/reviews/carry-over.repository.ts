import { bindings, detections, returns, reviews, runs, settlements, verdicts } from '@eremite/schema';
import type { Moved } from '@eremite/shared/contracts/evidence-moved';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { Inject, Injectable } from '@nestjs/common';
import { and, desc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type NewReview = typeof reviews.$inferInsert;
const BATCH = 500;

/** Reads and writes what of people's words holds in a new run. */
@Injectable()
export class CarryOverRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  async latestDone(surveyId: string, db = this.db) {
    const [row] = await db
      .select({ id: runs.id, number: runs.number })
      .from(runs)
      .where(and(eq(runs.surveyId, surveyId), eq(runs.state, 'done')))
      .orderBy(desc(runs.number))
      .limit(1);
    return row;
  }

  /** The last word each reviewer gave on each detection of a survey, leaving out what was only carried. */
  lastWords(surveyId: string, reviewId: string | undefined, db: Database) {
    return db
      .selectDistinctOn([reviews.detectionId, reviews.reviewerId], {
        id: reviews.id,
        detectionId: reviews.detectionId,
        runId: reviews.runId,
        reviewerId: reviews.reviewerId,
        starlight: reviews.starlight,
        surroundings: reviews.surroundings,
        outcome: reviews.outcome,
        note: reviews.note,
        createdAt: reviews.createdAt,
      })
      .from(reviews)
      .innerJoin(detections, eq(detections.id, reviews.detectionId))
      .where(
        and(
          eq(detections.surveyId, surveyId),
          isNull(reviews.supersededAt),
          isNull(reviews.carriedFrom),
          reviewId ? eq(reviews.id, reviewId) : undefined,
        ),
      )
      .orderBy(reviews.detectionId, reviews.reviewerId, desc(reviews.createdAt));
  }

  /** Settlements in force with where and on which run they were made. */
  settled(surveyId: string, settlementId: string | undefined, db: Database) {
    return db
      .select({ settlement: settlements })
      .from(settlements)
      .innerJoin(detections, eq(detections.id, settlements.detectionId))
      .where(
        and(
          eq(detections.surveyId, surveyId),
          isNull(settlements.supersededAt),
          settlementId ? eq(settlements.id, settlementId) : undefined,
        ),
      );
  }

  async settlementById(id: string, db: Database) {
    const [row] = await db.select().from(settlements).where(eq(settlements.id, id));
    return row;
  }

  /** Which detection of a newer list each detection is known to be. */
  async successors(surveyId: string, db: Database): Promise<Map<string, string>> {
    const rows = await db
      .select({ from: bindings.detectionId, to: bindings.successorId })
      .from(bindings)
      .where(
        and(
          eq(bindings.surveyId, surveyId),
          eq(bindings.kind, 'detection'),
          inArray(bindings.state, ['sure', 'answered']),
        ),
      );
    return new Map(rows.flatMap(({ from, to }) => (to ? [[from, to] as const] : [])));
  }

  /** Verdicts of some detections in a run by detection. */
  async items(runId: string, detectionIds: readonly string[], db: Database): Promise<Map<string, VerdictItem>> {
    const found = new Map<string, VerdictItem>();
    for (let from = 0; from < detectionIds.length; from += BATCH) {
      const ids = detectionIds.slice(from, from + BATCH);
      const rows = await db
        .select({ id: verdicts.detectionId, item: verdicts.item })
        .from(verdicts)
        .where(and(eq(verdicts.runId, runId), inArray(verdicts.detectionId, ids)));
      for (const { id, item } of rows) found.set(id, item as VerdictItem);
    }
    return found;
  }

  async carry(rows: NewReview[], db: Database): Promise<void> {
    for (let from = 0; from < rows.length; from += BATCH) {
      // A reviewer who has spoken on the later run already is not spoken for.
      await db
        .insert(reviews)
        .values(rows.slice(from, from + BATCH))
        .onConflictDoNothing();
    }
  }

  async giveBack(rows: (typeof returns.$inferInsert)[], db: Database): Promise<void> {
    for (let from = 0; from < rows.length; from += BATCH) {
      await db
        .insert(returns)
        .values(rows.slice(from, from + BATCH))
        .onConflictDoUpdate({
          target: [returns.runId, returns.detectionId, returns.reviewerId],
          set: { reviewId: sql`excluded.review_id`, moved: sql`excluded.moved` },
        });
    }
  }

  async markSettlement(id: string, moved: readonly Moved[], db: Database): Promise<void> {
    await db
      .update(settlements)
      .set({ moved: moved.length > 0 ? moved : null })
      .where(eq(settlements.id, id));
  }

  /** Takes a settlement on to the detection's row in a newer list; one made there already stays. */
  async settleSuccessor(values: typeof settlements.$inferInsert, db: Database): Promise<void> {
    await db.insert(settlements).values(values).onConflictDoNothing();
  }
}
