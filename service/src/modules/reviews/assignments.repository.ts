import { assignments, detections, memberships, returns, reviews, runs, users } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

/** Who is to look at what. */
@Injectable()
export class AssignmentsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  async detectionsOf(surveyId: string, ids: readonly string[], db = this.db) {
    return db
      .select({ id: detections.id })
      .from(detections)
      .where(and(eq(detections.surveyId, surveyId), inArray(detections.id, [...ids])));
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

  /** Detections of the latest finished run assigned to each reviewer, how many are reviewed on it, how many came back. */
  progress(surveyId: string, db = this.db) {
    const latest = sql`(select r.id from ${runs} r where r.survey_id = ${surveyId} and r.state = 'done' order by r.number desc limit 1)`;
    const on = (table: typeof reviews | typeof returns, more: string) =>
      sql`exists (select 1 from ${table} v where v.detection_id = ${assignments.detectionId} and v.reviewer_id = ${assignments.userId} and v.run_id = ${latest} ${sql.raw(more)})`;
    const done = on(reviews, 'and v.superseded_at is null');
    return db
      .select({
        userId: assignments.userId,
        name: users.name,
        assigned: sql<number>`count(*)::int`,
        reviewed: sql<number>`(count(*) filter (where ${done}))::int`,
        returned: sql<number>`(count(*) filter (where ${on(returns, '')} and not ${done}))::int`,
      })
      .from(assignments)
      .innerJoin(detections, eq(detections.id, assignments.detectionId))
      .innerJoin(users, eq(users.id, assignments.userId))
      .where(
        sql`${detections.surveyId} = ${surveyId} and (${latest} is null or exists (select 1 from verdicts w where w.run_id = ${latest} and w.detection_id = ${assignments.detectionId}))`,
      )
      .groupBy(assignments.userId, users.name)
      .orderBy(asc(users.name));
  }
}
