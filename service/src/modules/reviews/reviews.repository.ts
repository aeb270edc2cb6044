import { bindings, detections, returns, reviews, runs, settlements, users } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, desc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type ReviewRow = Awaited<ReturnType<ReviewsRepository['list']>>[number];
const columns = {
  id: reviews.id,
  detectionId: reviews.detectionId,
  runId: reviews.runId,
  runNumber: runs.number,
  reviewerId: reviews.reviewerId,
  reviewer: users.name,
  starlight: reviews.starlight,
  surroundings: reviews.surroundings,
  outcome: reviews.outcome,
  note: reviews.note,
  blind: reviews.blind,
  carriedFrom: reviews.carriedFrom,
  createdAt: reviews.createdAt,
};

/** Reviews and settlements. */
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

  /** Holds a detection until the transaction ends, so that two who decide at once take turns. */
  async lock(detectionId: string, db: Database): Promise<void> {
    await db.select({ id: detections.id }).from(detections).where(eq(detections.id, detectionId)).for('update');
  }

  /** The detection and those of earlier versions of its table that it is known to be. */
  async lineage(detectionId: string, db = this.db): Promise<string[]> {
    const rows = await db.execute<{ id: string }>(sql`
      with recursive line(id) as (
        select ${detectionId}::uuid
        union
        select b.detection_id from ${bindings} b join line on b.successor_id = line.id
        where b.kind = 'detection' and b.state in ('sure', 'answered')
      ) select id from line`);
    return (rows as unknown as { rows: { id: string }[] }).rows.map(({ id }) => id);
  }

  #select(db: Database) {
    return db
      .select(columns)
      .from(reviews)
      .innerJoin(users, eq(users.id, reviews.reviewerId))
      .innerJoin(runs, eq(runs.id, reviews.runId));
  }

  /** Reviews in force of some detections, carried ones among them, newest first. */
  list(detectionIds: readonly string[], db = this.db) {
    return this.#select(db)
      .where(and(inArray(reviews.detectionId, [...detectionIds]), isNull(reviews.supersededAt)))
      .orderBy(desc(reviews.createdAt), desc(runs.number));
  }

  async find(id: string, db = this.db) {
    const [row] = await db
      .select({ ...columns, supersededAt: reviews.supersededAt, surveyId: detections.surveyId, name: detections.name })
      .from(reviews)
      .innerJoin(users, eq(users.id, reviews.reviewerId))
      .innerJoin(runs, eq(runs.id, reviews.runId))
      .innerJoin(detections, eq(detections.id, reviews.detectionId))
      .where(eq(reviews.id, id));
    return row;
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

  /** Takes a review and what was carried of it back; the word it had replaced on the run, if any, holds again. */
  async withdraw(row: { id: string; detectionId: string; runId: string; reviewerId: string }, db: Database) {
    const now = new Date();
    const gone = await db
      .update(reviews)
      .set({ supersededAt: now, withdrawnAt: now })
      .where(and(sql`(${reviews.id} = ${row.id} or ${reviews.carriedFrom} = ${row.id})`, isNull(reviews.supersededAt)))
      .returning({ id: reviews.id });
    if (gone.length === 0) return false;
    const [earlier] = await db
      .select({ id: reviews.id })
      .from(reviews)
      .where(
        and(
          eq(reviews.detectionId, row.detectionId),
          eq(reviews.runId, row.runId),
          eq(reviews.reviewerId, row.reviewerId),
          isNull(reviews.withdrawnAt),
        ),
      )
      .orderBy(desc(reviews.supersededAt))
      .limit(1);
    if (earlier) await db.update(reviews).set({ supersededAt: null }).where(eq(reviews.id, earlier.id));
    return true;
  }

  /** What came back of some detections in a run. */
  returnsOf(runId: string, detectionIds: readonly string[], db = this.db) {
    return db
      .select()
      .from(returns)
      .where(and(eq(returns.runId, runId), inArray(returns.detectionId, [...detectionIds])));
  }

  async settlement(detectionId: string, db = this.db) {
    const [row] = await db
      .select({
        id: settlements.id,
        detectionId: settlements.detectionId,
        runNumber: runs.number,
        starlight: settlements.starlight,
        surroundings: settlements.surroundings,
        outcome: settlements.outcome,
        note: settlements.note,
        moved: settlements.moved,
        by: users.name,
        settledBy: settlements.settledBy,
        createdAt: settlements.createdAt,
        carriedFrom: settlements.carriedFrom,
      })
      .from(settlements)
      .innerJoin(users, eq(users.id, settlements.settledBy))
      .innerJoin(runs, eq(runs.id, settlements.runId))
      .where(and(eq(settlements.detectionId, detectionId), isNull(settlements.supersededAt)));
    return row;
  }

  async settle(values: typeof settlements.$inferInsert, db: Database): Promise<string> {
    await this.unsettle(values.detectionId, db);
    const [row] = await db.insert(settlements).values(values).returning({ id: settlements.id });
    return row!.id;
  }

  /** Ends the settlement in force, if any. */
  async unsettle(detectionId: string, db: Database): Promise<void> {
    const current = and(eq(settlements.detectionId, detectionId), isNull(settlements.supersededAt));
    await db.update(settlements).set({ supersededAt: new Date() }).where(current);
  }

  /** Pairs of blind words on the same detection of the same run, for the agreement of reviewers. */
  async blindPairs(surveyId: string, db = this.db) {
    // The last word a reviewer gave blind on a run: what she says after seeing the other's does not count.
    const { rows } = (await db.execute(sql`
      with words as (
        select distinct on (v.detection_id, v.run_id, v.reviewer_id)
          v.detection_id, v.run_id, v.reviewer_id, u.name, v.starlight, v.surroundings, v.outcome
        from ${reviews} v join ${detections} d on d.id = v.detection_id join ${users} u on u.id = v.reviewer_id
        where d.survey_id = ${surveyId} and v.blind and v.carried_from is null and v.withdrawn_at is null
        order by v.detection_id, v.run_id, v.reviewer_id, v.created_at desc
      )
      select a.reviewer_id as "firstId", a.name as "first", b.reviewer_id as "secondId", b.name as "second",
        a.starlight as "starlightA", b.starlight as "starlightB",
        a.surroundings as "surroundingsA", b.surroundings as "surroundingsB", a.outcome as "outcomeA", b.outcome as "outcomeB"
      from words a join words b on a.detection_id = b.detection_id and a.run_id = b.run_id and a.reviewer_id < b.reviewer_id
      order by a.name, b.name, a.detection_id`)) as unknown as { rows: Record<BlindPairKey, string>[] };
    return rows;
  }
}

type BlindPairKey =
  | 'firstId'
  | 'first'
  | 'secondId'
  | 'second'
  | 'starlightA'
  | 'starlightB'
  | 'surroundingsA'
  | 'surroundingsB'
  | 'outcomeA'
  | 'outcomeB';
