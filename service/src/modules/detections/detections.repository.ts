import { catalogues, detectionDistances, detections, users } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, desc, eq, inArray, isNull, sql, type SQL } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

export type DetectionRow = typeof detections.$inferSelect;
export interface DetectionFilter {
  surveyId: string;
  search?: string | undefined;
}
const SORTS = {
  name: detections.name,
  row: detections.row,
  raDeg: detections.raDeg,
  decDeg: detections.decDeg,
  velocityKms: detections.velocityKms,
  width50Kms: detections.width50Kms,
  fluxJyKms: detections.fluxJyKms,
  signalToNoise: detections.signalToNoise,
  reliability: detections.reliability,
  distanceMpc: detections.distanceMpc,
} as const;
export const DETECTION_SORTS = Object.keys(SORTS) as (keyof typeof SORTS)[];

@Injectable()
export class DetectionsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  transaction<T>(work: (tx: Database) => Promise<T>): Promise<T> {
    return this.db.transaction((tx) => work(tx as Database));
  }

  /** Detections of published lists, by default in the order they were published and stand in their files. */
  async page(filter: DetectionFilter, sort: string | undefined, limit: number, offset: number, db = this.db) {
    const by = SORTS[sort?.replace(/^-/, '') as keyof typeof SORTS];
    const ordered = by && (sort!.startsWith('-') ? sql`${by} desc nulls last` : sql`${by} asc nulls last`);
    const rows = await db
      .select({ detection: detections })
      .from(detections)
      .innerJoin(catalogues, eq(catalogues.id, detections.catalogueId))
      .where(matching(filter))
      .orderBy(...(ordered ? [ordered] : []), asc(catalogues.publishedAt), asc(catalogues.id), asc(detections.row))
      .limit(limit)
      .offset(offset);
    return rows.map(({ detection }) => detection);
  }

  async positions(surveyId: string, db = this.db) {
    return db
      .select({ name: detections.name, raDeg: detections.raDeg, decDeg: detections.decDeg })
      .from(detections)
      .innerJoin(catalogues, eq(catalogues.id, detections.catalogueId))
      .where(matching({ surveyId }))
      .orderBy(asc(catalogues.publishedAt), asc(catalogues.id), asc(detections.row));
  }

  async count(filter: DetectionFilter, db = this.db): Promise<number> {
    const [row] = await db
      .select({ total: sql<number>`count(*)::int` })
      .from(detections)
      .innerJoin(catalogues, eq(catalogues.id, detections.catalogueId))
      .where(matching(filter));
    return row!.total;
  }

  async find(id: string, db = this.db): Promise<DetectionRow | undefined> {
    const [row] = await db
      .select({ detection: detections })
      .from(detections)
      .innerJoin(catalogues, eq(catalogues.id, detections.catalogueId))
      .where(and(eq(detections.id, id), inArray(catalogues.state, ['published', 'superseded'])));
    return row?.detection;
  }

  /** The distance in force of each detection that a person has given one. */
  async distances(ids: readonly string[], db = this.db) {
    if (ids.length === 0) return [];
    return db
      .selectDistinctOn([detectionDistances.detectionId], { distance: detectionDistances, by: users.name })
      .from(detectionDistances)
      .innerJoin(users, eq(users.id, detectionDistances.createdBy))
      .where(and(inArray(detectionDistances.detectionId, [...ids]), isNull(detectionDistances.withdrawnAt)))
      .orderBy(detectionDistances.detectionId, desc(detectionDistances.createdAt), desc(detectionDistances.id));
  }

  /** Ends the distance in force, if any. */
  async withdrawDistances(detectionId: string, db: Database): Promise<void> {
    await db
      .update(detectionDistances)
      .set({ withdrawnAt: new Date() })
      .where(and(eq(detectionDistances.detectionId, detectionId), isNull(detectionDistances.withdrawnAt)));
  }

  async insertDistance(values: typeof detectionDistances.$inferInsert, db: Database): Promise<void> {
    await db.insert(detectionDistances).values(values);
  }
}

function matching({ surveyId, search }: DetectionFilter): SQL | undefined {
  const named = search ? sql`${detections.name} ilike ${`%${search.replace(/[\\%_]/g, '\\$&')}%`}` : undefined;
  return and(eq(detections.surveyId, surveyId), eq(catalogues.state, 'published'), named);
}
