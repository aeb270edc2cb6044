import { runs, settlements, shortlistEntries, shortlists, users } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export interface EntryValues {
  detectionId: string;
  reason: string;
  nullResult: string;
}

/** The lead's word in force on a detection. */
export interface SettledRow {
  detectionId: string;
  runNumber: number;
  starlight: string;
  surroundings: string;
  outcome: string;
  /** What moved since; null while the evidence stands. */
  moved: unknown;
  note: string;
  by: string;
  at: Date;
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

  /** Settled words in force on some detections, or on all of a run. */
  async settled(of: { detectionIds: readonly string[] } | { runId: string }, db = this.db): Promise<SettledRow[]> {
    const found: SettledRow[] = [];
    const lists =
      'runId' in of
        ? [sql`${settlements.detectionId} in (select v.detection_id from verdicts v where v.run_id = ${of.runId})`]
        : chunks(of.detectionIds).map((ids) => inArray(settlements.detectionId, ids));
    for (const list of lists) {
      const rows = await db
        .select({
          detectionId: settlements.detectionId,
          runNumber: runs.number,
          starlight: settlements.starlight,
          surroundings: settlements.surroundings,
          outcome: settlements.outcome,
          moved: settlements.moved,
          note: settlements.note,
          by: users.name,
          at: settlements.createdAt,
        })
        .from(settlements)
        .innerJoin(users, eq(users.id, settlements.settledBy))
        .innerJoin(runs, eq(runs.id, settlements.runId))
        .where(and(list, isNull(settlements.supersededAt)));
      found.push(...rows);
    }
    return found;
  }
}

function chunks(ids: readonly string[], size = 1000): string[][] {
  return Array.from({ length: Math.ceil(ids.length / size) }, (_, i) => ids.slice(i * size, (i + 1) * size));
}
