import type { SurroundingsMeasures } from '@eremite/shared/contracts/surroundings-measures';
import type { VelocityModel } from '@eremite/shared/science/counterpart/velocity-term';
import type { LearntPrior } from '@eremite/shared/science/counterpart/learn-prior';
import type { GasStarRelation } from '@eremite/shared/science/hydrogen/gas-relation';
import { candidateRows, estimateHits } from '../matching/hit-estimate.ts';
import { HitLimitError } from '../matching/hit-limit.ts';
import { pairSearch } from '../matching/pair-search.ts';
import type { SearchPositions } from '../matching/search-positions.ts';
import { assessStarlight, type AssessmentContext, type StarlightAssessment } from './assess.ts';
import { type CandidateRow, makeCandidate, type OverrideOf } from './candidate-row.ts';
import { Claims } from './claims.ts';
import { CoveredShares } from './covered-share.ts';
import { type ShiftedPlaces, shiftedPlaces } from './control-run.ts';
import { describeDetail, describeItem } from './describe.ts';
import type { Detection } from './detection-table.ts';
import { Detections } from './detections.ts';
import type { EngineInput } from './engine-input.ts';
import { relationOf } from './expectation.ts';
import { readGroups } from './group-list.ts';
import { judgeDoubts } from './judge-doubts.ts';
import { learnPriors, learntNotes, type Lesson, lessonOf } from './learning.ts';
import { MissedTable } from './missed-table.ts';
import { NeighboursAround } from './neighbours-around.ts';
import { overridesBy } from './overrides-by.ts';
import { ownRows } from './own-rows.ts';
import { lookForPieces } from './look-for-pieces.ts';
import { PhotometricNeighbours } from './photometric-neighbours.ts';
import { isStar, type PreparedCatalogue, prepareCatalogue } from './prepared-catalogue.ts';
import { redshiftReaches } from './redshift-reach.ts';
import { judgeStability } from './robustness.ts';
import type { Assessment, ScoredDetection } from './scored-detection.ts';
import { SkyMasks } from './sky-masks.ts';
import { judgeSurroundings, type NeighbourRow, type SurroundingsContext } from './surroundings.ts';
import { measureSurroundings } from './surroundings-measures.ts';
import { tableNotes } from './table-notes.ts';
import { removeCounterparts } from './unrelated-counts.ts';
import { RedshiftField, velocityModelOf, velocityNotes } from './velocity-background.ts';
import { rateRows, type WeighingModel } from './weigh-objects.ts';

/** Kinds of tables in which a counterpart is looked for. */
const COUNTERPART_KINDS = ['optical', 'infrared', 'ultraviolet', 'continuum'];
/** Detections to learn from: more would move what is learnt by less than its error. */
const MOST_PUPILS = 6000;
/** Candidates of a run in all: more are no screening any more, and would not fit into memory or onto a disk. Our choice. */
const MOST_CANDIDATES = 20_000_000;
/** Fewer detections teach nothing. Our choice. */
const LEAST_DETECTIONS = 100;
/** What a run learns from its own data before it scores. */
export interface Learnt {
  relation: GasStarRelation | null;
  priors: LearntPrior[];
  velocity: VelocityModel;
  notes: string[];
}

/**
 * Scores the detections of a run. Pure: the same input gives the same results, in any split into ranges.
 *
 * Use: make one (tables are indexed), `learn` once or take over what another worker learnt with `setLearnt`, then `score`
 * ranges of detections in any order.
 */
export class Engine {
  readonly detections: Detections;
  readonly catalogues: PreparedCatalogue[];
  private readonly searched: PreparedCatalogue[];
  private readonly neighbours: NeighboursAround;
  private readonly masks: SkyMasks;
  private readonly surroundings: SurroundingsContext;
  private readonly overrideOf: OverrideOf | null;
  private readonly shares: CoveredShares;
  private readonly redshifts: RedshiftField;
  private readonly claims: Claims;
  private readonly photometric: PhotometricNeighbours;
  private known: Learnt | undefined;

  constructor(readonly input: EngineInput) {
    const { criteria, survey } = input;
    this.detections = new Detections(input);
    this.catalogues = input.catalogues.map((catalogue, index) =>
      prepareCatalogue(catalogue, index, criteria, COUNTERPART_KINDS.includes(catalogue.kind)),
    );
    this.searched = this.catalogues.filter(({ input: { kind } }) => COUNTERPART_KINDS.includes(kind));
    removeCounterparts(
      this.searched,
      this.detections.pick(this.places(0, Math.ceil(this.detections.length / this.step))),
      this.step,
      criteria.counterpart.priorFraction,
      relationOf(criteria),
    );
    this.masks = new SkyMasks(this.catalogues, criteria);
    this.surroundings = {
      criteria,
      h0: survey.h0,
      reaches: redshiftReaches(this.catalogues),
      groups: readGroups(this.catalogues, input),
      missed: new MissedTable(criteria, survey.h0),
      hasVelocities: this.catalogues.some(
        ({ input: { kind }, czKms }) => kind !== 'hi' && czKms?.some(Number.isFinite),
      ),
    };
    this.neighbours = new NeighboursAround(this.catalogues, this.surroundings);
    this.overrideOf = overridesBy(input);
    this.shares = new CoveredShares(this.detections.length, this.catalogues.length);
    this.redshifts = new RedshiftField(criteria.counterpart.learnVelocities ? this.searched : []);
    this.photometric = new PhotometricNeighbours(this.searched, criteria);
    this.claims = new Claims(this.detections, criteria, (range) =>
      this.assess(range, this.context(this.learnt.relation, this.learnt.priors)),
    );
  }

  private context(relation: GasStarRelation | null, priors: readonly LearntPrior[]): AssessmentContext {
    const { criteria } = this.input;
    const model: WeighingModel = {
      criteria,
      relation: relation ?? relationOf(criteria),
      velocity: this.learnt.velocity,
    };
    return { model, catalogues: this.searched, priors, shares: this.shares };
  }

  /** Candidate rows of each detection of a range, nearest first within each catalogue. */
  private candidatesOf(range: readonly Detection[], overrideOf: OverrideOf | null): CandidateRow[][] {
    const rows: CandidateRow[][] = range.map(() => []);
    const positions = positionsOf(range);
    for (const catalogue of this.searched) {
      const pairs = pairSearch(catalogue.grid, positions);
      for (let k = 0; k < pairs.position.length; k++) {
        const p = pairs.position[k]!;
        rows[p]!.push(makeCandidate(range[p]!, catalogue, pairs.row[k]!, pairs.separationArcsec[k]!, overrideOf));
      }
    }
    return rows;
  }

  private assess(
    range: readonly Detection[],
    context: AssessmentContext,
    overrideOf: OverrideOf | null = this.overrideOf,
  ): StarlightAssessment[] {
    const candidates = this.candidatesOf(range, overrideOf);
    const masks = this.masks.of(range);
    const velocities = this.redshifts.localModels(context.model.velocity, range);
    return candidates.map((rows, i) => {
      const model = { ...context.model, velocity: velocities[i]! };
      return assessStarlight(range[i]!, rows, masks[i]!, { ...context, model });
    });
  }

  /** A run learns from every so-many-th detection, so that there are at most {@link MOST_PUPILS}. */
  private get step(): number {
    return Math.max(1, Math.ceil(this.detections.length / MOST_PUPILS));
  }

  /**
   * Refuses criteria that would make candidates of nearly everything, before any of them is made.
   *
   * @throws {HitLimitError} with the count that the whole run would give and the limit
   */
  assertBounded(): void {
    const sample = this.detections.pick(this.places(0, Math.ceil(this.detections.length / this.step)));
    const positions = positionsOf(sample);
    const order = Uint32Array.from(sample.keys());
    let about = 0;
    for (const { grid } of this.searched) {
      // The rows in the boxes are an upper bound that costs little.
      if (this.step * candidateRows(grid, positions, order) <= MOST_CANDIDATES / this.searched.length) continue;
      about += this.step * estimateHits(grid, positions, order);
    }
    if (about > MOST_CANDIDATES) throw new HitLimitError(MOST_CANDIDATES, about);
  }

  /** Places of the pupils [from, to). */
  private places(from: number, to: number): number[] {
    return Array.from({ length: to - from }, (_, i) => (from + i) * this.step);
  }

  /** How many detections a run learns from; 0 where it does not want to or has too few. */
  get pupils(): number {
    const { learnPrior, learnMagnitudes } = this.input.criteria.counterpart;
    const learns = (learnPrior || learnMagnitudes) && this.detections.length >= LEAST_DETECTIONS;
    return learns ? Math.ceil(this.detections.length / this.step) : 0;
  }

  /** What the pupils [from, to) teach under a relation; null for that of the criteria. */
  lessons(from: number, to: number, relation: GasStarRelation | null): Lesson[] {
    const context = this.context(relation, []);
    return this.assess(this.detections.pick(this.places(from, to)), context).map((assessment) =>
      lessonOf(assessment, context.model.relation),
    );
  }

  /** Concludes from the lessons of all pupils under the relation that they taught; null where they taught none. */
  learn(relation: GasStarRelation | null, lessons: readonly Lesson[]): Learnt {
    const priors = learnPriors(lessons, this.input.criteria);
    const notes = learntNotes(relation ?? undefined, priors, lessons);
    return { ...this.learnt, relation, priors, notes };
  }

  /** What the run has learnt: at first only how velocities are spread, which is measured when it is first asked for. */
  get learnt(): Learnt {
    if (!this.known) {
      const pupils = this.detections.pick(this.places(0, Math.ceil(this.detections.length / this.step)));
      const velocity = this.redshifts.measure(velocityModelOf(this.input.criteria), pupils);
      this.known = { relation: null, priors: [], velocity, notes: [] };
    }
    return this.known;
  }

  /** Takes over what was learnt elsewhere from the same input. */
  setLearnt(learnt: Learnt): void {
    this.known = learnt;
  }

  /** Sentences about the run as a whole: what the tables leave open and what was learnt. */
  get notes(): string[] {
    const { notes, velocity } = this.learnt;
    return [...notes, ...velocityNotes(velocity), ...tableNotes(this.searched, this.surroundings.reaches)];
  }

  /** Scores detections [from, to). */
  score(from: number, to: number): ScoredDetection[] {
    const range = this.detections.range(from, to);
    return this.scoreRange(
      range,
      this.shares,
      range.map(({ position }) => position),
    );
  }

  /** One detection as it would be scored at each of some distances, had they been measured: nothing else changes. */
  scoreAt(position: number, distances: readonly { distanceMpc: number; errorMpc: number | null }[]): ScoredDetection[] {
    const moved = this.detections.moved(position, distances).map((detection, i) => ({ ...detection, position: i }));
    const shares = new CoveredShares(moved.length, this.catalogues.length);
    return moved.flatMap((detection) => this.scoreRange([detection], shares, [position]));
  }

  /** @param positions of the range in the input order, for the detections that claim the same galaxies */
  private scoreRange(
    range: readonly Detection[],
    shares: CoveredShares,
    positions: readonly number[],
  ): ScoredDetection[] {
    const { criteria } = this.input;
    const context = { ...this.context(this.learnt.relation, this.learnt.priors), shares };
    const assessed = lookForPieces(this.claims.solve(this.assess(range, context), positions), criteria);
    const around = this.neighbours.around(assessed);
    const far = this.neighbours.nearestBeyond(assessed, around);
    return assessed.map((starlight, i) => {
      const { detection } = starlight;
      const own = ownRows(starlight, criteria.counterpart.minimumProbability);
      const surroundings = judgeSurroundings(detection, around[i]!, own, far[i]!, this.surroundings);
      const assessment: Assessment = { ...starlight, surroundings };
      const doubts = judgeDoubts(starlight, surroundings, this.searched, criteria);
      const robustness = judgeStability(assessment, context.model, this.surroundings);
      rateRows(detection, starlight.candidates, starlight.expectations, starlight.prior, criteria);
      return {
        position: detection.position,
        catalogueId: this.input.catalogues[detection.catalogue]!.id,
        row: detection.row,
        detection,
        item: { ...describeItem(assessment, doubts, criteria), robustness },
        candidates: starlight.candidates,
        neighbours: surroundings.neighbours,
        detail: () => describeDetail(assessment, doubts, this.measures(assessment, own), this.input),
      };
    });
  }

  /** Measures of the surroundings, made when a detail is asked for: they look further than the verdict does. */
  private measures(assessment: Assessment, isOwn: (row: NeighbourRow) => boolean): SurroundingsMeasures | null {
    const { detection } = assessment;
    if (!(detection.angularMpc > 0)) return null;
    const others = this.neighbours
      .measured(detection)
      .filter((row) => !isOwn(row) && !isStar(row.catalogue, row.index));
    const photometric = {
      spoilers: this.photometric.spoilers(assessment),
      unverified: this.photometric.unverified(assessment),
    };
    return measureSurroundings(assessment, others, photometric, this.surroundings);
  }

  /** Shifted positions of the control; none where it is switched off. */
  shifted(): ShiftedPlaces {
    const { control, robustness } = this.input.criteria;
    return shiftedPlaces(this.detections, this.searched, control.offsetsPerSource, robustness.seed);
  }

  /** At how many of the shifted positions [from, to) a counterpart would have been found, by the same code and without overrides. */
  chanceMatches({ source, raDeg, decDeg }: ShiftedPlaces, from: number, to: number): number {
    const context = this.context(this.learnt.relation, this.learnt.priors);
    const moved = this.detections
      .pick(Array.from(source.subarray(from, to)))
      .map((detection, i) => ({ ...detection, position: i, raDeg: raDeg[from + i]!, decDeg: decDeg[from + i]! }));
    const shares = new CoveredShares(moved.length, this.catalogues.length);
    return this.assess(moved, { ...context, shares }, null).filter(({ dominating }) => dominating !== null).length;
  }
}

function positionsOf(range: readonly Detection[]): SearchPositions {
  return {
    raDeg: Float64Array.from(range, ({ raDeg }) => raDeg),
    decDeg: Float64Array.from(range, ({ decDeg }) => decDeg),
    radiusArcsec: Float64Array.from(range, ({ searchArcsec }) => searchArcsec),
  };
}
