import { Inject, Injectable } from '@nestjs/common';
import { memberships, surveys } from '@eremite/schema';
import { and, eq, isNull } from 'drizzle-orm';
import { DATABASE, type Database } from '../database/database.ts';

@Injectable()
export class AccessRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  /** The survey and the account's role in its team; undefined when there is no such survey or no membership. */
  async survey(userId: string, surveyId: string, db = this.db) {
    const [found] = await db
      .select({ survey: surveys, role: memberships.role })
      .from(surveys)
      .innerJoin(memberships, and(eq(memberships.teamId, surveys.teamId), eq(memberships.userId, userId)))
      .where(and(eq(surveys.id, surveyId), isNull(surveys.deletedAt)));
    return found;
  }

  async role(userId: string, teamId: string, db = this.db): Promise<string | undefined> {
    const [found] = await db
      .select({ role: memberships.role })
      .from(memberships)
      .where(and(eq(memberships.teamId, teamId), eq(memberships.userId, userId)));
    return found?.role;
  }
}
