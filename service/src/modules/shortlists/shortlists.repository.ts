import { shortlistEntries, shortlists } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { asc, eq, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export interface EntryValues {
  detectionId: string;
  reason: string;
  nullResult: string;
}

@Injectable()
export class ShortlistsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  async find(surveyId: string, db = this.db) {
    const [row] = await db.select().from(shortlists).where(eq(shortlists.surveyId, surveyId));
    return row;
  }

  entries(surveyId: string, db = this.db) {
    return db
      .select()
      .from(shortlistEntries)
      .where(eq(shortlistEntries.surveyId, surveyId))
      .orderBy(asc(shortlistEntries.rank));
  }

  /** Locks the list until the transaction ends; answers its version. */
  async lock(surveyId: string, db: Database): Promise<number> {
    await db.insert(shortlists).values({ surveyId, version: 0 }).onConflictDoNothing();
    const [row] = await db
      .select({ version: shortlists.version })
      .from(shortlists)
      .where(eq(shortlists.surveyId, surveyId))
      .for('update');
    return row!.version;
  }

  async advance(surveyId: string, runId: string, db: Database): Promise<void> {
    await db
      .update(shortlists)
      .set({ runId, version: sql`${shortlists.version} + 1`, updatedAt: new Date() })
      .where(eq(shortlists.surveyId, surveyId));
  }

  async replaceEntries(surveyId: string, entries: readonly EntryValues[], db: Database): Promise<void> {
    await db.delete(shortlistEntries).where(eq(shortlistEntries.surveyId, surveyId));
    const rows = entries.map((entry, i) => ({ surveyId, rank: i + 1, ...entry }));
    for (let from = 0; from < rows.length; from += 1000)
      await db.insert(shortlistEntries).values(rows.slice(from, from + 1000));
  }
}
