import { Inject, Injectable } from '@nestjs/common';
import { catalogues, detections, memberships, runs, surveys, teams } from '@eremite/schema';
import { and, asc, desc, eq, inArray, isNotNull, isNull, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type SurveyRow = typeof surveys.$inferSelect;

@Injectable()
export class SurveysRepository {
  constructor(@Inject(DATABASE) readonly db: Database) {}

  /** Surveys of an account's teams, or one of them, or the deleted ones. */
  async of(userId: string, which: { surveyId?: string; deleted?: boolean } = {}, db = this.db) {
    const published = and(eq(catalogues.surveyId, surveys.id), eq(catalogues.state, 'published'));
    const countDetections = db
      .select({ total: sql<number>`count(*)::int` })
      .from(detections)
      .innerJoin(catalogues, and(eq(catalogues.id, detections.catalogueId), eq(catalogues.state, 'published')))
      .where(eq(detections.surveyId, surveys.id));
    const countCatalogues = db
      .select({ total: sql<number>`count(*)::int` })
      .from(catalogues)
      .where(published);
    return db
      .select({
        survey: surveys,
        teamName: teams.name,
        role: memberships.role,
        detections: sql<number>`(${countDetections})`,
        catalogues: sql<number>`(${countCatalogues})`,
      })
      .from(surveys)
      .innerJoin(teams, eq(teams.id, surveys.teamId))
      .innerJoin(memberships, and(eq(memberships.teamId, teams.id), eq(memberships.userId, userId)))
      .where(
        and(
          which.deleted ? isNotNull(surveys.deletedAt) : isNull(surveys.deletedAt),
          which.surveyId ? eq(surveys.id, which.surveyId) : undefined,
        ),
      )
      .orderBy(asc(surveys.name), asc(surveys.id));
  }

  /** The newest run of each survey. */
  async latestRuns(surveyIds: readonly string[], db = this.db) {
    if (surveyIds.length === 0) return [];
    return db
      .selectDistinctOn([runs.surveyId], {
        surveyId: runs.surveyId,
        id: runs.id,
        number: runs.number,
        state: runs.state,
        finishedAt: runs.finishedAt,
      })
      .from(runs)
      .where(inArray(runs.surveyId, [...surveyIds]))
      .orderBy(runs.surveyId, desc(runs.number));
  }

  async insert(values: typeof surveys.$inferInsert, db = this.db): Promise<SurveyRow> {
    const [row] = await db.insert(surveys).values(values).returning();
    return row!;
  }

  async update(id: string, values: Partial<SurveyRow>, db = this.db): Promise<SurveyRow | undefined> {
    const [row] = await db.update(surveys).set(values).where(eq(surveys.id, id)).returning();
    return row;
  }

  /** The row as it stands, held until the transaction ends. */
  async locked(id: string, db: Database): Promise<SurveyRow | undefined> {
    const [row] = await db.select().from(surveys).where(eq(surveys.id, id)).for('update');
    return row;
  }
}
