import {
  assignments,
  catalogues,
  detections,
  memberships,
  overrides,
  reviews,
  runs,
  settlements,
  users,
} from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { alias } from 'drizzle-orm/pg-core';
import { and, asc, desc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

const withdrawer = alias(users, 'withdrawer');

@Injectable()
export class ReviewsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  async detection(id: string, db = this.db) {
    const [row] = await db.select().from(detections).where(eq(detections.id, id));
    return row;
  }

  async detectionsOf(surveyId: string, ids: readonly string[], db = this.db) {
    return db
      .select({ id: detections.id })
      .from(detections)
      .where(and(eq(detections.surveyId, surveyId), inArray(detections.id, [...ids])));
  }

  async catalogue(id: string, db = this.db) {
    const [row] = await db.select().from(catalogues).where(eq(catalogues.id, id));
    return row;
  }

  /** Current reviews of a detection, newest first. */
  list(detectionId: string, db = this.db) {
    return db
      .select({
        id: reviews.id,
        detectionId: reviews.detectionId,
        runId: reviews.runId,
        runNumber: runs.number,
        reviewerId: reviews.reviewerId,
        reviewer: users.name,
        starlight: reviews.starlight,
        surroundings: reviews.surroundings,
        note: reviews.note,
        createdAt: reviews.createdAt,
      })
      .from(reviews)
      .innerJoin(users, eq(users.id, reviews.reviewerId))
      .innerJoin(runs, eq(runs.id, reviews.runId))
      .where(and(eq(reviews.detectionId, detectionId), isNull(reviews.supersededAt)))
      .orderBy(desc(reviews.createdAt));
  }

  /** A reviewer's later word on the same run takes the place of the earlier one, which is kept. */
  async insert(values: typeof reviews.$inferInsert, db: Database): Promise<string> {
    const mine = and(
      eq(reviews.detectionId, values.detectionId),
      eq(reviews.runId, values.runId),
      eq(reviews.reviewerId, values.reviewerId),
      isNull(reviews.supersededAt),
    );
    await db.update(reviews).set({ supersededAt: new Date() }).where(mine);
    const [row] = await db.insert(reviews).values(values).returning({ id: reviews.id });
    return row!.id;
  }

  async settle(values: typeof settlements.$inferInsert, db: Database): Promise<void> {
    const current = and(eq(settlements.detectionId, values.detectionId), isNull(settlements.supersededAt));
    await db.update(settlements).set({ supersededAt: new Date() }).where(current);
    await db.insert(settlements).values(values);
  }

  #overrides(db: Database) {
    return db
      .select({
        id: overrides.id,
        detectionId: overrides.detectionId,
        surveyId: detections.surveyId,
        detectionName: detections.name,
        catalogueId: overrides.catalogueId,
        rowId: overrides.row,
        objectName: overrides.objectName,
        action: overrides.action,
        note: overrides.note,
        by: users.name,
        createdById: overrides.createdBy,
        createdAt: overrides.createdAt,
        withdrawnAt: overrides.withdrawnAt,
        withdrawnBy: withdrawer.name,
        withdrawnNote: overrides.withdrawnNote,
      })
      .from(overrides)
      .innerJoin(detections, eq(detections.id, overrides.detectionId))
      .innerJoin(users, eq(users.id, overrides.createdBy))
      .leftJoin(withdrawer, eq(withdrawer.id, overrides.withdrawnBy));
  }

  overridesOf(detectionId: string, db = this.db) {
    return this.#overrides(db).where(eq(overrides.detectionId, detectionId)).orderBy(desc(overrides.createdAt));
  }

  async override(id: string, db = this.db) {
    const [row] = await this.#overrides(db).where(eq(overrides.id, id));
    return row;
  }

  async insertOverride(values: typeof overrides.$inferInsert, db: Database): Promise<string> {
    const [row] = await db.insert(overrides).values(values).returning({ id: overrides.id });
    return row!.id;
  }

  /** Withdraws what is in force on the same pair, so that the new word stands alone. */
  async withdrawPair(
    detectionId: string,
    catalogueId: string,
    row: number,
    by: string,
    note: string,
    db: Database,
  ): Promise<void> {
    const pair = and(
      eq(overrides.detectionId, detectionId),
      eq(overrides.catalogueId, catalogueId),
      eq(overrides.row, row),
      isNull(overrides.withdrawnAt),
    );
    await db.update(overrides).set({ withdrawnAt: new Date(), withdrawnBy: by, withdrawnNote: note }).where(pair);
  }

  async withdraw(id: string, by: string, note: string, db: Database): Promise<boolean> {
    const rows = await db
      .update(overrides)
      .set({ withdrawnAt: new Date(), withdrawnBy: by, withdrawnNote: note })
      .where(and(eq(overrides.id, id), isNull(overrides.withdrawnAt)))
      .returning({ id: overrides.id });
    return rows.length > 0;
  }

  async member(teamId: string, userId: string, db = this.db) {
    const [row] = await db
      .select({ role: memberships.role, name: users.name })
      .from(memberships)
      .innerJoin(users, eq(users.id, memberships.userId))
      .where(and(eq(memberships.teamId, teamId), eq(memberships.userId, userId)));
    return row;
  }

  async assign(detectionIds: readonly string[], userId: string, db: Database): Promise<void> {
    const rows = detectionIds.map((detectionId) => ({ detectionId, userId }));
    for (let from = 0; from < rows.length; from += 1000) {
      await db
        .insert(assignments)
        .values(rows.slice(from, from + 1000))
        .onConflictDoNothing();
    }
  }

  async unassign(detectionIds: readonly string[], userId: string, db: Database): Promise<void> {
    await db
      .delete(assignments)
      .where(and(inArray(assignments.detectionId, [...detectionIds]), eq(assignments.userId, userId)));
  }

  /** Detections assigned to each reviewer of a survey, and how many of them he has reviewed on the latest finished run. */
  progress(surveyId: string, db = this.db) {
    const latest = sql`(select r.id from ${runs} r where r.survey_id = ${surveyId} and r.state = 'done' order by r.number desc limit 1)`;
    const done = sql`exists (select 1 from ${reviews} v where v.detection_id = ${assignments.detectionId} and v.reviewer_id = ${assignments.userId} and v.run_id = ${latest} and v.superseded_at is null)`;
    return db
      .select({
        userId: assignments.userId,
        name: users.name,
        assigned: sql<number>`count(*)::int`,
        reviewed: sql<number>`(count(*) filter (where ${done}))::int`,
      })
      .from(assignments)
      .innerJoin(detections, eq(detections.id, assignments.detectionId))
      .innerJoin(users, eq(users.id, assignments.userId))
      .where(eq(detections.surveyId, surveyId))
      .groupBy(assignments.userId, users.name)
      .orderBy(asc(users.name));
  }

  assignedOf(detectionId: string, db = this.db) {
    return db
      .select({ userId: assignments.userId })
      .from(assignments)
      .where(eq(assignments.detectionId, detectionId))
      .orderBy(asc(assignments.createdAt));
  }
}
