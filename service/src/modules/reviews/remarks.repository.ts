import { memberships, notePhrases, remarks, users } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, desc, eq, inArray, isNull } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

/** Remarks, and the phrases a team keeps for its notes. */
@Injectable()
export class RemarksRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  list(detectionIds: readonly string[], db = this.db) {
    return db
      .select({
        id: remarks.id,
        detectionId: remarks.detectionId,
        createdById: remarks.authorId,
        author: users.name,
        text: remarks.text,
        mentions: remarks.mentions,
        createdAt: remarks.createdAt,
      })
      .from(remarks)
      .innerJoin(users, eq(users.id, remarks.authorId))
      .where(inArray(remarks.detectionId, [...detectionIds]))
      .orderBy(desc(remarks.createdAt), desc(remarks.id));
  }

  async insert(values: typeof remarks.$inferInsert, db: Database): Promise<string> {
    const [row] = await db.insert(remarks).values(values).returning({ id: remarks.id });
    return row!.id;
  }

  /** Members of a team by id, with the addresses of those who still have an account. */
  members(teamId: string, ids: readonly string[], db = this.db) {
    return db
      .select({ userId: users.id, name: users.name, email: users.email })
      .from(memberships)
      .innerJoin(users, eq(users.id, memberships.userId))
      .where(and(eq(memberships.teamId, teamId), inArray(users.id, [...ids]), isNull(users.disabledAt)));
  }

  names(ids: readonly string[], db = this.db) {
    return db
      .select({ userId: users.id, name: users.name })
      .from(users)
      .where(inArray(users.id, [...ids]));
  }

  async phrases(teamId: string, db = this.db): Promise<string[] | undefined> {
    const [row] = await db.select().from(notePhrases).where(eq(notePhrases.teamId, teamId));
    return row?.phrases as string[] | undefined;
  }

  async setPhrases(teamId: string, phrases: readonly string[], db = this.db): Promise<void> {
    await db
      .insert(notePhrases)
      .values({ teamId, phrases })
      .onConflictDoUpdate({ target: notePhrases.teamId, set: { phrases } });
  }
}
