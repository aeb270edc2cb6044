import { Inject, Injectable } from '@nestjs/common';
import { mails } from '@eremite/schema';
import { count, desc, eq, inArray, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type MailRow = typeof mails.$inferSelect;

@Injectable()
export class MailRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  async insert(values: typeof mails.$inferInsert, db = this.db): Promise<MailRow> {
    const [row] = await db.insert(mails).values(values).returning();
    return row!;
  }

  /** A mail that has gone out is not kept in full: its link is for the receiver alone. */
  async markSent(id: string, db = this.db): Promise<void> {
    await db.update(mails).set({ state: 'sent', text: '', error: null }).where(eq(mails.id, id));
  }

  async markFailed(id: string, error: string, db = this.db): Promise<void> {
    await db.update(mails).set({ state: 'failed', error }).where(eq(mails.id, id));
  }

  /** Newest first; all, or those of the given teams. */
  async page(teams: readonly string[] | 'all', limit: number, offset: number, db = this.db) {
    const where = teams === 'all' ? undefined : teams.length > 0 ? inArray(mails.teamId, [...teams]) : sql`false`;
    const [rows, [total]] = await Promise.all([
      db.select().from(mails).where(where).orderBy(desc(mails.createdAt), desc(mails.id)).limit(limit).offset(offset),
      db.select({ total: count() }).from(mails).where(where),
    ]);
    return { rows, total: Number(total?.total ?? 0) };
  }
}
