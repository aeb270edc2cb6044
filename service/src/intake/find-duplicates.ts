import { DEGREE } from '@eremite/shared/science/constants';
import { centroidError, sigmaOfError, systematicError } from '@eremite/shared/science/counterpart/position-error';
import { separation } from '@eremite/shared/science/sky/separation';
import type { PackedColumns } from '../tiles/column-pack.ts';
import type { ResolvedSettings } from './resolved.ts';

/** A row that is the same source as another, better one; both by data row number. */
export interface Duplicate {
  row: number;
  of: number;
  separationArcsec: number;
  differenceKms: number;
}

/** Positions of one source agree within so many combined 1-D sigma in 98.9 per cent of cases. Common practice. */
const MOST_SIGMA = 3;
/** Velocities of one source agree within half a line width, but at least so far, km/s. Common practice. */
const LEAST_DIFFERENCE_KMS = 20;

/**
 * Rows of an HI list that are one source detected twice, as where tiles or passes overlap: positions within the errors and
 * velocities within half the wider line. Of each set the row of the highest signal-to-noise ratio is the one kept, of
 * equals the first. Rows without a velocity are never taken for duplicates.
 *
 * @param roles all usable rows: role columns of tiles/role-table.ts
 * @returns the rows that are not kept, by row number
 */
export function findDuplicates(
  { rows, columns }: PackedColumns,
  settings: Pick<ResolvedSettings, 'positionErrorArcsec' | 'errorMeaning' | 'beamArcsec'>,
): Duplicate[] {
  const column = (name: string) => columns[name] as Float64Array | undefined;
  const [ra, dec, cz] = [column('raDeg')!, column('decDeg')!, column('czKms')];
  if (!cz) return [];
  const [width, signal, row] = [column('width50Kms'), column('signalToNoise'), columns['row'] as Uint32Array];
  const sigma = positionErrors(rows, column('positionErrorArcsec'), signal, settings);
  const widest = sigma.reduce((most, value) => Math.max(most, value), 0);
  const reachDeg = (MOST_SIGMA * Math.SQRT2 * widest) / 3600;
  const byDec = Uint32Array.from({ length: rows }, (_, i) => i).sort((a, b) => dec[a]! - dec[b]!);
  const pairs = new Map<number, { other: number; separationArcsec: number; differenceKms: number }[]>();
  for (let k = 0; k < rows; k++) {
    const i = byDec[k]!;
    for (let m = k + 1; m < rows && dec[byDec[m]!]! - dec[i]! <= reachDeg; m++) {
      const j = byDec[m]!;
      const differenceKms = Math.abs(cz[i]! - cz[j]!);
      const half = Math.max(width?.[i] || 0, width?.[j] || 0) / 2;
      if (!(differenceKms <= Math.max(LEAST_DIFFERENCE_KMS, half))) continue;
      const apart = separation(ra[i]! * DEGREE, dec[i]! * DEGREE, ra[j]! * DEGREE, dec[j]! * DEGREE);
      const separationArcsec = (apart / DEGREE) * 3600;
      if (separationArcsec > MOST_SIGMA * Math.hypot(sigma[i]!, sigma[j]!)) continue;
      const pair = { separationArcsec, differenceKms };
      pairs.set(i, [...(pairs.get(i) ?? []), { other: j, ...pair }]);
      pairs.set(j, [...(pairs.get(j) ?? []), { other: i, ...pair }]);
    }
  }
  return kept(pairs, (i) => signal?.[i] || 0, row);
}

/** Best rows first: each claims those near it, so that a chain of faint ones cannot join two sources. */
function kept(
  pairs: Map<number, { other: number; separationArcsec: number; differenceKms: number }[]>,
  signalOf: (i: number) => number,
  row: Uint32Array,
): Duplicate[] {
  const best = [...pairs.keys()].sort((a, b) => signalOf(b) - signalOf(a) || row[a]! - row[b]!);
  const claimed = new Set<number>();
  const duplicates: Duplicate[] = [];
  for (const i of best) {
    if (claimed.has(i)) continue;
    claimed.add(i);
    for (const { other, separationArcsec, differenceKms } of pairs.get(i)!) {
      if (claimed.has(other)) continue;
      claimed.add(other);
      duplicates.push({ row: row[other]!, of: row[i]!, separationArcsec, differenceKms });
    }
  }
  return duplicates.sort((a, b) => a.row - b.row);
}

/** 1-D sigma of each row, arcsec: its own, the list's, or that of the beam; a small beam's pointing error otherwise. */
function positionErrors(
  rows: number,
  own: Float64Array | undefined,
  signal: Float64Array | undefined,
  { positionErrorArcsec, errorMeaning, beamArcsec }: Parameters<typeof findDuplicates>[1],
): Float64Array {
  const beam = beamArcsec?.major;
  const common = positionErrorArcsec === null ? null : sigmaOfError(positionErrorArcsec, errorMeaning);
  return Float64Array.from({ length: rows }, (_, i) => {
    if (own && own[i]! > 0) return own[i]!;
    if (common !== null) return common;
    const strength = signal?.[i];
    if (beam === undefined) return systematicError(120);
    return strength! > 0 ? Math.hypot(centroidError(beam, strength!), systematicError(beam)) : systematicError(beam);
  });
}
