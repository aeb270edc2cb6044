import type { ScoredItem } from '../../scoring/scored-detection.ts';

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

/** What becomes of a unit of scored detections. */
export interface StoredUnit {
  verdicts: StoredVerdict[];
  candidates: number;
  neighbours: number;
}

/** Why a thread gave up. */
export interface ThreadFailure {
  message: string;
  stack?: string;
  /** `told`: the message is made for people; `inside`: it is for the log; `too much`: the criteria select too much. */
  cause: 'told' | 'inside' | 'too much';
}
