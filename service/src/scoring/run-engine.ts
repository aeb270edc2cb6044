import { type ControlResult, controlSummary } from './control-run.ts';
import { Engine } from './engine.ts';
import type { EngineInput } from './engine-input.ts';
import type { ScoredDetection } from './scored-detection.ts';

/** Detections scored between two looks at the clock: the unit of progress and of cancel. */
const UNIT = 500;

export type { ControlResult };

export interface RunOptions {
  /** Work done, 0 to 1, and what is being done. */
  onProgress?: (fraction: number, message: string) => void;
  /** Asked between units; the reason of the signal is thrown. */
  signal?: AbortSignal;
}

/** Verdicts in which an object was accepted as the counterpart. */
const FOUND = new Set(['starlit', 'nearly dark']);

export interface RunResult {
  engine: Engine;
  notes: string[];
  /** Result of the shifted positions; null where they are switched off. */
  control: ControlResult | null;
}

/**
 * Does a whole run in this thread: index, learn, score in input order.
 *
 * @param take receives the results unit by unit, in input order
 */
export async function runEngine(
  input: EngineInput,
  take: (scored: ScoredDetection[], engine: Engine) => void | Promise<void>,
  { onProgress, signal }: RunOptions = {},
): Promise<RunResult> {
  onProgress?.(0, 'indexing the tables');
  const engine = new Engine(input);
  const count = engine.detections.length;
  const learning = engine.canLearn;
  const share = learning ? 0.25 : 0.05;
  const pause = async () => {
    await new Promise<void>((resolve) => setImmediate(resolve));
    signal?.throwIfAborted();
  };
  if (learning) {
    const { pupils } = engine;
    const lessons: ReturnType<Engine['lessons']> = [];
    for (let from = 0; from < pupils.length; from += UNIT) {
      await pause();
      lessons.push(...engine.lessons(pupils.slice(from, from + UNIT), null));
      onProgress?.(0.05 + (share - 0.05) * (lessons.length / pupils.length), 'learning from the survey');
    }
    engine.learnFrom(lessons, (relation) => engine.lessons(pupils, relation));
  }
  let matched = 0;
  const shifted = engine.shifted();
  const scored = shifted.length > 0 ? 0.8 : 1;
  for (let from = 0; from < count; from += UNIT) {
    await pause();
    const to = Math.min(count, from + UNIT);
    const results = engine.score(from, to);
    for (const { item } of results) if (FOUND.has(item.starlight)) matched++;
    await take(results, engine);
    onProgress?.(share + (scored - share) * (to / count), 'scoring');
  }
  let chance = 0;
  for (let from = 0; from < shifted.length; from += UNIT) {
    await pause();
    chance += engine.chanceMatches(shifted.slice(from, from + UNIT));
    onProgress?.(scored + (1 - scored) * Math.min(1, (from + UNIT) / shifted.length), 'matching shifted positions');
  }
  const { offsetsPerSource } = input.criteria.control;
  const control = controlSummary(offsetsPerSource, shifted.length, chance, matched, count);
  return { engine, notes: engine.notes, control };
}
