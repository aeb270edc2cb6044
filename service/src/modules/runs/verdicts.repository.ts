import {
  assignments,
  detections,
  evidence,
  overrides,
  returns,
  reviews,
  settlements,
  users,
  verdicts,
} from '@eremite/schema';
import type { VerdictsQuery } from '@eremite/shared/contracts/run';
import { Inject, Injectable } from '@nestjs/common';
import { and, asc, desc, eq, gte, ilike, inArray, isNull, type SQL, sql } from 'drizzle-orm';
import { DATABASE, type Database } from '../../database/database.ts';

const likelyDark = sql`(${verdicts.pNone} + ${verdicts.pMissed})`;
const SORTS: Record<string, SQL> = {
  position: sql`${verdicts.position}`,
  name: sql`${verdicts.name}`,
  raDeg: sql`${verdicts.raDeg}`,
  decDeg: sql`${verdicts.decDeg}`,
  velocityKms: sql`${verdicts.velocityKms}`,
  distanceMpc: sql`${verdicts.distanceMpc}`,
  logHiMass: sql`${verdicts.logHiMass}`,
  pNone: sql`${verdicts.pNone}`,
  pNoneOrMissed: likelyDark,
  power: sql`${verdicts.power}`,
  pAlone: sql`${verdicts.pAlone}`,
  starlight: sql`${verdicts.starlight}`,
  surroundings: sql`${verdicts.surroundings}`,
};
/** Verdicts that need eyes come first, and of these the likeliest dark. */
const DOCKET = sql`array_position(array['dark','nearly dark','contested','confused','cannot tell','starlit'], ${verdicts.starlight})`;

const graded = (grade: string) =>
  sql`(select count(*) from jsonb_array_elements(${verdicts.item}->'doubts') d where d->>'grade' = ${grade})`;
const SERIOUS = graded('serious');
const WATCHED = graded('watch');
/** An account that may see what all reviewers said. */
export const EVERYONE = 'all';
const onThis = sql`r.detection_id = ${verdicts.detectionId} and r.run_id = ${verdicts.runId}`;
/** Reviewers are blind until they have spoken on the run. */
const maySee = (viewer: string): SQL =>
  viewer === EVERYONE
    ? sql`true`
    : sql`exists (select 1 from ${reviews} r where ${onThis} and r.reviewer_id = ${viewer} and r.superseded_at is null)`;
const disagreement = (viewer: string): SQL =>
  sql`(${maySee(viewer)} and (select count(distinct (r.starlight, r.surroundings, r.outcome)) > 1 from ${reviews} r where ${onThis} and r.superseded_at is null))`;
const isSettled = sql`exists (select 1 from ${settlements} s where s.detection_id = ${verdicts.detectionId} and s.superseded_at is null)`;
/** Came back and was not spoken on again; a settlement that does not stand any more likewise. */
const returned = (viewer: string): SQL => {
  const whose = viewer === EVERYONE ? sql`true` : sql`t.reviewer_id = ${viewer}`;
  return sql`(exists (select 1 from ${returns} t where t.detection_id = ${verdicts.detectionId} and t.run_id = ${verdicts.runId} and ${whose}
      and not exists (select 1 from ${reviews} r where ${onThis} and r.reviewer_id = t.reviewer_id and r.superseded_at is null))
    or exists (select 1 from ${settlements} s where s.detection_id = ${verdicts.detectionId} and s.superseded_at is null and s.moved is not null))`;
};

/**
 * What moved since an account's word, else since the lead settled. A fragment of its own, for columns named in the selection
 * itself lose their table.
 */
const movedFor = (userId: string): SQL => sql`coalesce(
  (select t.moved from ${returns} t where t.detection_id = ${verdicts.detectionId} and t.run_id = ${verdicts.runId} and t.reviewer_id = ${userId}
    and not exists (select 1 from ${reviews} r where ${onThis} and r.reviewer_id = t.reviewer_id and r.superseded_at is null)),
  (select s.moved from ${settlements} s where s.detection_id = ${verdicts.detectionId} and s.superseded_at is null),
  '[]'::jsonb)`;

/** What a page of verdicts may be narrowed by, beyond the query of the contract. */
export interface VerdictFilter extends Partial<VerdictsQuery> {
  detectionIds?: readonly string[];
  assignedTo?: string;
  unassigned?: boolean;
  notReviewedBy?: string;
  reviewedBy?: string;
  settled?: 'yes' | 'no' | undefined;
  /** Whose words came back because their evidence moved; settlements that did come back to everyone. */
  returnedTo?: string;
  /** Reviewers differ, as far as an account may know: `all` knows all. */
  disagreementSeenBy?: string;
  /** A reviewer gave this answer, likewise. */
  outcome?: { is: string; seenBy: string };
  /** For the orders of the docket. */
  viewer?: string;
}

@Injectable()
export class VerdictsRepository {
  constructor(@Inject(DATABASE) private readonly db: Database) {}

  #where(runId: string, filter: VerdictFilter): SQL {
    const reviewed = sql`exists (select 1 from ${reviews} r where r.detection_id = ${verdicts.detectionId} and r.run_id = ${verdicts.runId} and r.superseded_at is null)`;
    const by = (userId: string) =>
      sql`exists (select 1 from ${reviews} r where r.detection_id = ${verdicts.detectionId} and r.run_id = ${verdicts.runId} and r.reviewer_id = ${userId} and r.superseded_at is null)`;
    const doubt = filter.doubt ?? filter.doubtGrade;
    return and(
      eq(verdicts.runId, runId),
      filter.starlight && inArray(verdicts.starlight, filter.starlight),
      filter.surroundings && inArray(verdicts.surroundings, filter.surroundings),
      filter.search ? ilike(verdicts.name, `%${filter.search.replace(/[\\%_]/g, '\\$&')}%`) : undefined,
      filter.minPNone === undefined ? undefined : gte(verdicts.pNone, filter.minPNone),
      doubt
        ? sql`${verdicts.item}->'doubts' @> ${JSON.stringify([
            { ...(filter.doubt && { name: filter.doubt }), ...(filter.doubtGrade && { grade: filter.doubtGrade }) },
          ])}::jsonb`
        : undefined,
      filter.reviewed === 'yes' ? reviewed : undefined,
      filter.reviewed === 'no' ? sql`not ${reviewed}` : undefined,
      filter.detectionIds && inArray(verdicts.detectionId, [...filter.detectionIds]),
      filter.assignedTo
        ? sql`exists (select 1 from ${assignments} a where a.detection_id = ${verdicts.detectionId} and a.user_id = ${filter.assignedTo})`
        : undefined,
      filter.unassigned
        ? sql`not exists (select 1 from ${assignments} a where a.detection_id = ${verdicts.detectionId})`
        : undefined,
      filter.reviewedBy ? by(filter.reviewedBy) : undefined,
      filter.notReviewedBy ? sql`not ${by(filter.notReviewedBy)}` : undefined,
      filter.settled === 'yes' ? isSettled : undefined,
      filter.settled === 'no' ? sql`not ${isSettled}` : undefined,
      filter.returnedTo ? returned(filter.returnedTo) : undefined,
      filter.disagreementSeenBy ? disagreement(filter.disagreementSeenBy) : undefined,
      filter.outcome
        ? sql`(${maySee(filter.outcome.seenBy)} and exists (select 1 from ${reviews} r where r.detection_id = ${verdicts.detectionId} and r.run_id = ${verdicts.runId} and r.superseded_at is null and r.outcome = ${filter.outcome.is}))`
        : undefined,
    )!;
  }

  #order(sort: string | undefined, viewer = EVERYONE): SQL[] {
    const likeliest = [DOCKET, sql`${likelyDark} desc`, sql`${verdicts.position}`];
    if (sort === 'docket') return likeliest;
    if (sort === 'doubt') return [sql`${SERIOUS} desc`, sql`${WATCHED} desc`, ...likeliest];
    if (sort === 'disagreement') return [sql`${disagreement(viewer)} desc`, ...likeliest];
    if (sort === 'returned') return [sql`${returned(viewer)} desc`, ...likeliest];
    const down = sort?.startsWith('-') ?? false;
    const key = SORTS[sort?.replace(/^-/, '') ?? 'position'] ?? SORTS['position']!;
    return [down ? sql`${key} desc nulls last` : sql`${key} asc nulls last`, sql`${verdicts.position}`];
  }

  page(
    runId: string,
    filter: VerdictFilter,
    page: { sort?: string | undefined; limit: number; offset: number },
    db = this.db,
  ) {
    return db
      .select({ detectionId: verdicts.detectionId, item: verdicts.item })
      .from(verdicts)
      .where(this.#where(runId, filter))
      .orderBy(...this.#order(page.sort, filter.viewer))
      .limit(page.limit)
      .offset(page.offset);
  }

  /** Ids of the detections of a run that a filter lets through, in order. */
  async ids(runId: string, filter: VerdictFilter, sort: string | undefined, db = this.db): Promise<string[]> {
    const rows = await db
      .select({ id: verdicts.detectionId })
      .from(verdicts)
      .where(this.#where(runId, filter))
      .orderBy(...this.#order(sort));
    return rows.map((row) => row.id);
  }

  async count(runId: string, filter: VerdictFilter = {}, db = this.db): Promise<number> {
    const [row] = await db
      .select({ count: sql<number>`count(*)::int` })
      .from(verdicts)
      .where(this.#where(runId, filter));
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
