import { Inject, Injectable } from '@nestjs/common';
import { ledger } from '@eremite/schema';
import { asc, count, desc, eq, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type LedgerRow = typeof ledger.$inferSelect;

@Injectable()
export class LedgerRepository {
  constructor(@Inject(DATABASE) readonly db: Database) {}

  /** Makes appends to one survey's ledger wait for each other until the transaction ends. */
  async lock(surveyId: string, db: Database): Promise<void> {
    await db.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`ledger:${surveyId}`}, 0))`);
  }

  async last(surveyId: string, db = this.db): Promise<LedgerRow | undefined> {
    const [row] = await db
      .select()
      .from(ledger)
      .where(eq(ledger.surveyId, surveyId))
      .orderBy(desc(ledger.number))
      .limit(1);
    return row;
  }

  async insert(row: typeof ledger.$inferInsert, db = this.db): Promise<void> {
    await db.insert(ledger).values(row);
  }

  /** Lines of a survey, newest first or oldest first. */
  async page(surveyId: string, order: 'newest' | 'oldest', limit: number, offset: number, db = this.db) {
    return db
      .select()
      .from(ledger)
      .where(eq(ledger.surveyId, surveyId))
      .orderBy(order === 'newest' ? desc(ledger.number) : asc(ledger.number))
      .limit(limit)
      .offset(offset);
  }

  async count(surveyId: string, db = this.db): Promise<number> {
    const [row] = await db.select({ total: count() }).from(ledger).where(eq(ledger.surveyId, surveyId));
    return Number(row?.total ?? 0);
  }
}
