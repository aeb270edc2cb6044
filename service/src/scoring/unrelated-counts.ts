import { DEGREE } from '@eremite/shared/science/constants';
import { counterpartDensity, type NumberCounts } from '@eremite/shared/science/counterpart/magnitude-term';
import type { GasStarRelation } from '@eremite/shared/science/hydrogen/gas-relation';
import type { Detection } from './detection-table.ts';
import { expectIn } from './expectation.ts';
import type { PreparedBand, PreparedCatalogue } from './prepared-catalogue.ts';

/** However many counterparts are expected, this share of the counts stays unrelated: the expectation is rough. Our choice. */
const LEAST_UNRELATED = 0.3;

/**
 * Takes the counterparts of the detections themselves out of the number counts, which are to be those of unrelated objects:
 * among bright galaxies a good part has gas that the survey sees, and left in they would make every true counterpart look
 * like a chance object.
 *
 * @param pupils detections, every so-many-th
 * @param each how many detections a pupil stands for
 * @param share prior share with a counterpart
 */
export function removeCounterparts(
  catalogues: readonly PreparedCatalogue[],
  pupils: readonly Detection[],
  each: number,
  share: number,
  relation: GasStarRelation,
): void {
  for (const catalogue of catalogues) {
    const inside = pupils.filter(({ raDeg, decDeg }) =>
      catalogue.moc ? catalogue.moc.contains((((raDeg % 360) + 360) % 360) * DEGREE, decDeg * DEGREE) : true,
    );
    for (const band of catalogue.bands) {
      if (!band.counts) continue;
      band.counts = unrelated(band, band.counts, inside, (each * share) / catalogue.area, relation);
    }
  }
}

function unrelated(
  band: PreparedBand,
  counts: NumberCounts,
  pupils: readonly Detection[],
  perPupil: number,
  relation: GasStarRelation,
): NumberCounts {
  const { firstMag, widthMag, density } = counts;
  const own = new Float64Array(density.length);
  for (const detection of pupils) {
    const expected = expectIn(detection, band, relation);
    if (!expected) return counts;
    for (let i = 0; i < own.length; i++) {
      own[i]! += perPupil * counterpartDensity(expected, firstMag + widthMag * (i + 0.5));
    }
  }
  return { ...counts, density: density.map((all, i) => Math.max(LEAST_UNRELATED * all, all - own[i]!)) };
}
