import type { controlResult } from '@eremite/shared/contracts/run';
import type { z } from 'zod';
import { Engine } from './engine.ts';
import type { EngineInput } from './engine-input.ts';
import type { ScoredDetection } from './scored-detection.ts';

/** Detections scored between two looks at the clock: the unit of progress and of cancel. */
const UNIT = 500;

export interface RunOptions {
  /** Work done, 0 to 1, and what is being done. */
  onProgress?: (fraction: number, message: string) => void;
  /** Asked between units; the reason of the signal is thrown. */
  signal?: AbortSignal;
}

export type ControlResult = z.output<typeof controlResult>;

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
  for (let from = 0; from < count; from += UNIT) {
    await pause();
    const to = Math.min(count, from + UNIT);
    await take(engine.score(from, to), engine);
    onProgress?.(share + (1 - share) * (to / count), 'scoring');
  }
  return { engine, notes: engine.notes, control: null };
}
