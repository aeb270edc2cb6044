import { catalogues, detections, observations, users } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, eq, inArray } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

const { channels: _, ...WITHOUT_CHANNELS } = {
  id: observations.id,
  detectionId: observations.detectionId,
  kind: observations.kind,
  label: observations.label,
  fileName: observations.fileName,
  bytes: observations.bytes,
  sha256: observations.sha256,
  fileKey: observations.fileKey,
  facts: observations.facts,
  channels: observations.channels,
  uploadedBy: observations.uploadedBy,
  createdAt: observations.createdAt,
};
const LISTED = { row: WITHOUT_CHANNELS, detection: detections, by: users.name };

/** Images and spectra of detections. */
@Injectable()
export class ObservationsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  async of(detectionId: string, db = this.db) {
    return db
      .select(LISTED)
      .from(observations)
      .innerJoin(detections, eq(detections.id, observations.detectionId))
      .innerJoin(users, eq(users.id, observations.uploadedBy))
      .where(eq(observations.detectionId, detectionId))
      .orderBy(asc(observations.kind), asc(observations.createdAt), asc(observations.id));
  }

  async find(id: string, db = this.db) {
    const [found] = await db
      .select(LISTED)
      .from(observations)
      .innerJoin(detections, eq(detections.id, observations.detectionId))
      .innerJoin(users, eq(users.id, observations.uploadedBy))
      .where(eq(observations.id, id));
    return found;
  }

  async channels(id: string, db = this.db): Promise<unknown> {
    const [row] = await db
      .select({ channels: observations.channels })
      .from(observations)
      .where(eq(observations.id, id));
    return row?.channels ?? null;
  }

  /** The same file of the same detection, if it is there already. */
  async same(detectionId: string, sha256: string, db = this.db): Promise<string | undefined> {
    const [row] = await db
      .select({ id: observations.id })
      .from(observations)
      .where(and(eq(observations.detectionId, detectionId), eq(observations.sha256, sha256)));
    return row?.id;
  }

  async insert(values: typeof observations.$inferInsert, db: Database): Promise<string> {
    const [row] = await db.insert(observations).values(values).returning({ id: observations.id });
    return row!.id;
  }

  async remove(id: string, db: Database): Promise<void> {
    await db.delete(observations).where(eq(observations.id, id));
  }

  /** Detections of the published lists of a survey. */
  async detections(surveyId: string, db = this.db) {
    const rows = await db
      .select({ detection: detections })
      .from(detections)
      .innerJoin(catalogues, eq(catalogues.id, detections.catalogueId))
      .where(and(eq(detections.surveyId, surveyId), eq(catalogues.state, 'published')))
      .orderBy(asc(detections.name), asc(detections.id));
    return rows.map(({ detection }) => detection);
  }

  async detection(id: string, db = this.db) {
    const [row] = await db
      .select({ detection: detections })
      .from(detections)
      .innerJoin(catalogues, eq(catalogues.id, detections.catalogueId))
      .where(and(eq(detections.id, id), inArray(catalogues.state, ['published', 'superseded'])));
    return row?.detection;
  }
}
export type ListedObservation = NonNullable<Awaited<ReturnType<ObservationsRepository['find']>>>;
export type ObservedDetection = typeof detections.$inferSelect;
