import { Inject, Injectable } from '@nestjs/common';
import { jobs } from '@eremite/schema';
import { and, count, desc, eq, inArray, isNull, lt, or, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../database/database.ts';

export type JobRow = typeof jobs.$inferSelect;
type JobError = { title: string; detail?: string };

@Injectable()
export class JobsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  async insert(values: typeof jobs.$inferInsert, db = this.db): Promise<JobRow> {
    const [row] = await db.insert(jobs).values(values).returning();
    return row!;
  }

  async get(id: string, db = this.db): Promise<JobRow | undefined> {
    const [row] = await db.select().from(jobs).where(eq(jobs.id, id));
    return row;
  }

  /** Takes a queued job in hand; undefined when someone else has it or it was cancelled. */
  async start(id: string, db = this.db): Promise<JobRow | undefined> {
    const [row] = await db
      .update(jobs)
      .set({
        state: 'running',
        startedAt: sql`now()`,
        heartbeatAt: sql`now()`,
        progress: 0,
        message: '',
        attempts: sql`${jobs.attempts} + 1`,
      })
      .where(and(eq(jobs.id, id), eq(jobs.state, 'queued'), isNull(jobs.cancelRequestedAt)))
      .returning();
    return row;
  }

  /** Says that the work goes on; answers whether someone asked to cancel it. */
  async beat(id: string, progress: number, message: string, db = this.db): Promise<boolean> {
    const [row] = await db
      .update(jobs)
      .set({ heartbeatAt: sql`now()`, progress, message })
      .where(and(eq(jobs.id, id), eq(jobs.state, 'running')))
      .returning({ cancel: jobs.cancelRequestedAt });
    return row === undefined || row.cancel !== null;
  }

  async finish(
    id: string,
    outcome: { state: 'done'; result: unknown } | { state: 'failed' | 'cancelled'; error: JobError },
    db = this.db,
  ): Promise<void> {
    const values = outcome.state === 'done' ? { result: outcome.result ?? {}, progress: 1 } : { error: outcome.error };
    await db
      .update(jobs)
      .set({ ...values, state: outcome.state, finishedAt: sql`now()` })
      .where(and(eq(jobs.id, id), inArray(jobs.state, ['queued', 'running'])));
  }

  /** Marks the wish to cancel; answers the row as it then stands. */
  async requestCancel(id: string, db = this.db): Promise<JobRow | undefined> {
    const [row] = await db
      .update(jobs)
      .set({ cancelRequestedAt: sql`coalesce(${jobs.cancelRequestedAt}, now())` })
      .where(and(eq(jobs.id, id), inArray(jobs.state, ['queued', 'running'])))
      .returning();
    return row;
  }

  async putBack(id: string, db = this.db): Promise<void> {
    await db
      .update(jobs)
      .set({ state: 'queued', startedAt: null, heartbeatAt: null, progress: 0, message: 'waiting to start again' })
      .where(and(eq(jobs.id, id), eq(jobs.state, 'running')));
  }

  /** Running ones without a sign of life for so many seconds; all running ones for 0. */
  async abandoned(seconds: number, db = this.db): Promise<JobRow[]> {
    const old = sql`now() - make_interval(secs => ${seconds})`;
    return db
      .select()
      .from(jobs)
      .where(and(eq(jobs.state, 'running'), or(isNull(jobs.heartbeatAt), lt(jobs.heartbeatAt, old))));
  }

  async queued(db = this.db): Promise<JobRow[]> {
    return db.select().from(jobs).where(eq(jobs.state, 'queued')).orderBy(jobs.createdAt);
  }

  async page(limit: number, offset: number, db = this.db): Promise<JobRow[]> {
    return db.select().from(jobs).orderBy(desc(jobs.createdAt), desc(jobs.id)).limit(limit).offset(offset);
  }

  async counts(db = this.db): Promise<{ state: string; kind: string; total: number }[]> {
    const rows = await db
      .select({ state: jobs.state, kind: jobs.kind, total: count() })
      .from(jobs)
      .groupBy(jobs.state, jobs.kind);
    return rows.map((row) => ({ ...row, total: Number(row.total) }));
  }
}
