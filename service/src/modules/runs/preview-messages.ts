import type { Candidate, Neighbour } from '@eremite/shared/contracts/verdict';
import type { Learnt } from '../../scoring/engine.ts';
import type { ScoredDetail, ScoredItem } from '../../scoring/scored-detection.ts';
import type { PackedInput } from './packed-input.ts';
import type { ThreadFailure } from './run-messages.ts';
import type { SupposedDistances } from './what-if-distances.ts';

interface Task {
  input: PackedInput;
  learnt: Learnt | null;
}

export interface PreviewTask extends Task {
  /** Detections to score, by table and row. */
  wanted: { catalogueId: string; row: number }[];
}

/** Asks for the verdicts of one detection at other distances. */
export interface SupposeTask extends Task {
  suppose: { catalogueId: string; row: number; distances: SupposedDistances };
}

export interface PreviewedDetection {
  item: ScoredItem;
  detail: ScoredDetail;
  candidates: Omit<Candidate, 'override'>[];
  neighbours: Neighbour[];
}

/** From the thread, one a task: as JSON text what was previewed, in the order of `wanted`, or what was supposed. */
export type PreviewMessage = { kind: 'done'; results: string } | ({ kind: 'failed' } & ThreadFailure);
