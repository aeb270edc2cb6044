import {
  catalogues,
  criteria,
  detections,
  editionEntries,
  editions,
  evidence,
  intakes,
  ledger,
  runs,
  surveys,
  teams,
  users,
  verdicts,
} from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, desc, eq, gt, inArray } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type EditionRow = NonNullable<Awaited<ReturnType<EditionsRepository['find']>>>;
/** Detections read at a time: evidence is large. */
export const BLOCK = 100;

@Injectable()
export class EditionsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  #select(db: Database) {
    return db
      .select({
        id: editions.id,
        surveyId: editions.surveyId,
        number: editions.number,
        runId: editions.runId,
        state: editions.state,
        error: editions.error,
        note: editions.note,
        head: editions.head,
        supersedesId: editions.supersedesId,
        jobId: editions.jobId,
        fileKey: editions.fileKey,
        bytes: editions.bytes,
        sha256: editions.sha256,
        createdBy: users.name,
        createdById: editions.createdBy,
        createdAt: editions.createdAt,
        entries: db.$count(editionEntries, eq(editionEntries.editionId, editions.id)),
      })
      .from(editions)
      .innerJoin(users, eq(users.id, editions.createdBy));
  }

  async find(id: string, db = this.db) {
    const [row] = await this.#select(db).where(eq(editions.id, id));
    return row;
  }

  /** Newest first. */
  list(surveyId: string, db = this.db) {
    return this.#select(db).where(eq(editions.surveyId, surveyId)).orderBy(desc(editions.number));
  }

  /** Number and id of the editions of a survey that are not failed, oldest first. */
  numbers(surveyId: string, db = this.db) {
    return db
      .select({ id: editions.id, number: editions.number, state: editions.state, supersedesId: editions.supersedesId })
      .from(editions)
      .where(eq(editions.surveyId, surveyId))
      .orderBy(asc(editions.number));
  }

  /** Waits for whoever else freezes an edition of the survey. */
  async lockSurvey(surveyId: string, db: Database): Promise<void> {
    await db.select({ id: surveys.id }).from(surveys).where(eq(surveys.id, surveyId)).for('update');
  }

  async insert(values: typeof editions.$inferInsert, db: Database): Promise<string> {
    const [row] = await db.insert(editions).values(values).returning({ id: editions.id });
    return row!.id;
  }

  async insertEntries(rows: (typeof editionEntries.$inferInsert)[], db: Database): Promise<void> {
    for (let from = 0; from < rows.length; from += 500) {
      await db.insert(editionEntries).values(rows.slice(from, from + 500));
    }
  }

  /** Ends the packing of an edition; one that is frozen already stays as it is. */
  async finish(id: string, values: Partial<typeof editions.$inferInsert>, db = this.db): Promise<boolean> {
    const rows = await db
      .update(editions)
      .set(values)
      .where(and(eq(editions.id, id), eq(editions.state, 'packing')))
      .returning({ id: editions.id });
    return rows.length > 0;
  }

  async setJob(id: string, jobId: string, db: Database): Promise<void> {
    await db.update(editions).set({ jobId }).where(eq(editions.id, id));
  }

  /** Entries from a place on, with what the run found. */
  block(editionId: string, runId: string, afterRank: number, db = this.db) {
    return db
      .select({
        rank: editionEntries.rank,
        detectionId: editionEntries.detectionId,
        words: editionEntries.words,
        item: verdicts.item,
        detail: verdicts.detail,
      })
      .from(editionEntries)
      .innerJoin(verdicts, and(eq(verdicts.runId, runId), eq(verdicts.detectionId, editionEntries.detectionId)))
      .where(and(eq(editionEntries.editionId, editionId), gt(editionEntries.rank, afterRank)))
      .orderBy(asc(editionEntries.rank))
      .limit(BLOCK);
  }

  async entry(editionId: string, runId: string, detectionId: string, db = this.db) {
    const [row] = await db
      .select({
        rank: editionEntries.rank,
        detectionId: editionEntries.detectionId,
        words: editionEntries.words,
        item: verdicts.item,
        detail: verdicts.detail,
      })
      .from(editionEntries)
      .innerJoin(verdicts, and(eq(verdicts.runId, runId), eq(verdicts.detectionId, editionEntries.detectionId)))
      .where(and(eq(editionEntries.editionId, editionId), eq(editionEntries.detectionId, detectionId)));
    return row;
  }

  /** Packed candidates and neighbours of some detections. */
  evidence(runId: string, detectionIds: readonly string[], db = this.db) {
    return db
      .select({
        detectionId: evidence.detectionId,
        candidates: evidence.candidates,
        neighbours: evidence.neighbours,
      })
      .from(evidence)
      .where(and(eq(evidence.runId, runId), inArray(evidence.detectionId, [...detectionIds])));
  }

  /** Whole verdicts of a run in input order, from a place on. */
  results(runId: string, afterPosition: number, db = this.db) {
    return db
      .select({
        position: verdicts.position,
        catalogueId: detections.catalogueId,
        row: detections.row,
        item: verdicts.item,
        detail: verdicts.detail,
        candidates: evidence.candidates,
        neighbours: evidence.neighbours,
      })
      .from(verdicts)
      .innerJoin(detections, eq(detections.id, verdicts.detectionId))
      .innerJoin(evidence, and(eq(evidence.runId, verdicts.runId), eq(evidence.detectionId, verdicts.detectionId)))
      .where(and(eq(verdicts.runId, runId), gt(verdicts.position, afterPosition)))
      .orderBy(asc(verdicts.position))
      .limit(BLOCK);
  }

  /** What a run was done with, for the head of an edition. */
  async run(runId: string, db = this.db) {
    const [row] = await db
      .select({
        number: runs.number,
        surveyId: runs.surveyId,
        state: runs.state,
        inputs: runs.inputs,
        inputHash: runs.inputHash,
        decisions: runs.decisions,
        codeVersion: runs.codeVersion,
        counts: runs.counts,
        control: runs.control,
        notes: runs.notes,
        startedBy: users.name,
        criteriaId: criteria.id,
        criteriaNumber: criteria.number,
        criteriaNote: criteria.note,
        criteriaSettings: criteria.settings,
      })
      .from(runs)
      .innerJoin(criteria, eq(criteria.id, runs.criteriaId))
      .innerJoin(users, eq(users.id, runs.createdBy))
      .where(eq(runs.id, runId));
    return row;
  }

  /** Tables with the uploads they were read from, by id. */
  async tables(ids: readonly string[], db = this.db) {
    const rows = await db
      .select({
        id: catalogues.id,
        name: catalogues.name,
        kind: catalogues.kind,
        fileName: catalogues.fileName,
        rows: catalogues.rows,
        withVelocity: catalogues.withVelocity,
        sha256: catalogues.sha256,
        contentHash: catalogues.contentHash,
        reference: catalogues.reference,
        coverage: catalogues.coverage,
        settings: intakes.settings,
        fileKey: intakes.fileKey,
        companions: intakes.companions,
      })
      .from(catalogues)
      .innerJoin(intakes, eq(intakes.id, catalogues.intakeId))
      .where(inArray(catalogues.id, [...ids]));
    return new Map(rows.map((row) => [row.id, row]));
  }

  async teamName(surveyId: string, db = this.db): Promise<string> {
    const [row] = await db
      .select({ name: teams.name })
      .from(surveys)
      .innerJoin(teams, eq(teams.id, surveys.teamId))
      .where(eq(surveys.id, surveyId));
    return row?.name ?? '';
  }

  async ledgerHead(surveyId: string, db = this.db): Promise<{ number: number; hash: string }> {
    const [row] = await db
      .select({ number: ledger.number, hash: ledger.hash })
      .from(ledger)
      .where(eq(ledger.surveyId, surveyId))
      .orderBy(desc(ledger.number))
      .limit(1);
    return row ?? { number: 0, hash: '' };
  }

  /** Lines of the ledger up to a number, oldest first, from a place on. */
  ledgerLines(surveyId: string, after: number, upTo: number, db = this.db) {
    return db
      .select()
      .from(ledger)
      .where(and(eq(ledger.surveyId, surveyId), gt(ledger.number, after)))
      .orderBy(asc(ledger.number))
      .limit(Math.max(0, Math.min(1000, upTo - after)));
  }
}
