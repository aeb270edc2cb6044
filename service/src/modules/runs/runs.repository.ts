import {
  catalogues,
  criteria,
  detectionDistances,
  detections,
  evidence,
  overrides,
  runs,
  surveys,
  users,
  verdicts,
} from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, desc, eq, inArray, isNull, ne, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

const columns = {
  id: runs.id,
  surveyId: runs.surveyId,
  number: runs.number,
  state: runs.state,
  jobId: runs.jobId,
  criteriaId: runs.criteriaId,
  criteriaNumber: criteria.number,
  criteriaSettings: criteria.settings,
  inputs: runs.inputs,
  inputHash: runs.inputHash,
  decisions: runs.decisions,
  counts: runs.counts,
  control: runs.control,
  notes: runs.notes,
  learnt: runs.learnt,
  error: runs.error,
  createdBy: users.name,
  createdById: runs.createdBy,
  startedAt: runs.startedAt,
  finishedAt: runs.finishedAt,
  createdAt: runs.createdAt,
};
export type RunRow = NonNullable<Awaited<ReturnType<RunsRepository['find']>>>;

@Injectable()
export class RunsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  #select(db: Database) {
    return db
      .select(columns)
      .from(runs)
      .innerJoin(criteria, eq(criteria.id, runs.criteriaId))
      .innerJoin(users, eq(users.id, runs.createdBy));
  }

  async find(id: string, db = this.db) {
    const [row] = await this.#select(db).where(eq(runs.id, id));
    return row;
  }

  list(surveyId: string, db = this.db) {
    return this.#select(db).where(eq(runs.surveyId, surveyId)).orderBy(desc(runs.number));
  }

  async latestDone(surveyId: string, db = this.db) {
    const [row] = await this.#select(db)
      .where(and(eq(runs.surveyId, surveyId), eq(runs.state, 'done')))
      .orderBy(desc(runs.number))
      .limit(1);
    return row;
  }

  /** Stores the next number; the survey is locked, so that two at once take turns. */
  async insert(values: Omit<typeof runs.$inferInsert, 'number'>, db: Database) {
    await db.select({ id: surveys.id }).from(surveys).where(eq(surveys.id, values.surveyId)).for('update');
    const number = sql`(select coalesce(max(number), 0) + 1 from runs where survey_id = ${values.surveyId})`;
    const [row] = await db
      .insert(runs)
      .values({ ...values, number: number as unknown as number })
      .returning({ id: runs.id, number: runs.number });
    return row!;
  }

  async update(id: string, values: Partial<typeof runs.$inferInsert>, db = this.db): Promise<void> {
    await db.update(runs).set(values).where(eq(runs.id, id));
  }

  /** Begins an attempt on a clean table; false where the run is done, since then it is never touched again. */
  async begin(id: string): Promise<boolean> {
    return this.reopen(id, { state: 'running', startedAt: new Date(), error: null });
  }

  /** Gives an unfinished run another state and removes what it staged; false where it is done. */
  async reopen(id: string, values: Partial<typeof runs.$inferInsert>): Promise<boolean> {
    return this.transaction(async (tx) => {
      const rows = await tx
        .update(runs)
        .set(values)
        .where(and(eq(runs.id, id), ne(runs.state, 'done')))
        .returning({ id: runs.id });
      if (rows.length === 0) return false;
      await tx.delete(evidence).where(eq(evidence.runId, id));
      await tx.delete(verdicts).where(eq(verdicts.runId, id));
      return true;
    });
  }

  /** Published tables a run was started with, those superseded meanwhile among them. */
  cataloguesOfRun(surveyId: string, ids: readonly string[], db = this.db) {
    return this.publishedCatalogues(surveyId, ids, db, ['published', 'superseded']);
  }

  /** Published tables of a survey in the order they were published. */
  publishedCatalogues(surveyId: string, ids: readonly string[] | undefined, db = this.db, states = ['published']) {
    return db
      .select()
      .from(catalogues)
      .where(
        and(
          eq(catalogues.surveyId, surveyId),
          inArray(catalogues.state, states),
          ids ? inArray(catalogues.id, [...ids]) : undefined,
        ),
      )
      .orderBy(asc(catalogues.publishedAt), asc(catalogues.id));
  }

  async survey(id: string, db = this.db) {
    const [row] = await db.select().from(surveys).where(eq(surveys.id, id));
    return row;
  }

  /** Overrides in force, by the identity of the two sources they join. */
  overridesInForce(surveyId: string, db = this.db) {
    return db
      .select({
        detectionCatalogueId: detections.catalogueId,
        detectionRow: detections.row,
        catalogueId: overrides.catalogueId,
        row: overrides.row,
        action: overrides.action,
      })
      .from(overrides)
      .innerJoin(detections, eq(detections.id, overrides.detectionId))
      .where(and(eq(detections.surveyId, surveyId), isNull(overrides.withdrawnAt)))
      .orderBy(asc(overrides.createdAt), asc(overrides.id));
  }

  /** Distances given by people, the newest of each detection. */
  distancesInForce(surveyId: string, db = this.db) {
    return db
      .selectDistinctOn([detectionDistances.detectionId], {
        detectionCatalogueId: detections.catalogueId,
        detectionRow: detections.row,
        distanceMpc: detectionDistances.distanceMpc,
        errorMpc: detectionDistances.errorMpc,
        source: detectionDistances.source,
      })
      .from(detectionDistances)
      .innerJoin(detections, eq(detections.id, detectionDistances.detectionId))
      .where(and(eq(detections.surveyId, surveyId), isNull(detectionDistances.withdrawnAt)))
      .orderBy(detectionDistances.detectionId, desc(detectionDistances.createdAt));
  }

  /** (catalogue, row) to id of the detections of some tables. */
  detectionIds(catalogueIds: readonly string[], db = this.db) {
    return db
      .select({ id: detections.id, catalogueId: detections.catalogueId, row: detections.row, name: detections.name })
      .from(detections)
      .where(inArray(detections.catalogueId, [...catalogueIds]));
  }

  /** Where some detections of a survey stand; those of other surveys are absent. */
  detectionPlaces(surveyId: string, ids: readonly string[], db = this.db) {
    const { id, catalogueId, row, raDeg, decDeg } = detections;
    return db
      .select({ id, catalogueId, row, raDeg, decDeg })
      .from(detections)
      .where(and(eq(detections.surveyId, surveyId), inArray(detections.id, [...ids])));
  }
}
