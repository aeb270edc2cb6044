import { assignments, detections, evidence, overrides, reviews, settlements, users, verdicts } from '@eremite/schema';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, desc, eq, gte, inArray, isNull, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';
import {
  disagreement,
  likelyDark,
  maySee,
  movedFor,
  orderVerdicts,
  type VerdictFilter,
  whereVerdict,
} from './verdict-filter.repository.ts';

@Injectable()
export class VerdictsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  page(
    runId: string,
    filter: VerdictFilter,
    page: { sort?: string | undefined; limit: number; offset: number },
    db = this.db,
  ) {
    return db
      .select({ detectionId: verdicts.detectionId, item: verdicts.item })
      .from(verdicts)
      .where(whereVerdict(runId, filter))
      .orderBy(...orderVerdicts(page.sort, filter.viewer))
      .limit(page.limit)
      .offset(page.offset);
  }

  /** Ids of the detections of a run that a filter lets through, in order. */
  async ids(runId: string, filter: VerdictFilter, sort: string | undefined, db = this.db): Promise<string[]> {
    const rows = await db
      .select({ id: verdicts.detectionId })
      .from(verdicts)
      .where(whereVerdict(runId, filter))
      .orderBy(...orderVerdicts(sort));
    return rows.map((row) => row.id);
  }

  async count(runId: string, filter: VerdictFilter = {}, db = this.db): Promise<number> {
    const [row] = await db
      .select({ count: sql<number>`count(*)::int` })
      .from(verdicts)
      .where(whereVerdict(runId, filter));
    return row!.count;
  }

  /** The two words of a verdict, without the evidence behind it. */
  async words(runId: string, detectionId: string, db = this.db) {
    const [row] = await db
      .select({ starlight: verdicts.starlight, surroundings: verdicts.surroundings })
      .from(verdicts)
      .where(and(eq(verdicts.runId, runId), eq(verdicts.detectionId, detectionId)));
    return row;
  }

  async find(runId: string, detectionId: string, db = this.db) {
    const [row] = await db
      .select({
        item: verdicts.item,
        detail: verdicts.detail,
        candidates: evidence.candidates,
        neighbours: evidence.neighbours,
      })
      .from(verdicts)
      .innerJoin(evidence, and(eq(evidence.runId, verdicts.runId), eq(evidence.detectionId, verdicts.detectionId)))
      .where(and(eq(verdicts.runId, runId), eq(verdicts.detectionId, detectionId)));
    return row;
  }

  /** Packed evidence in input order from a place on, for the flat lists. */
  evidence(
    runId: string,
    which: 'candidates' | 'neighbours',
    page: { limit: number; from: number },
    detectionId?: string,
    db = this.db,
  ) {
    const { position, name } = verdicts;
    return db
      .select({ detectionId: verdicts.detectionId, position, name, packed: evidence[which] })
      .from(verdicts)
      .innerJoin(evidence, and(eq(evidence.runId, verdicts.runId), eq(evidence.detectionId, verdicts.detectionId)))
      .where(
        and(
          eq(verdicts.runId, runId),
          gte(position, page.from),
          detectionId ? eq(verdicts.detectionId, detectionId) : undefined,
        ),
      )
      .orderBy(asc(position))
      .limit(page.limit);
  }

  /** What people said since: settlements, reviews and overrides of some detections. */
  async said(detectionIds: readonly string[], db = this.db) {
    if (detectionIds.length === 0) return { settled: [], reviews: [], overrides: [], assigned: [] };
    const ids = [...detectionIds];
    const settled = await db
      .select({
        detectionId: settlements.detectionId,
        starlight: settlements.starlight,
        surroundings: settlements.surroundings,
        outcome: settlements.outcome,
        note: settlements.note,
        moved: settlements.moved,
        by: users.name,
      })
      .from(settlements)
      .innerJoin(users, eq(users.id, settlements.settledBy))
      .where(and(inArray(settlements.detectionId, ids), isNull(settlements.supersededAt)));
    const reviewed = await db
      .select({ detectionId: reviews.detectionId, runId: reviews.runId, reviewerId: reviews.reviewerId })
      .from(reviews)
      .where(and(inArray(reviews.detectionId, ids), isNull(reviews.supersededAt)));
    const overridden = await db
      .select({
        detectionId: overrides.detectionId,
        catalogueId: overrides.catalogueId,
        row: overrides.row,
        action: overrides.action,
      })
      .from(overrides)
      .where(and(inArray(overrides.detectionId, ids), isNull(overrides.withdrawnAt)));
    const assigned = await db
      .select({ detectionId: assignments.detectionId, name: users.name })
      .from(assignments)
      .innerJoin(users, eq(users.id, assignments.userId))
      .where(inArray(assignments.detectionId, ids));
    return { settled, reviews: reviewed, overrides: overridden, assigned };
  }

  /** What the docket tells an account of some detections besides their verdicts. */
  async docketFacts(
    runId: string,
    detectionIds: readonly string[],
    of: { userId: string; sees: string },
    db = this.db,
  ) {
    if (detectionIds.length === 0) return [];
    const moved = sql<unknown>`${movedFor(of.userId)}`;
    return db
      .select({
        detectionId: verdicts.detectionId,
        seen: sql<boolean>`${maySee(of.sees)}`,
        disagreement: sql<boolean>`${disagreement(of.sees)}`,
        moved,
      })
      .from(verdicts)
      .where(and(eq(verdicts.runId, runId), inArray(verdicts.detectionId, [...detectionIds])));
  }

  /** One mark a detection of the survey, with its verdict in a run where there is one. */
  marks(surveyId: string, runId: string | null, db = this.db) {
    const join = runId ? and(eq(verdicts.detectionId, detections.id), eq(verdicts.runId, runId)) : sql`false`;
    return db
      .select({
        detectionId: detections.id,
        name: detections.name,
        raDeg: detections.raDeg,
        decDeg: detections.decDeg,
        starlight: verdicts.starlight,
        surroundings: verdicts.surroundings,
      })
      .from(detections)
      .leftJoin(verdicts, join!)
      .where(eq(detections.surveyId, surveyId))
      .orderBy(asc(detections.catalogueId), asc(detections.row));
  }

  /** What the plots of a survey need of a whole run, in input order. */
  async plotted(runId: string, db = this.db) {
    const { detectionId, name, starlight, surroundings, pNone, pMissed, pAlone, logHiMass, distanceMpc } = verdicts;
    const keys = ['pSpurious', 'distanceErrorMpc', 'signalToNoise', 'width50Kms', 'gasToLight', 'gasToLightIsLimit'];
    const pairs = keys.map((key) => sql`${key}::text, ${verdicts.item}->${key}`);
    const rows = await db
      .select({
        own: { detectionId, name, starlight, surroundings, pNone, pMissed, pAlone, logHiMass, distanceMpc },
        rest: sql<Record<string, unknown>>`jsonb_build_object(${sql.join(pairs, sql`, `)})`,
      })
      .from(verdicts)
      .where(eq(verdicts.runId, runId))
      .orderBy(asc(verdicts.position));
    return rows.map(({ own, rest }) => ({ ...own, ...rest }));
  }

  /** Verdict columns of a whole run, for comparing two. */
  summary(runId: string, db = this.db) {
    return db
      .select({
        detectionId: verdicts.detectionId,
        name: verdicts.name,
        starlight: verdicts.starlight,
        surroundings: verdicts.surroundings,
        pNone: verdicts.pNone,
        pMissed: verdicts.pMissed,
        power: verdicts.power,
        pAlone: verdicts.pAlone,
        distanceMpc: verdicts.distanceMpc,
        counterpart: sql<string | null>`${verdicts.item}->'counterpart'->>'name'`,
        nearest: sql<string | null>`${verdicts.item}->'nearest'->>'name'`,
      })
      .from(verdicts)
      .where(eq(verdicts.runId, runId))
      .orderBy(desc(likelyDark));
  }
}
