import type { EngineInput } from '../../scoring/engine-input.ts';
import type { ControlResult } from '../../scoring/run-engine.ts';

/** What the worker thread is started with; arrays may lie over shared memory. */
export interface RunTask {
  input: EngineInput;
}

/** A scored detection as it is stored: JSON as text, evidence packed. */
export interface StoredVerdict {
  position: number;
  catalogueId: string;
  row: number;
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
  | { kind: 'done'; notes: string[]; control: ControlResult | null; totals: RunTotals }
  | { kind: 'failed'; message: string; stack?: string };
