import { catalogues, detections, intakes } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, desc, eq, ne, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type IntakeRow = typeof intakes.$inferSelect;

@Injectable()
export class IntakesRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  async insert(values: typeof intakes.$inferInsert, db = this.db): Promise<IntakeRow> {
    const [row] = await db.insert(intakes).values(values).returning();
    return row!;
  }

  async find(id: string, db = this.db): Promise<IntakeRow | undefined> {
    const [row] = await db.select().from(intakes).where(eq(intakes.id, id));
    return row;
  }

  /** Newest first, discarded ones left out. */
  async page(surveyId: string, limit: number, offset: number, db = this.db): Promise<IntakeRow[]> {
    return db
      .select()
      .from(intakes)
      .where(kept(surveyId))
      .orderBy(desc(intakes.createdAt), desc(intakes.id))
      .limit(limit)
      .offset(offset);
  }

  async count(surveyId: string, db = this.db): Promise<number> {
    const [row] = await db
      .select({ total: sql<number>`count(*)::int` })
      .from(intakes)
      .where(kept(surveyId));
    return row!.total;
  }

  /**
   * Changes an intake that is still in a state; undefined means it no longer is.
   */
  async change(id: string, from: string, values: Partial<IntakeRow>, db = this.db): Promise<IntakeRow | undefined> {
    const [row] = await db
      .update(intakes)
      .set(values)
      .where(and(eq(intakes.id, id), eq(intakes.state, from)))
      .returning();
    return row;
  }

  /** The newest other table of the survey with the same columns that was published. */
  async sameHeader(surveyId: string, headerHash: string, db = this.db): Promise<IntakeRow | undefined> {
    const same = and(
      eq(intakes.surveyId, surveyId),
      eq(intakes.headerHash, headerHash),
      eq(intakes.state, 'published'),
    );
    const [row] = await db.select().from(intakes).where(same).orderBy(desc(intakes.createdAt)).limit(1);
    return row;
  }

  /** Positions of the survey's detections, [RA, Dec] in degrees. */
  async detectionPlaces(surveyId: string, db = this.db): Promise<[number, number][]> {
    const rows = await db
      .select({ raDeg: detections.raDeg, decDeg: detections.decDeg })
      .from(detections)
      .innerJoin(catalogues, and(eq(catalogues.id, detections.catalogueId), eq(catalogues.state, 'published')))
      .where(eq(detections.surveyId, surveyId))
      .orderBy(asc(detections.catalogueId), asc(detections.row));
    return rows.map(({ raDeg, decDeg }) => [raDeg, decDeg]);
  }

  /** Another table of the survey with the same bytes. */
  async sameContent(surveyId: string, sha256: string, db = this.db): Promise<IntakeRow | undefined> {
    const same = and(kept(surveyId), eq(intakes.sha256, sha256));
    const [row] = await db.select().from(intakes).where(same).orderBy(desc(intakes.createdAt)).limit(1);
    return row;
  }

  /** Starts a catalogue nobody sees yet. */
  async stageCatalogue(values: typeof catalogues.$inferInsert, db = this.db): Promise<string> {
    const [row] = await db.insert(catalogues).values(values).returning({ id: catalogues.id });
    return row!.id;
  }

  /** Makes it seen; false if it is not there to be published. */
  async showCatalogue(id: string, values: Partial<typeof catalogues.$inferInsert>, db = this.db): Promise<boolean> {
    const staged = and(eq(catalogues.id, id), eq(catalogues.state, 'publishing'));
    const rows = await db
      .update(catalogues)
      .set({ ...values, state: 'published' })
      .where(staged)
      .returning({ id: catalogues.id });
    return rows.length === 1;
  }

  /** Whether a catalogue is there to be superseded by one of this survey and kind. */
  async supersedable(id: string, surveyId: string, kind: string, db = this.db): Promise<boolean> {
    const rows = await db
      .select({ id: catalogues.id })
      .from(catalogues)
      .where(inForce(id, surveyId, kind));
    return rows.length === 1;
  }

  /** Takes a catalogue out of use, for its new version; false if it is not there to be. */
  async supersede(id: string, surveyId: string, kind: string, db: Database): Promise<boolean> {
    const rows = await db
      .update(catalogues)
      .set({ state: 'superseded' })
      .where(inForce(id, surveyId, kind))
      .returning({ id: catalogues.id });
    return rows.length === 1;
  }

  async publishedCounts(id: string, db = this.db): Promise<{ rows: number; sidelined: number }> {
    const [row] = await db
      .select({ rows: catalogues.rows, sidelined: catalogues.sidelined })
      .from(catalogues)
      .where(eq(catalogues.id, id));
    return row ?? { rows: 0, sidelined: 0 };
  }

  /** Removes what unfinished attempts at publishing an intake have staged, rows and all. */
  async sweep(intakeId: string, db = this.db): Promise<void> {
    await db.delete(catalogues).where(and(eq(catalogues.intakeId, intakeId), eq(catalogues.state, 'publishing')));
  }
}

const inForce = (id: string, surveyId: string, kind: string) =>
  and(
    eq(catalogues.id, id),
    eq(catalogues.surveyId, surveyId),
    eq(catalogues.kind, kind),
    eq(catalogues.state, 'published'),
  );

const kept = (surveyId: string) => and(eq(intakes.surveyId, surveyId), ne(intakes.state, 'discarded'));
