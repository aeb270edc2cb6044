import { separationArcsec } from '../../matching/separation-arcsec.ts';

export interface Source {
  readonly name: string;
  readonly raDeg: number;
  readonly decDeg: number;
  /** Optical, barycentric; null where unknown. */
  readonly velocityKms: number | null;
}
export interface NumberedSource extends Source {
  readonly row: number;
}
export interface Candidate {
  readonly row: number;
  readonly name: string;
  readonly separationArcsec: number;
}
export interface Bound {
  /** The one row that is certainly meant; null where a person must say. */
  readonly row: number | null;
  /** Rows that may be meant, the likeliest first. */
  readonly candidates: Candidate[];
}
/** Two HI lines further apart are two sources, however near on the sky. */
const SAME_LINE_KMS = 100;
const MOST_CANDIDATES = 8;

/**
 * Finds a source of one version of a table in the next, by name and position.
 *
 * Certain where one row of the same name stands within the tolerance; or where one row alone stands there and its name is
 * not one that belonged to another source before. Everything else is asked.
 *
 * @param rows of the new version: those near, and those of the same name wherever they stand
 * @param toleranceArcsec how far a source may have moved between the versions
 * @param isOthersName whether a name belonged to another source of the earlier version
 */
export function bindSource(
  source: Source,
  rows: readonly NumberedSource[],
  toleranceArcsec: number,
  isOthersName: (name: string) => boolean,
): Bound {
  const named = (row: Source) => row.name !== '' && row.name === source.name;
  const candidates = rows
    .filter(({ velocityKms: v }) => {
      if (v === null || source.velocityKms === null) return true;
      return Math.abs(v - source.velocityKms) <= SAME_LINE_KMS;
    })
    .map((row) => ({
      row: row.row,
      name: row.name,
      separationArcsec: separationArcsec(source.raDeg, source.decDeg, row.raDeg, row.decDeg),
    }))
    .sort(
      (a, b) =>
        Number(b.name === source.name) - Number(a.name === source.name) || a.separationArcsec - b.separationArcsec,
    );
  const near = candidates.filter((candidate) => candidate.separationArcsec <= toleranceArcsec);
  const same = near.filter((candidate) => named({ ...source, name: candidate.name }));
  const alone =
    near.length === 1 &&
    !isOthersName(near[0]!.name) &&
    !candidates.some((c) => c.name === source.name && c !== near[0]);
  const row = same.length === 1 ? same[0]!.row : alone ? near[0]!.row : null;
  return { row, candidates: candidates.slice(0, MOST_CANDIDATES) };
}
