import { criteria, runs, surveys, users } from '@eremite/schema';
import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { Inject, Injectable } from '@nestjs/common';
import { desc, eq, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

const columns = {
  id: criteria.id,
  surveyId: criteria.surveyId,
  number: criteria.number,
  settings: criteria.settings,
  note: criteria.note,
  createdBy: users.name,
  createdAt: criteria.createdAt,
  usedByRuns: sql<number>`(select count(*)::int from ${runs} where ${runs.criteriaId} = ${criteria.id})`,
};

@Injectable()
export class CriteriaRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  async find(id: string, db = this.db) {
    const [row] = await db
      .select(columns)
      .from(criteria)
      .innerJoin(users, eq(users.id, criteria.createdBy))
      .where(eq(criteria.id, id));
    return row;
  }

  list(surveyId: string, db = this.db) {
    return db
      .select(columns)
      .from(criteria)
      .innerJoin(users, eq(users.id, criteria.createdBy))
      .where(eq(criteria.surveyId, surveyId))
      .orderBy(desc(criteria.number));
  }

  /** Stores the next number; the survey is locked, so that two at once take turns. */
  async insert(
    values: { surveyId: string; settings: CriteriaSettings; note: string; createdBy: string },
    db: Database,
  ) {
    await db.select({ id: surveys.id }).from(surveys).where(eq(surveys.id, values.surveyId)).for('update');
    const number = sql`(select coalesce(max(number), 0) + 1 from criteria where survey_id = ${values.surveyId})`;
    const [row] = await db
      .insert(criteria)
      .values({ ...values, number: number as unknown as number })
      .returning({ id: criteria.id, number: criteria.number });
    return row!;
  }
}
