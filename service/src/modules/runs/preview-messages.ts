import type { Candidate, Neighbour } from '@eremite/shared/contracts/verdict';
import type { Learnt } from '../../scoring/engine.ts';
import type { ScoredDetail, ScoredItem } from '../../scoring/scored-detection.ts';
import type { PackedInput } from './packed-input.ts';
import type { ThreadFailure } from './run-messages.ts';

export interface PreviewTask {
  input: PackedInput;
  learnt: Learnt | null;
  /** Detections to score, by table and row. */
  wanted: { catalogueId: string; row: number }[];
}

export interface PreviewedDetection {
  item: ScoredItem;
  detail: ScoredDetail;
  candidates: Omit<Candidate, 'override'>[];
  neighbours: Neighbour[];
}

/** From the thread, one a task; results are in the order of `wanted`, as JSON text. */
export type PreviewMessage = { kind: 'done'; results: string } | ({ kind: 'failed' } & ThreadFailure);
