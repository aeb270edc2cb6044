import { attachments } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, eq, inArray, isNull, lt, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type AttachmentRow = typeof attachments.$inferSelect;

/** Files that go with notes. */
@Injectable()
export class AttachmentsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  async insert(values: typeof attachments.$inferInsert, db = this.db): Promise<AttachmentRow> {
    const [row] = await db.insert(attachments).values(values).returning();
    return row!;
  }

  async find(id: string, db = this.db): Promise<AttachmentRow | undefined> {
    const [row] = await db.select().from(attachments).where(eq(attachments.id, id));
    return row;
  }

  of(subjectIds: readonly string[], db = this.db): Promise<AttachmentRow[]> {
    return db
      .select()
      .from(attachments)
      .where(inArray(attachments.subjectId, [...subjectIds]))
      .orderBy(asc(attachments.createdAt), asc(attachments.id));
  }

  /** Gives waiting files of an account on a detection their note; answers how many there were. */
  async attach(ids: readonly string[], of: { detectionId: string; userId: string; subjectId: string }, db: Database) {
    const rows = await db
      .update(attachments)
      .set({ subjectId: of.subjectId })
      .where(
        and(
          inArray(attachments.id, [...ids]),
          eq(attachments.detectionId, of.detectionId),
          eq(attachments.uploadedBy, of.userId),
          isNull(attachments.subjectId),
        ),
      )
      .returning({ id: attachments.id });
    return rows.length;
  }

  /** Removes files that went with no note for a day; answers what lies in the file store. */
  async sweep(userId: string, db = this.db): Promise<string[]> {
    const old = sql`now() - interval '1 day'`;
    const rows = await db
      .delete(attachments)
      .where(and(eq(attachments.uploadedBy, userId), isNull(attachments.subjectId), lt(attachments.createdAt, old)))
      .returning({ fileKey: attachments.fileKey });
    return rows.map(({ fileKey }) => fileKey);
  }

  async waiting(userId: string, db = this.db): Promise<number> {
    const [row] = await db
      .select({ count: sql<number>`count(*)::int` })
      .from(attachments)
      .where(and(eq(attachments.uploadedBy, userId), isNull(attachments.subjectId)));
    return row!.count;
  }
}
