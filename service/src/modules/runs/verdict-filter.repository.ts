import { assignments, returns, reviews, settlements, verdicts } from '@eremite/schema';
import type { VerdictsQuery } from '@eremite/shared/contracts/run';
import { and, eq, gte, ilike, inArray, type SQL, sql } from 'drizzle-orm';

export const likelyDark = sql`(${verdicts.pNone} + ${verdicts.pMissed})`;
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
export const maySee = (viewer: string): SQL =>
  viewer === EVERYONE
    ? sql`true`
    : sql`exists (select 1 from ${reviews} r where ${onThis} and r.reviewer_id = ${viewer} and r.superseded_at is null)`;
export const disagreement = (viewer: string): SQL =>
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
export const movedFor = (userId: string): SQL => sql`coalesce(
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

/** Condition that lets through the verdicts of a run that fit a filter. */
export function whereVerdict(runId: string, filter: VerdictFilter): SQL {
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

/** Order of a list of verdicts: a column, with `-` downwards, or one of the orders of the docket. */
export function orderVerdicts(sort: string | undefined, viewer = EVERYONE): SQL[] {
  const likeliest = [DOCKET, sql`${likelyDark} desc`, sql`${verdicts.position}`];
  if (sort === 'docket') return likeliest;
  if (sort === 'doubt') return [sql`${SERIOUS} desc`, sql`${WATCHED} desc`, ...likeliest];
  if (sort === 'disagreement') return [sql`${disagreement(viewer)} desc`, ...likeliest];
  if (sort === 'returned') return [sql`${returned(viewer)} desc`, ...likeliest];
  const down = sort?.startsWith('-') ?? false;
  const key = SORTS[sort?.replace(/^-/, '') ?? 'position'] ?? SORTS['position']!;
  return [down ? sql`${key} desc nulls last` : sql`${key} asc nulls last`, sql`${verdicts.position}`];
}
