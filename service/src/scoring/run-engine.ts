import { setImmediate } from 'node:timers/promises';
import { type ControlResult, controlSummary } from './control-run.ts';
import type { Learnt } from './engine.ts';
import type { EngineInput } from './engine-input.ts';
import type { GasStarRelation } from '@eremite/shared/science/hydrogen/gas-relation';
import type { Lesson } from './learning.ts';
import { inOrder } from './in-order.ts';
import type { ScoredDetection } from './scored-detection.ts';
import { type Render, type ScoringAsked, scoringDesk, type ScoringTasks } from './scoring-task.ts';

/** Detections scored at a time: the unit of progress, of cancel and of what a thread takes. Results do not depend on it. */
const UNIT = 250;

export type { ControlResult };

export interface RunOptions {
  /** Work done, 0 to 1, and what is being done. */
  onProgress?: (fraction: number, message: string) => void;
  /** Asked between units; the reason of the signal is thrown. */
  signal?: AbortSignal;
}

/** Where the steps of a run are done, and how many side by side. */
export interface ScoringPlace {
  threads: number;
  ask(asked: ScoringAsked): Promise<unknown>;
}

export interface RunResult {
  notes: string[];
  learnt: Learnt;
  /** Result of the shifted positions; null where they are switched off. */
  control: ControlResult | null;
}

let runs = 0;

/**
 * Does a whole run: learn from the survey, score every detection, look at the shifted positions. The results are the same
 * however many threads there are.
 *
 * @param take receives what became of the detections of each unit, in input order, and is waited for
 */
export async function runScoring<R>(
  place: ScoringPlace,
  input: EngineInput,
  take: (rendered: R) => void | Promise<void>,
  { onProgress, signal }: RunOptions = {},
): Promise<RunResult> {
  const run = `run ${++runs}`;
  let learnt: Learnt | null = null;
  const ask = <N extends keyof ScoringTasks<R>>(name: N, task: ScoringTasks<R>[N]['task']) =>
    place.ask({ run, input, learnt, name, task }) as Promise<ScoringTasks<R>[N]['result']>;
  const over = <T>(count: number, start: (range: { from: number; to: number }) => Promise<T>, taken: (done: T, to: number) => void | Promise<void>) =>
    inOrder(count, UNIT, 2 * place.threads, async (range) => {
      signal?.throwIfAborted();
      return start(range);
    }, taken); // prettier-ignore

  onProgress?.(0, 'indexing the tables');
  const { detections, pupils, learnt: atFirst } = await ask('extent', {});
  learnt = atFirst;
  const learning = pupils > 0 ? 0.2 : 0.05;
  const teach = async (relation: GasStarRelation | null, base: number) => {
    const lessons: Lesson[] = [];
    await over(
      pupils,
      (range) => ask('lessons', { ...range, relation }),
      (some, to) => {
        lessons.push(...some);
        onProgress?.(base + 0.075 * (to / pupils), 'learning from the survey');
      },
    );
    return lessons;
  };
  if (pupils > 0) {
    const lessons = await teach(null, 0.05);
    const relation = await ask('relation', { lessons });
    learnt = await ask('learn', { relation, lessons: relation ? await teach(relation, 0.125) : lessons });
  }
  const places = await ask('shift', {});
  const shifted = places.source.length;
  const scored = shifted > 0 ? 0.85 : 1;
  let matched = 0;
  await over(
    detections,
    (range) => ask('score', range),
    async ({ rendered, found }, to) => {
      matched += found;
      await take(rendered);
      onProgress?.(learning + (scored - learning) * (to / detections), 'scoring');
    },
  );
  let chance = 0;
  await over(
    shifted,
    (range) => ask('chance', { ...range, places }),
    (some, to) => {
      chance += some;
      onProgress?.(scored + (1 - scored) * (to / shifted), 'matching shifted positions');
    },
  );
  const { offsetsPerSource } = input.criteria.control;
  const control = controlSummary(offsetsPerSource, shifted, chance, matched, detections);
  return { learnt: learnt ?? atFirst, notes: await ask('notes', {}), control };
}

/** Scores in this thread, giving way to other work between units. */
export function localPlace<R>(render: Render<R>): ScoringPlace {
  const desk = scoringDesk(render);
  return {
    threads: 1,
    ask: async (asked) => {
      await setImmediate();
      return desk(asked);
    },
  };
}

/** A whole run in this thread: {@link runScoring} for whoever wants the scored detections themselves. */
export function runEngine(
  input: EngineInput,
  take: (scored: ScoredDetection[]) => void | Promise<void>,
  options: RunOptions = {},
): Promise<RunResult> {
  return runScoring(localPlace((scored) => scored), input, take, options); // prettier-ignore
}
