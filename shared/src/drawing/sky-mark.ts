import type { Candidate, Neighbour } from '../contracts/verdict.ts';

/** How the object's velocity stands to the gas. */
export type VelocityAgreement = 'concordant' | 'other' | 'none';

/** One object on the sky panel, the strip and in the tables; `key` is what links them. */
export interface SkyMark {
  key: string;
  /** `field`: a row of a searched table that bears on neither verdict. */
  role: 'candidate' | 'neighbour' | 'field';
  catalogueId: string;
  name: string;
  /** Kind of its catalogue: decides the shape. */
  kind: string;
  raDeg: number;
  decDeg: number;
  separationArcsec: number;
  separationKpc: number | null;
  velocityDifferenceKms: number | null;
  magnitude: number | null;
  band: string | null;
  isStar: boolean;
  agreement: VelocityAgreement;
}

/** Key of a row of a catalogue. */
export const rowKey = (row: { catalogueId: string; rowId: number }): string => `${row.catalogueId}:${row.rowId}`;

/**
 * Whether a velocity agrees with that of the gas.
 * @param differenceKms velocity difference, km/s, or null where the object has none
 * @param windowKms largest difference that agrees, km/s, inclusive
 */
export function agreementOf(differenceKms: number | null, windowKms: number): VelocityAgreement {
  if (differenceKms === null) return 'none';
  return Math.abs(differenceKms) <= windowKms ? 'concordant' : 'other';
}

/** Candidates and neighbours as marks; a row that is both stands once, as a candidate. */
export function toSkyMarks(
  candidates: readonly Candidate[],
  neighbours: readonly Neighbour[],
  windowKms: number,
): SkyMark[] {
  const marks = new Map<string, SkyMark>();
  const add = (row: Candidate | Neighbour, role: SkyMark['role'], isStar: boolean) => {
    const key = rowKey(row);
    if (marks.has(key)) return;
    const {
      catalogueId,
      name,
      kind,
      raDeg,
      decDeg,
      separationArcsec,
      separationKpc,
      velocityDifferenceKms,
      magnitude,
      band,
    } = row;
    const agreement = agreementOf(velocityDifferenceKms, windowKms);
    marks.set(key, {
      key,
      role,
      catalogueId,
      name,
      kind,
      raDeg,
      decDeg,
      separationArcsec,
      separationKpc,
      velocityDifferenceKms,
      magnitude,
      band,
      isStar,
      agreement,
    });
  };
  candidates.forEach((row) => add(row, 'candidate', row.isStar));
  neighbours.forEach((row) => add(row, 'neighbour', false));
  return [...marks.values()];
}
