import { detections, doubtWords, users } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { alias } from 'drizzle-orm/pg-core';
import { and, desc, eq, isNull } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

const withdrawer = alias(users, 'withdrawer');
export type DoubtWordRow = NonNullable<Awaited<ReturnType<DoubtWordsRepository['find']>>>;

/** People's words on doubts. */
@Injectable()
export class DoubtWordsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  #select(db: Database) {
    return db
      .select({
        id: doubtWords.id,
        detectionId: doubtWords.detectionId,
        surveyId: detections.surveyId,
        detectionName: detections.name,
        doubt: doubtWords.doubt,
        word: doubtWords.word,
        grade: doubtWords.grade,
        note: doubtWords.note,
        by: users.name,
        createdById: doubtWords.createdBy,
        createdAt: doubtWords.createdAt,
        withdrawnAt: doubtWords.withdrawnAt,
        withdrawnBy: withdrawer.name,
        withdrawnNote: doubtWords.withdrawnNote,
      })
      .from(doubtWords)
      .innerJoin(detections, eq(detections.id, doubtWords.detectionId))
      .innerJoin(users, eq(users.id, doubtWords.createdBy))
      .leftJoin(withdrawer, eq(withdrawer.id, doubtWords.withdrawnBy));
  }

  list(detectionId: string, db = this.db) {
    return this.#select(db).where(eq(doubtWords.detectionId, detectionId)).orderBy(desc(doubtWords.createdAt));
  }

  async find(id: string, db = this.db) {
    const [row] = await this.#select(db).where(eq(doubtWords.id, id));
    return row;
  }

  async inForce(detectionId: string, doubt: string, db = this.db) {
    const [row] = await this.#select(db).where(
      and(eq(doubtWords.detectionId, detectionId), eq(doubtWords.doubt, doubt), isNull(doubtWords.withdrawnAt)),
    );
    return row;
  }

  async insert(values: typeof doubtWords.$inferInsert, db: Database): Promise<string> {
    const [row] = await db.insert(doubtWords).values(values).returning({ id: doubtWords.id });
    return row!.id;
  }

  async withdraw(id: string, by: string, note: string, db: Database): Promise<boolean> {
    const rows = await db
      .update(doubtWords)
      .set({ withdrawnAt: new Date(), withdrawnBy: by, withdrawnNote: note })
      .where(and(eq(doubtWords.id, id), isNull(doubtWords.withdrawnAt)))
      .returning({ id: doubtWords.id });
    return rows.length > 0;
  }
}
