/** A star by its own table. */
export const STAR_PROBABILITY = 0.5;
/** Galaxies do not move: a faster object is a star of the Galaxy, mas/yr. */
const STAR_MOTION_MAS_YR = 20;

/** Columns by which stars are told, where a table has them. */
export interface StarColumns {
  starProbability: Float64Array | undefined;
  pmRa: Float64Array | undefined;
  pmDec: Float64Array | undefined;
}

/** Whether a row is a star, by its table's own word or by its motion. */
export function isStar({ starProbability, pmRa, pmDec }: StarColumns, row: number): boolean {
  if (starProbability && starProbability[row]! > STAR_PROBABILITY) return true;
  return pmRa !== undefined && pmDec !== undefined && Math.hypot(pmRa[row]!, pmDec[row]!) > STAR_MOTION_MAS_YR;
}
