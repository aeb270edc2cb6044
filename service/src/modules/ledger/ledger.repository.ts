import { Inject, Injectable } from '@nestjs/common';
import { ledger } from '@eremite/schema';
import type { LedgerQuery } from '@eremite/shared/contracts/ledger';
import { and, asc, count, desc, eq, gt, gte, inArray, notInArray, or, type SQL, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type LedgerRow = typeof ledger.$inferSelect;
export type LedgerFilter = Partial<Omit<LedgerQuery, 'limit' | 'cursor' | 'sort'>> & {
  /** A reviewer for whom what others' reviews came to does not exist. */
  blindTo?: string | undefined;
  /** The actions that are hidden from her. */
  hidden?: readonly string[];
};

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

  #where(surveyId: string, filter: LedgerFilter): SQL {
    const { actor, action, search, detectionId, since, until, blindTo, hidden = [] } = filter;
    // One must not find out by filtering what one is not told: hidden notes are not searched, hidden actions not matched.
    const open = blindTo ? or(notInArray(ledger.action, [...hidden]), eq(ledger.actorId, blindTo)) : undefined;
    const like = `%${(search ?? '').replace(/[\\%_]/g, '\\$&')}%`;
    return and(
      eq(ledger.surveyId, surveyId),
      actor ? eq(ledger.actor, actor) : undefined,
      action ? and(eq(ledger.action, action), open) : undefined,
      search ? or(sql`${ledger.subject} ilike ${like}`, and(sql`${ledger.note} ilike ${like}`, open)) : undefined,
      detectionId ? sql`${ledger.detail}->>'detectionId' = ${detectionId}` : undefined,
      since ? gte(ledger.at, new Date(`${since}T00:00:00Z`)) : undefined,
      until ? sql`${ledger.at} < ${until}::date + 1` : undefined,
    )!;
  }

  /** Lines of a survey, newest first or oldest first. */
  async page(
    surveyId: string,
    order: 'newest' | 'oldest',
    limit: number,
    offset: number,
    filter: LedgerFilter = {},
    db = this.db,
  ) {
    return db
      .select()
      .from(ledger)
      .where(this.#where(surveyId, filter))
      .orderBy(order === 'newest' ? desc(ledger.number) : asc(ledger.number))
      .limit(limit)
      .offset(offset);
  }

  async count(surveyId: string, filter: LedgerFilter = {}, db = this.db): Promise<number> {
    const [row] = await db.select({ total: count() }).from(ledger).where(this.#where(surveyId, filter));
    return Number(row?.total ?? 0);
  }

  /** Lines after a number, oldest first. */
  after(surveyId: string, number: number, limit: number, db = this.db): Promise<LedgerRow[]> {
    return db
      .select()
      .from(ledger)
      .where(and(eq(ledger.surveyId, surveyId), gt(ledger.number, number)))
      .orderBy(asc(ledger.number))
      .limit(limit);
  }

  /** Number of the last line of each survey. */
  async lastNumbers(surveyIds: readonly string[], db = this.db): Promise<Map<string, number>> {
    const rows = await db
      .select({ surveyId: ledger.surveyId, last: sql<number>`max(${ledger.number})::int` })
      .from(ledger)
      .where(inArray(ledger.surveyId, [...surveyIds]))
      .groupBy(ledger.surveyId);
    return new Map(rows.map((row) => [row.surveyId, row.last]));
  }

  async facets(surveyId: string, db = this.db) {
    const of = (column: typeof ledger.actor | typeof ledger.action) =>
      db.selectDistinct({ value: column }).from(ledger).where(eq(ledger.surveyId, surveyId)).orderBy(asc(column));
    const [actors, actions] = [await of(ledger.actor), await of(ledger.action)];
    return { actors: actors.map(({ value }) => value), actions: actions.map(({ value }) => value) };
  }
}
