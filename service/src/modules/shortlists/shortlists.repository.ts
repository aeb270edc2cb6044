import { shortlistEntries, shortlists } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, eq, sql } from 'drizzle-orm';
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

  /** Moves the version on; false where it is no longer `version`. */
  async advance(surveyId: string, runId: string, version: number, db: Database): Promise<boolean> {
    await db.insert(shortlists).values({ surveyId, version: 0 }).onConflictDoNothing();
    const rows = await db
      .update(shortlists)
      .set({ runId, version: sql`${shortlists.version} + 1`, updatedAt: new Date() })
      .where(and(eq(shortlists.surveyId, surveyId), eq(shortlists.version, version)))
      .returning({ version: shortlists.version });
    return rows.length > 0;
  }

  async replaceEntries(surveyId: string, entries: readonly EntryValues[], db: Database): Promise<void> {
    await db.delete(shortlistEntries).where(eq(shortlistEntries.surveyId, surveyId));
    const rows = entries.map((entry, i) => ({ surveyId, rank: i + 1, ...entry }));
    for (let from = 0; from < rows.length; from += 1000)
      await db.insert(shortlistEntries).values(rows.slice(from, from + 1000));
  }
}
