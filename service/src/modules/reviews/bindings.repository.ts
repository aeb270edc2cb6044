import {
  assignments,
  bindings,
  catalogues,
  detectionDistances,
  detections,
  doubtWords,
  overrides,
  remarks,
  reviews,
  settlements,
  users,
} from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type BindingRow = typeof bindings.$inferSelect;

/** Which source of a new version of a table people's words belong to. */
@Injectable()
export class BindingsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  /** One at a time in a survey. */
  async lock(surveyId: string, db: Database): Promise<void> {
    await db.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`bindings:${surveyId}`}, 0))`);
  }

  /** Published tables that took the place of another, oldest first. */
  async supersedings(surveyId: string, db = this.db) {
    const rows = await db
      .select({ id: catalogues.id, name: catalogues.name, kind: catalogues.kind, settings: catalogues.settings })
      .from(catalogues)
      .where(and(eq(catalogues.surveyId, surveyId), inArray(catalogues.state, ['published', 'superseded'])))
      .orderBy(asc(catalogues.publishedAt), asc(catalogues.id));
    return rows.flatMap(({ settings, ...row }) => {
      const { supersedes } = settings as { supersedes?: string | null };
      return supersedes ? [{ ...row, supersedes }] : [];
    });
  }

  /** Detections of an earlier list that carry any word and have not been looked for in the new one. */
  detectionsWithWords(catalogueId: string, newId: string, db: Database) {
    const on = (table: typeof reviews | typeof overrides | typeof remarks | typeof doubtWords) =>
      sql`exists (select 1 from ${table} w where w.detection_id = ${detections.id})`;
    return db
      .select({ detection: detections })
      .from(detections)
      .innerJoin(catalogues, eq(catalogues.id, detections.catalogueId))
      .where(
        sql`${detections.catalogueId} = ${catalogueId}
          and (${on(reviews)} or ${on(overrides)} or ${on(remarks)} or ${on(doubtWords)}
            or exists (select 1 from ${settlements} w where w.detection_id = ${detections.id})
            or exists (select 1 from ${assignments} w where w.detection_id = ${detections.id})
            or exists (select 1 from ${detectionDistances} w where w.detection_id = ${detections.id} and w.withdrawn_at is null))
          and not exists (select 1 from ${bindings} b where b.detection_id = ${detections.id} and b.catalogue_id = ${newId} and b.kind = 'detection')`,
      );
  }

  detectionsOf(catalogueId: string, db: Database) {
    return db.select().from(detections).where(eq(detections.catalogueId, catalogueId)).orderBy(asc(detections.row));
  }

  /** Words in force on rows of an earlier table that have not been looked for in the new one. */
  overridesOn(catalogueId: string, newId: string, db = this.db) {
    return db
      .select({ override: overrides, surveyId: detections.surveyId })
      .from(overrides)
      .innerJoin(detections, eq(detections.id, overrides.detectionId))
      .where(
        sql`${overrides.catalogueId} = ${catalogueId} and ${overrides.withdrawnAt} is null
          and not exists (select 1 from ${bindings} b where b.override_id = ${overrides.id} and b.catalogue_id = ${newId})`,
      );
  }

  async insert(values: typeof bindings.$inferInsert, db: Database): Promise<string> {
    const [row] = await db.insert(bindings).values(values).returning({ id: bindings.id });
    return row!.id;
  }

  async find(id: string, db = this.db): Promise<BindingRow | undefined> {
    const [row] = await db.select().from(bindings).where(eq(bindings.id, id));
    return row;
  }

  /** Answers an open question; false where someone else did. */
  async answer(id: string, values: Partial<typeof bindings.$inferInsert>, db: Database): Promise<boolean> {
    const rows = await db
      .update(bindings)
      .set(values)
      .where(and(eq(bindings.id, id), eq(bindings.state, 'open')))
      .returning({ id: bindings.id });
    return rows.length > 0;
  }

  async setSuccessor(id: string, successorId: string, db: Database): Promise<void> {
    await db.update(bindings).set({ successorId }).where(eq(bindings.id, id));
  }

  /** Questions that wait for an answer. */
  open(surveyId: string, db = this.db) {
    return db
      .select({ binding: bindings, catalogueName: catalogues.name, action: overrides.action, by: users.name })
      .from(bindings)
      .innerJoin(catalogues, eq(catalogues.id, bindings.catalogueId))
      .leftJoin(overrides, eq(overrides.id, bindings.overrideId))
      .leftJoin(users, eq(users.id, overrides.createdBy))
      .where(and(eq(bindings.surveyId, surveyId), eq(bindings.state, 'open')))
      .orderBy(asc(bindings.name), asc(bindings.id));
  }

  async detectionAt(catalogueId: string, row: number, db: Database) {
    const [found] = await db
      .select()
      .from(detections)
      .where(and(eq(detections.catalogueId, catalogueId), eq(detections.row, row)));
    return found;
  }

  /** Gives a detection of the new list what was assigned, measured and said of the counterparts of the earlier one. */
  async carryDetection(from: string, to: string, db: Database): Promise<void> {
    await db.execute(sql`insert into ${assignments} (detection_id, user_id)
      select ${to}::uuid, user_id from ${assignments} where detection_id = ${from} on conflict do nothing`);
    await db.execute(sql`insert into ${detectionDistances} (detection_id, distance_mpc, error_mpc, source, note, created_by, created_at)
      select ${to}::uuid, distance_mpc, error_mpc, source, note, created_by, created_at
      from ${detectionDistances} where detection_id = ${from} and withdrawn_at is null`);
    await db.execute(sql`insert into ${overrides} (detection_id, catalogue_id, "row", object_name, ra_deg, dec_deg, action, note, carried_from, created_by, created_at)
      select ${to}::uuid, catalogue_id, "row", object_name, ra_deg, dec_deg, action, note, id, created_by, created_at
      from ${overrides} where detection_id = ${from} and withdrawn_at is null on conflict do nothing`);
    await db.execute(sql`insert into ${doubtWords} (detection_id, run_id, doubt, word, grade, note, carried_from, created_by, created_at)
      select ${to}::uuid, run_id, doubt, word, grade, note, id, created_by, created_at
      from ${doubtWords} where detection_id = ${from} and withdrawn_at is null on conflict do nothing`);
  }

  /** Gives an override its row in the new version of the table. */
  async carryOverride(
    from: typeof overrides.$inferSelect,
    to: { catalogueId: string; row: number; objectName: string },
    db: Database,
  ): Promise<void> {
    const { detectionId, raDeg, decDeg, action, note, createdBy, createdAt, id } = from;
    const word = { detectionId, raDeg, decDeg, action, note, createdBy, createdAt, carriedFrom: id };
    await db
      .insert(overrides)
      .values({ ...word, ...to })
      .onConflictDoNothing();
  }

  async override(id: string, db: Database) {
    const [row] = await db
      .select()
      .from(overrides)
      .where(and(eq(overrides.id, id), isNull(overrides.withdrawnAt)));
    return row;
  }
}
