import type { Learnt } from '../../scoring/engine.ts';
import type { ControlResult } from '../../scoring/run-engine.ts';
import type { ScoredItem } from '../../scoring/scored-detection.ts';
import type { PackedInput } from './packed-input.ts';

/** What the worker thread is started with. */
export interface RunTask {
  input: PackedInput;
}

/** A scored detection as it is stored: JSON as text, so that the main thread need not parse it; evidence packed. */
export interface StoredVerdict {
  position: number;
  catalogueId: string;
  row: number;
  /** What lists sort and filter by. */
  facts: Pick<
    ScoredItem,
    | 'name'
    | 'raDeg'
    | 'decDeg'
    | 'velocityKms'
    | 'distanceMpc'
    | 'logHiMass'
    | 'starlight'
    | 'pNone'
    | 'pMissed'
    | 'pSpurious'
    | 'power'
    | 'surroundings'
    | 'pAlone'
  >;
  item: string;
  detail: string;
  candidates: Uint8Array;
  neighbours: Uint8Array;
}

export interface RunTotals {
  candidates: number;
  neighbours: number;
}

/** From the worker. After `verdicts` it waits for one `taken`, so that it never runs ahead of the database. */
export type RunMessage =
  | { kind: 'progress'; fraction: number; message: string }
  | { kind: 'verdicts'; verdicts: StoredVerdict[] }
  | { kind: 'done'; notes: string[]; control: ControlResult | null; totals: RunTotals; learnt: Learnt }
  | ({ kind: 'failed' } & ThreadFailure);

/** Why a thread gave up. */
export interface ThreadFailure {
  message: string;
  stack?: string;
  /** `told`: the message is made for people; `inside`: it is for the log; `too much`: the criteria select too much. */
  cause: 'told' | 'inside' | 'too much';
}
