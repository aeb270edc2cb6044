import { catalogues, intakes, sidelinedRows } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type CatalogueRow = typeof catalogues.$inferSelect;

/** Runs that read a catalogue; names are written out because columns lose their table in a select of one table. */
const usedByRuns = sql<number>`(select count(*)::int from runs r where r.survey_id = "catalogues"."survey_id"
  and r.inputs @> jsonb_build_array(jsonb_build_object('catalogueId', "catalogues"."id"::text)))`;

@Injectable()
export class CataloguesRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  /** A published or superseded catalogue with the number of runs that used it. */
  async find(id: string, db = this.db) {
    const [row] = await db
      .select({ catalogue: catalogues, usedByRuns })
      .from(catalogues)
      .where(and(eq(catalogues.id, id), inArray(catalogues.state, ['published', 'superseded'])));
    return row;
  }

  /** In the order they were published. */
  async list(surveyId: string, db = this.db) {
    return db
      .select({ catalogue: catalogues, usedByRuns })
      .from(catalogues)
      .where(and(eq(catalogues.surveyId, surveyId), inArray(catalogues.state, ['published', 'superseded'])))
      .orderBy(asc(catalogues.publishedAt), asc(catalogues.id));
  }

  /** Holds the row until the transaction ends, so that no run can begin with it meanwhile. */
  async lock(id: string, db: Database): Promise<void> {
    await db.select({ id: catalogues.id }).from(catalogues).where(eq(catalogues.id, id)).for('update');
  }

  /**
   * Removes a catalogue with its rows; the upload it came from can be published again, and the one it superseded is in
   * use again.
   */
  async remove(id: string, supersedes: string | undefined, db: Database): Promise<void> {
    if (supersedes !== undefined) {
      await db
        .update(catalogues)
        .set({ state: 'published' })
        .where(and(eq(catalogues.id, supersedes), eq(catalogues.state, 'superseded')));
    }
    await db.update(intakes).set({ state: 'staged', catalogueId: null }).where(eq(intakes.catalogueId, id));
    await db.delete(catalogues).where(eq(catalogues.id, id));
  }

  async sidelined(catalogueId: string, limit: number, offset: number, db = this.db) {
    return db
      .select()
      .from(sidelinedRows)
      .where(eq(sidelinedRows.catalogueId, catalogueId))
      .orderBy(asc(sidelinedRows.row))
      .limit(limit)
      .offset(offset);
  }

  async names(ids: readonly string[], db = this.db): Promise<Map<string, string>> {
    if (ids.length === 0) return new Map();
    const rows = await db
      .select({ id: catalogues.id, name: catalogues.name })
      .from(catalogues)
      .where(inArray(catalogues.id, [...ids]));
    return new Map(rows.map(({ id, name }) => [id, name]));
  }
}
