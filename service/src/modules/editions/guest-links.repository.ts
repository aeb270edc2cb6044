import { guestLinks, users } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, desc, eq, isNull } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

@Injectable()
export class GuestLinksRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  #select(db: Database) {
    return db
      .select({
        id: guestLinks.id,
        editionId: guestLinks.editionId,
        label: guestLinks.label,
        createdBy: users.name,
        createdAt: guestLinks.createdAt,
        expiresAt: guestLinks.expiresAt,
        revokedAt: guestLinks.revokedAt,
        lastUsedAt: guestLinks.lastUsedAt,
      })
      .from(guestLinks)
      .innerJoin(users, eq(users.id, guestLinks.createdBy));
  }

  /** Newest first. */
  list(editionId: string, db = this.db) {
    return this.#select(db).where(eq(guestLinks.editionId, editionId)).orderBy(desc(guestLinks.createdAt));
  }

  async find(id: string, db = this.db) {
    const [row] = await this.#select(db).where(eq(guestLinks.id, id));
    return row;
  }

  async byHash(tokenHash: string, db = this.db) {
    const [row] = await this.#select(db).where(eq(guestLinks.tokenHash, tokenHash));
    return row;
  }

  async insert(values: typeof guestLinks.$inferInsert, db: Database): Promise<string> {
    const [row] = await db.insert(guestLinks).values(values).returning({ id: guestLinks.id });
    return row!.id;
  }

  async revoke(id: string, db: Database): Promise<boolean> {
    const open = and(eq(guestLinks.id, id), isNull(guestLinks.revokedAt));
    const rows = await db
      .update(guestLinks)
      .set({ revokedAt: new Date() })
      .where(open)
      .returning({ id: guestLinks.id });
    return rows.length > 0;
  }

  async touch(id: string, db = this.db): Promise<void> {
    await db.update(guestLinks).set({ lastUsedAt: new Date() }).where(eq(guestLinks.id, id));
  }
}
