import { Inject, Injectable } from '@nestjs/common';
import { memberships, personalTokens, sessions, teams, users } from '@eremite/schema';
import { and, asc, count, desc, eq, gt, isNull, lt, ne, or, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type UserRow = typeof users.$inferSelect;

@Injectable()
export class AuthRepository {
  constructor(@Inject(DATABASE) readonly db: Database) {}

  async userByEmail(email: string, db = this.db): Promise<UserRow | undefined> {
    const [row] = await db.select().from(users).where(eq(users.email, email.toLowerCase()));
    return row;
  }

  async user(id: string, db = this.db): Promise<UserRow | undefined> {
    const [row] = await db.select().from(users).where(eq(users.id, id));
    return row;
  }

  async insertUser(values: typeof users.$inferInsert, db = this.db): Promise<UserRow> {
    const [row] = await db.insert(users).values(values).returning();
    return row!;
  }

  async countUsers(db = this.db): Promise<number> {
    const [row] = await db.select({ total: count() }).from(users);
    return Number(row?.total ?? 0);
  }

  async setPassword(userId: string, passwordHash: string, db = this.db): Promise<void> {
    await db.update(users).set({ passwordHash }).where(eq(users.id, userId));
  }

  async teamsOf(userId: string, db = this.db) {
    return db
      .select({ id: teams.id, name: teams.name, role: memberships.role })
      .from(memberships)
      .innerJoin(teams, eq(teams.id, memberships.teamId))
      .where(eq(memberships.userId, userId))
      .orderBy(asc(teams.name));
  }

  async insertSession(values: typeof sessions.$inferInsert, db = this.db): Promise<void> {
    await db.insert(sessions).values(values);
  }

  /** The account of a session that is neither ended nor past its time. */
  async userOfSession(sessionId: string, db = this.db) {
    const [row] = await db
      .select({ user: users, refreshHash: sessions.refreshHash })
      .from(sessions)
      .innerJoin(users, eq(users.id, sessions.userId))
      .where(and(eq(sessions.id, sessionId), isNull(sessions.endedAt), gt(sessions.expiresAt, sql`now()`)));
    return row;
  }

  /** Replaces the refresh token, unless someone was quicker. */
  async rotate(sessionId: string, from: string, to: string, expiresAt: Date, db = this.db): Promise<boolean> {
    const rows = await db
      .update(sessions)
      .set({ refreshHash: to, expiresAt })
      .where(and(eq(sessions.id, sessionId), eq(sessions.refreshHash, from), isNull(sessions.endedAt)))
      .returning({ id: sessions.id });
    return rows.length === 1;
  }

  async endSession(sessionId: string, db = this.db): Promise<void> {
    await db
      .update(sessions)
      .set({ endedAt: sql`now()` })
      .where(eq(sessions.id, sessionId));
  }

  /** All sessions of an account but one. */
  async endOtherSessions(userId: string, keep: string | undefined, db = this.db): Promise<void> {
    const others = keep ? ne(sessions.id, keep) : undefined;
    await db
      .update(sessions)
      .set({ endedAt: sql`now()` })
      .where(and(eq(sessions.userId, userId), isNull(sessions.endedAt), others));
  }

  async insertToken(values: typeof personalTokens.$inferInsert, db = this.db) {
    const [row] = await db.insert(personalTokens).values(values).returning();
    return row!;
  }

  async tokensOf(userId: string, db = this.db) {
    return db
      .select()
      .from(personalTokens)
      .where(and(eq(personalTokens.userId, userId), isNull(personalTokens.revokedAt)))
      .orderBy(desc(personalTokens.createdAt));
  }

  async revokeToken(userId: string, id: string, db = this.db): Promise<boolean> {
    const rows = await db
      .update(personalTokens)
      .set({ revokedAt: sql`now()` })
      .where(and(eq(personalTokens.id, id), eq(personalTokens.userId, userId), isNull(personalTokens.revokedAt)))
      .returning({ id: personalTokens.id });
    return rows.length === 1;
  }

  async tokenByHash(hash: string, db = this.db) {
    const [row] = await db
      .select({ token: personalTokens, user: users })
      .from(personalTokens)
      .innerJoin(users, eq(users.id, personalTokens.userId))
      .where(and(eq(personalTokens.tokenHash, hash), isNull(personalTokens.revokedAt)));
    return row;
  }

  /** Notes the use of a token, once a minute at most. */
  async touchToken(id: string, db = this.db): Promise<void> {
    const stale = or(
      isNull(personalTokens.lastUsedAt),
      lt(personalTokens.lastUsedAt, sql`now() - interval '1 minute'`),
    );
    await db
      .update(personalTokens)
      .set({ lastUsedAt: sql`now()` })
      .where(and(eq(personalTokens.id, id), stale));
  }
}
