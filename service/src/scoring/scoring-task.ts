import type { GasStarRelation } from '@eremite/shared/science/hydrogen/gas-relation';
import type { TaskRunner } from '../matching/task-pool.ts';
import type { ShiftedPlaces } from './control-run.ts';
import { Engine, type Learnt } from './engine.ts';
import type { EngineInput } from './engine-input.ts';
import { learnRelation, type Lesson } from './learning.ts';
import { relationOf } from './expectation.ts';
import type { ScoredDetection } from './scored-detection.ts';

/** Verdicts in which an object was accepted as the counterpart. */
const FOUND = new Set(['starlit', 'nearly dark']);

interface Range {
  from: number;
  to: number;
}

/** The steps of a run. `R` is what becomes of scored detections where they are scored: a row to store, a line of a file. */
export interface ScoringTasks<R> {
  /** How much there is to do, and what is known before anything is learnt. */
  extent: { task: object; result: { detections: number; pupils: number; learnt: Learnt } };
  lessons: { task: Range & { relation: GasStarRelation | null }; result: Lesson[] };
  /** The relation that lessons teach; null for none. */
  relation: { task: { lessons: Lesson[] }; result: GasStarRelation | null };
  learn: { task: { relation: GasStarRelation | null; lessons: Lesson[] }; result: Learnt };
  /** Scored detections, and in how many an object was accepted. */
  score: { task: Range; result: { rendered: R; found: number } };
  shift: { task: object; result: ShiftedPlaces };
  chance: { task: Range & { places: ShiftedPlaces }; result: number };
  notes: { task: object; result: string[] };
}
export type ScoringRunner<R> = TaskRunner<ScoringTasks<R>>;

/** Turns scored detections into what leaves the thread. */
export type Render<R> = (scored: ScoredDetection[], engine: Engine) => R;

const steps = <R>(
  engine: Engine,
  render: Render<R>,
): { [N in keyof ScoringTasks<R>]: (task: ScoringTasks<R>[N]['task']) => ScoringTasks<R>[N]['result'] } => ({
  extent: () => {
    engine.assertBounded();
    return { detections: engine.detections.length, pupils: engine.pupils, learnt: engine.learnt };
  },
  lessons: ({ from, to, relation }) => engine.lessons(from, to, relation),
  relation: ({ lessons }) => {
    const { criteria } = engine.input;
    return (criteria.counterpart.learnMagnitudes && learnRelation(lessons, relationOf(criteria))) || null;
  },
  learn: ({ relation, lessons }) => engine.learn(relation, lessons),
  score: ({ from, to }) => {
    const scored = engine.score(from, to);
    const found = scored.filter(({ item }) => FOUND.has(item.starlight)).length;
    return { rendered: render(scored, engine), found };
  },
  shift: () => engine.shifted(),
  chance: ({ places, from, to }) => engine.chanceMatches(places, from, to),
  notes: () => engine.notes,
});

/** A step with all it needs, so that any thread can do it: columns are shared, the rest is small. */
export interface ScoringAsked {
  /** One for all steps on the same input. */
  run: string;
  input: EngineInput;
  learnt: Learnt | null;
  name: keyof ScoringTasks<unknown>;
  task: unknown;
}

/** Does steps in this thread, keeping the tables of the latest run indexed between them. */
export function scoringDesk<R>(render: Render<R>): (asked: ScoringAsked) => unknown {
  let open: { run: string; engine: Engine } | undefined;
  return ({ run, input, learnt, name, task }) => {
    if (open?.run !== run) open = { run, engine: new Engine(input) };
    if (learnt) open.engine.setLearnt(learnt);
    return (steps(open.engine, render)[name] as (task: unknown) => unknown)(task);
  };
}
