import { Inject, Injectable } from '@nestjs/common';
import { invitations, memberships, teams, users } from '@eremite/schema';
import { and, asc, count, desc, eq, isNull, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

@Injectable()
export class TeamsRepository {
  constructor(@Inject(DATABASE) readonly db: Database) {}

  /** Teams of an account with its role; `all` adds those it is no member of. */
  async teams(userId: string, all: boolean, db = this.db) {
    const mine = and(eq(memberships.teamId, teams.id), eq(memberships.userId, userId));
    const members = sql<number>`(select count(*)::int from ${memberships} m where m.team_id = ${teams.id})`;
    const found = db.select({ id: teams.id, name: teams.name, role: memberships.role, members }).from(teams);
    return all
      ? found.leftJoin(memberships, mine).orderBy(asc(teams.name))
      : found.innerJoin(memberships, mine).orderBy(asc(teams.name));
  }

  async team(teamId: string, db = this.db) {
    const [row] = await db.select().from(teams).where(eq(teams.id, teamId));
    return row;
  }

  async insertTeam(name: string, db = this.db): Promise<string> {
    const [row] = await db.insert(teams).values({ name }).returning({ id: teams.id });
    return row!.id;
  }

  async members(teamId: string, db = this.db) {
    return db
      .select({ userId: users.id, name: users.name, email: users.email, role: memberships.role })
      .from(memberships)
      .innerJoin(users, eq(users.id, memberships.userId))
      .where(eq(memberships.teamId, teamId))
      .orderBy(asc(users.name), asc(users.id));
  }

  async join(teamId: string, userId: string, role: string, db = this.db): Promise<void> {
    await db
      .insert(memberships)
      .values({ teamId, userId, role })
      .onConflictDoUpdate({ target: [memberships.teamId, memberships.userId], set: { role } });
  }

  async leave(teamId: string, userId: string, db = this.db): Promise<void> {
    await db.delete(memberships).where(and(eq(memberships.teamId, teamId), eq(memberships.userId, userId)));
  }

  /** Makes changes to one team's members wait for each other until the transaction ends. */
  async lock(teamId: string, db: Database): Promise<void> {
    await db.select({ id: teams.id }).from(teams).where(eq(teams.id, teamId)).for('update');
  }

  async countLeads(teamId: string, db = this.db): Promise<number> {
    const [row] = await db
      .select({ total: count() })
      .from(memberships)
      .innerJoin(users, eq(users.id, memberships.userId))
      .where(and(eq(memberships.teamId, teamId), eq(memberships.role, 'lead'), isNull(users.disabledAt)));
    return Number(row?.total ?? 0);
  }

  async invitations(teamId: string, db = this.db) {
    return db.select().from(invitations).where(eq(invitations.teamId, teamId)).orderBy(desc(invitations.createdAt));
  }

  /** A later invitation of the same address takes the place of an open one. */
  async invite(values: typeof invitations.$inferInsert, db = this.db) {
    const open = and(
      eq(invitations.teamId, values.teamId),
      eq(invitations.email, values.email),
      isNull(invitations.acceptedAt),
    );
    await db.delete(invitations).where(open);
    const [row] = await db.insert(invitations).values(values).returning();
    return row!;
  }

  async revoke(teamId: string, id: string, db = this.db): Promise<string | undefined> {
    const [row] = await db
      .delete(invitations)
      .where(and(eq(invitations.id, id), eq(invitations.teamId, teamId), isNull(invitations.acceptedAt)))
      .returning({ email: invitations.email });
    return row?.email;
  }

  /** An invitation that can still be accepted. */
  async invitationByHash(hash: string, db = this.db) {
    const [row] = await db
      .select({ invitation: invitations, teamName: teams.name })
      .from(invitations)
      .innerJoin(teams, eq(teams.id, invitations.teamId))
      .where(
        and(eq(invitations.tokenHash, hash), isNull(invitations.acceptedAt), sql`${invitations.expiresAt} > now()`),
      );
    return row;
  }

  /** False when someone accepted it a moment ago. */
  async accept(id: string, db = this.db): Promise<boolean> {
    const rows = await db
      .update(invitations)
      .set({ acceptedAt: sql`now()` })
      .where(and(eq(invitations.id, id), isNull(invitations.acceptedAt)))
      .returning({ id: invitations.id });
    return rows.length === 1;
  }

  /** Teams an account leads. */
  async ledBy(userId: string, db = this.db): Promise<string[]> {
    const rows = await db
      .select({ teamId: memberships.teamId })
      .from(memberships)
      .where(and(eq(memberships.userId, userId), eq(memberships.role, 'lead')));
    return rows.map((row) => row.teamId);
  }
}
