import { Inject, Injectable } from '@nestjs/common';
import { catalogues, jobs, memberships, sessions, users } from '@eremite/schema';
import { asc, count, eq, sql } from 'drizzle-orm';
import { DATABASE, type Database, rowsOf } from '../../database/database.ts';

@Injectable()
export class AdminRepository {
  constructor(@Inject(DATABASE) readonly db: Database) {}

  async accounts(limit: number, offset: number, db = this.db) {
    const teamCount = sql<number>`(select count(*)::int from ${memberships} m where m.user_id = ${users.id})`;
    const [rows, [total]] = await Promise.all([
      db.select({ user: users, teams: teamCount }).from(users).orderBy(asc(users.email)).limit(limit).offset(offset),
      db.select({ total: count() }).from(users),
    ]);
    return { rows, total: Number(total?.total ?? 0) };
  }

  async account(id: string, db = this.db) {
    const teamCount = sql<number>`(select count(*)::int from ${memberships} m where m.user_id = ${users.id})`;
    const [row] = await db.select({ user: users, teams: teamCount }).from(users).where(eq(users.id, id));
    return row;
  }

  /** Disabling ends the account's sessions too. */
  async setDisabled(id: string, disabled: boolean, db = this.db): Promise<void> {
    await db.transaction(async (tx) => {
      await tx
        .update(users)
        .set({ disabledAt: disabled ? sql`now()` : null })
        .where(eq(users.id, id));
      if (disabled)
        await tx
          .update(sessions)
          .set({ endedAt: sql`now()` })
          .where(eq(sessions.userId, id));
    });
  }

  async countJobs(db = this.db): Promise<number> {
    const [row] = await db.select({ total: count() }).from(jobs);
    return Number(row?.total ?? 0);
  }

  async storage(db = this.db) {
    const [database] = rowsOf<{ bytes: number | string }>(
      await db.execute(sql`select pg_database_size(current_database())::float8 as bytes`),
    );
    const [tileBytes] = rowsOf<{ bytes: number | string }>(
      await db.execute(sql`select pg_total_relation_size('tiles')::float8 as bytes`),
    );
    const [published] = await db
      .select({
        catalogues: sql<number>`count(*)::int`,
        rows: sql<number>`coalesce(sum(${catalogues.rows}), 0)::float8`,
      })
      .from(catalogues)
      .where(eq(catalogues.state, 'published'));
    return {
      databaseBytes: Number(database?.bytes ?? 0),
      tileBytes: Number(tileBytes?.bytes ?? 0),
      catalogues: published?.catalogues ?? 0,
      catalogueRows: Number(published?.rows ?? 0),
    };
  }
}
