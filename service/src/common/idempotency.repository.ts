import { Inject, Injectable } from '@nestjs/common';
import { idempotentAnswers } from '@eremite/schema';
import { and, eq, isNull, lt, or, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../database/database.ts';

export interface IdempotentKey {
  readonly userId: string;
  readonly key: string;
}

@Injectable()
export class IdempotencyRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  /**
   * Claims the key; undefined when it was free, else what is known of the earlier request. Answers are kept for a day; a
   * claim without one after an hour is that of a process that died.
   */
  async claim(id: IdempotentKey, path: string, bodyHash: string, db = this.db) {
    const { createdAt, status } = idempotentAnswers;
    const old = lt(createdAt, sql`now() - interval '1 day'`);
    const orphaned = and(isNull(status), lt(createdAt, sql`now() - interval '1 hour'`));
    await db.delete(idempotentAnswers).where(or(old, orphaned));
    const claimed = await db
      .insert(idempotentAnswers)
      .values({ ...id, path, bodyHash })
      .onConflictDoNothing()
      .returning({ key: idempotentAnswers.key });
    if (claimed.length === 1) return undefined;
    const [earlier] = await db.select().from(idempotentAnswers).where(this.#is(id));
    return earlier;
  }

  async keep(id: IdempotentKey, status: number, answer: unknown, db = this.db): Promise<void> {
    await db.update(idempotentAnswers).set({ status, answer }).where(this.#is(id));
  }

  async forget(id: IdempotentKey, db = this.db): Promise<void> {
    await db.delete(idempotentAnswers).where(this.#is(id));
  }

  #is({ userId, key }: IdempotentKey) {
    return and(eq(idempotentAnswers.userId, userId), eq(idempotentAnswers.key, key));
  }
}
