import { SPEED_OF_LIGHT_KMS } from '@eremite/shared/science/constants';
import { DomainError } from '@eremite/shared/science/domain-error';
import { gather } from './gather.ts';
import { DEFAULT_HIT_LIMIT, HitLimitError } from './hit-limit.ts';
import { Hits, orderHits } from './hits.ts';
import { checkSameLength } from './same-length.ts';
import type { SearchRange } from './search-range.ts';
import { separationArcsec } from './separation-arcsec.ts';
import { findBox, makeSkyBox } from './sky-box.ts';
import { skyOrder } from './sky-order.ts';
import { checkRadius, type Numbers, wrapRaDeg } from './sky-position.ts';
import type { VelocityGrid } from './velocity-grid.ts';

/** Detections whose surroundings are searched: one entry each. */
export interface NeighbourQueries {
  raDeg: Numbers;
  decDeg: Numbers;
  /** optical barycentric velocity, km/s; NaN where unknown */
  czKms: Numbers;
  /** the projected radius as an angle at the detection's distance, degrees; NaN where the distance is unknown */
  angularRadiusDeg: Numbers;
  /** largest velocity difference either way, km/s */
  windowKms: Numbers;
  /** rows that are the detection itself or its counterpart, left out of its neighbours: `rows[offsets[i] .. offsets[i + 1])` */
  leftOut?: { offsets: Uint32Array; rows: Uint32Array };
}

/** Neighbours by detection, then separation, then row. */
export interface Neighbours {
  /** index of the detection */
  detection: Uint32Array;
  /** index of the row in the catalogue (0-based) */
  row: Uint32Array;
  separationArcsec: Float64Array;
  /** (cz of the row - cz of the detection) / (1 + z of the detection), km/s */
  velocityDifferenceKms: Float64Array;
}

const isLeftOut = (leftOut: NeighbourQueries['leftOut'], detection: number, row: number): boolean => {
  if (!leftOut) return false;
  const end = leftOut.offsets[detection + 1]!;
  for (let i = leftOut.offsets[detection]!; i < end; i++) if (leftOut.rows[i] === row) return true;
  return false;
};

/** Velocity difference in the frame of the detection, to first order in z: both at cosmological distance. */
const differenceKms = (rowCz: number, cz: number): number => (rowCz - cz) / (1 + cz / SPEED_OF_LIGHT_KMS);

/**
 * Rows within an angle and a velocity window of each detection, both limits inclusive.
 *
 * A detection without a velocity or without an angle is passed over: it has no neighbours here, which is not to say
 * that it has none. A missing number never lets a row in: every comparison is written to fail on NaN.
 *
 * @throws {DomainError} if a position, angle or window makes no sense
 * @throws {HitLimitError} if more than `limit` neighbours would be found
 */
export function neighbourSearch(grid: VelocityGrid, queries: NeighbourQueries, range: SearchRange = {}): Neighbours {
  const { raDeg, decDeg, czKms, angularRadiusDeg, windowKms, leftOut } = queries;
  const length = checkSameLength({ raDeg, decDeg, czKms, angularRadiusDeg, windowKms });
  const { from = 0, to = length, limit = DEFAULT_HIT_LIMIT } = range;
  const { row, raDeg: rowRaDeg, decDeg: rowDecDeg, czKms: velocities } = grid;
  const hits = new Hits();
  const box = makeSkyBox();
  const order = skyOrder(grid, raDeg, decDeg, from, to);
  for (let i = 0; i < order.length; i++) {
    const d = order[i]!;
    const window = windowKms[d]!;
    if (!(window >= 0)) throw new DomainError(`detection ${d} has a velocity window of ${window} km/s`);
    const cz = czKms[d]!;
    const radiusDeg = angularRadiusDeg[d]!;
    if (!Number.isFinite(cz) || Number.isNaN(radiusDeg)) continue;
    checkRadius('detection', d, radiusDeg);
    const ra = wrapRaDeg(raDeg[d]!);
    const dec = decDeg[d]!;
    const radius = radiusDeg * 3600;
    findBox(grid, box, ra, dec, radiusDeg);
    // The window as velocities of rows, a little wider than the rounding: it saves the division for most rows.
    const halfCz = window * Math.abs(1 + cz / SPEED_OF_LIGHT_KMS) * (1 + 1e-12) + 1e-6;
    const lowCz = cz - halfCz;
    const highCz = cz + halfCz;
    const { halfWidthDeg, decLowDeg, decHighDeg, slots } = box;
    for (let r = 0; r < box.ranges; r++) {
      const end = slots[2 * r + 1]!;
      for (let slot = slots[2 * r]!; slot < end; slot++) {
        const rowCz = velocities[slot]!;
        if (!(rowCz >= lowCz && rowCz <= highCz)) continue;
        const index = row[slot]!;
        const rowDec = rowDecDeg[index]!;
        if (rowDec < decLowDeg || rowDec > decHighDeg) continue;
        const rowRa = wrapRaDeg(rowRaDeg[index]!);
        const apart = Math.abs(rowRa - ra);
        if (apart > halfWidthDeg && 360 - apart > halfWidthDeg) continue;
        const difference = differenceKms(rowCz, cz);
        if (!(difference <= window && difference >= -window)) continue;
        const separation = separationArcsec(ra, dec, rowRa, rowDec);
        if (separation <= radius && !isLeftOut(leftOut, d, index)) hits.add(d, slot, separation);
      }
    }
    if (hits.count > limit) throw new HitLimitError(limit, Math.round((hits.count / (i + 1)) * order.length));
  }
  const sorted = orderHits(hits, grid, from, to);
  const detection = gather(hits.query, sorted);
  const slots = gather(hits.slot, sorted);
  const velocityDifferenceKms = new Float64Array(hits.count);
  for (let i = 0; i < hits.count; i++) {
    velocityDifferenceKms[i] = differenceKms(velocities[slots[i]!]!, czKms[detection[i]!]!);
  }
  return {
    detection,
    row: gather(row, slots),
    separationArcsec: gather(hits.separationArcsec, sorted),
    velocityDifferenceKms,
  };
}
