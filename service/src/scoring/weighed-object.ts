import type { CandidateRow } from './candidate-row.ts';
import type { PreparedBand } from './prepared-catalogue.ts';

/** A physical object: rows of one or more catalogues. */
export interface WeighedObject {
  rows: CandidateRow[];
  /** Best-measured row: the object's place. */
  head: CandidateRow;
  /** Row that stands for the object: that of its magnitude, else the best-measured one. */
  face: CandidateRow;
  band: PreparedBand | null;
  /** Total over the pieces in one catalogue, in the system of the band; NaN where none. */
  magnitude: number;
  /** NaN where unknown. */
  czKms: number;
  velocityDifferenceKms: number;
  discordant: boolean;
  isStar: boolean;
  override: 'accept' | 'reject' | null;
  /** Factors of X for prior one. */
  positionFactor: number;
  magnitudeFactor: number;
  velocityFactor: number;
  /** X for prior one. */
  weight: number;
}
