import { catalogues, detections, overrides, users } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { alias } from 'drizzle-orm/pg-core';
import { and, desc, eq, isNull } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

const withdrawer = alias(users, 'withdrawer');
export type OverrideRow = NonNullable<Awaited<ReturnType<OverridesRepository['find']>>>;
interface Pair {
  detectionId: string;
  catalogueId: string;
  row: number;
}
const ofPair = ({ detectionId, catalogueId, row }: Pair) =>
  and(
    eq(overrides.detectionId, detectionId),
    eq(overrides.catalogueId, catalogueId),
    eq(overrides.row, row),
    isNull(overrides.withdrawnAt),
  );

/** Counterparts that people accepted or rejected. */
@Injectable()
export class OverridesRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  async catalogue(id: string, db = this.db) {
    const [row] = await db.select().from(catalogues).where(eq(catalogues.id, id));
    return row;
  }

  #select(db: Database) {
    return db
      .select({
        id: overrides.id,
        detectionId: overrides.detectionId,
        surveyId: detections.surveyId,
        detectionName: detections.name,
        catalogueId: overrides.catalogueId,
        rowId: overrides.row,
        objectName: overrides.objectName,
        action: overrides.action,
        note: overrides.note,
        by: users.name,
        createdById: overrides.createdBy,
        createdAt: overrides.createdAt,
        carriedFrom: overrides.carriedFrom,
        withdrawnAt: overrides.withdrawnAt,
        withdrawnBy: withdrawer.name,
        withdrawnNote: overrides.withdrawnNote,
      })
      .from(overrides)
      .innerJoin(detections, eq(detections.id, overrides.detectionId))
      .innerJoin(users, eq(users.id, overrides.createdBy))
      .leftJoin(withdrawer, eq(withdrawer.id, overrides.withdrawnBy));
  }

  list(detectionId: string, db = this.db) {
    return this.#select(db).where(eq(overrides.detectionId, detectionId)).orderBy(desc(overrides.createdAt));
  }

  async find(id: string, db = this.db) {
    const [row] = await this.#select(db).where(eq(overrides.id, id));
    return row;
  }

  /** The word in force on a pair. */
  async inForce(pair: Pair, db = this.db) {
    const [row] = await this.#select(db).where(ofPair(pair));
    return row;
  }

  async insert(values: typeof overrides.$inferInsert, db: Database): Promise<string> {
    const [row] = await db.insert(overrides).values(values).returning({ id: overrides.id });
    return row!.id;
  }

  /** Withdraws what is in force on the same pair, so that the new word stands alone. */
  async withdrawPair(pair: Pair, by: string, note: string, db: Database): Promise<void> {
    await db
      .update(overrides)
      .set({ withdrawnAt: new Date(), withdrawnBy: by, withdrawnNote: note })
      .where(ofPair(pair));
  }

  async withdraw(id: string, by: string, note: string, db: Database): Promise<boolean> {
    const rows = await db
      .update(overrides)
      .set({ withdrawnAt: new Date(), withdrawnBy: by, withdrawnNote: note })
      .where(and(eq(overrides.id, id), isNull(overrides.withdrawnAt)))
      .returning({ id: overrides.id });
    return rows.length > 0;
  }
}
