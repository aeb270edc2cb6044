import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { crowdingChance } from '@eremite/shared/science/photometry/faint-excess';
import { pairSearch } from '../matching/pair-search.ts';
import { conclude, type StarlightAssessment } from './assess.ts';
import { isStar, type PreparedBand, type PreparedCatalogue } from './prepared-catalogue.ts';
import type { Pieces } from './scored-detection.ts';

/** Pieces of a galaxy lie inside this many half-light radii of its centre. Common practice, 1 to 2. */
const PIECES_RADII = 1.5;
/** The ring that tells what is there by chance, in radii of the circle. Our choice. */
const RING_RADII = 3;
/** Fewer objects are no crowd, whatever the chance. */
const LEAST_PIECES = 4;

/** Looks for a galaxy in pieces wherever a detection would be called dark, and concludes anew. */
export function lookForPieces(
  assessed: readonly StarlightAssessment[],
  criteria: CriteriaSettings,
): StarlightAssessment[] {
  return assessed.map((assessment) => {
    const { best } = assessment.silence;
    if (assessment.starlight !== 'dark' || !best || criteria.absence.piecesChance === 0) return assessment;
    const pieces = piecesOf(assessment, best.catalogue, best.band);
    return conclude({ ...assessment, pieces }, criteria);
  });
}

function piecesOf(
  { detection, silence, objects }: StarlightAssessment,
  catalogue: PreparedCatalogue,
  band: PreparedBand,
): Pieces {
  // The more diffuse part of the sizes expected: it is the diffuse galaxies that fall apart.
  const sizes = silence.best!.expected?.sizes ?? [];
  const size = sizes.reduce((most, { median }) => Math.max(most, median), 0);
  const radius = Math.min(detection.searchArcsec, 2 * detection.error.majorArcsec + PIECES_RADII * size);
  const found = pairSearch(catalogue.grid, {
    raDeg: Float64Array.of(detection.raDeg),
    decDeg: Float64Array.of(detection.decDeg),
    radiusArcsec: Float64Array.of(RING_RADII * radius),
  });
  const elsewhere = new Set(
    objects
      .filter(({ discordant }) => discordant)
      .flatMap(({ rows }) => rows.map((row) => key(row.catalogue, row.index))),
  );
  let count = 0;
  let ring = 0;
  let flux = 0;
  found.row.forEach((row, k) => {
    const magnitude = band.magnitude[row]!;
    if (!(magnitude > -90) || band.isLimit?.[row] || isStar(catalogue, row)) return;
    if (found.separationArcsec[k]! > radius) ring++;
    else if (!elsewhere.has(key(catalogue, row))) {
      count++;
      flux += 10 ** (-0.4 * magnitude);
    }
  });
  return {
    catalogue: catalogue.input.name,
    radiusArcsec: radius,
    count,
    expected: ring / (RING_RADII ** 2 - 1),
    chance: count < LEAST_PIECES ? 1 : crowdingChance(count, ring, RING_RADII ** 2 - 1),
    band: band.name,
    magnitude: count > 0 ? -2.5 * Math.log10(flux) : NaN,
  };
}

const key = ({ index }: PreparedCatalogue, row: number): string => `${index}/${row}`;
