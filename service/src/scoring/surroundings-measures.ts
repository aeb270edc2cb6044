import type { SurroundingsMeasures } from '@eremite/shared/contracts/surroundings-measures';
import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { HELIUM_FACTOR } from '@eremite/shared/science/hydrogen/baryonic-mass';
import { hiMass } from '@eremite/shared/science/hydrogen/hi-mass';
import { hiDiameterKpc } from '@eremite/shared/science/hydrogen/hi-size';
import { BANDS } from '@eremite/shared/science/photometry/bands';
import { distanceToRegion } from '@eremite/shared/science/sky/moc-distance';
import {
  localDensity,
  projectedDensity,
  tidalIndex,
  tidalIndexOfFive,
  tidalStrength,
} from '@eremite/shared/science/surroundings/density-measures';
import { projectedKpc } from '@eremite/shared/science/surroundings/projected-separation';
import { rowName } from './prepared-catalogue.ts';
import type { Assessment } from './scored-detection.ts';
import type { NeighbourRow, SurroundingsContext } from './surroundings.ts';

/** What is looked through for the measures, whatever the window of the criteria: Mpc and km/s. */
export const MEASURED = { radiusMpc: 2, windowKms: 1000 };
const COUNT_RADII_MPC = [0.5, 1, 2];
const COUNT_WINDOW_KMS = 500;
const RANK = 5;
/** Faintest neighbour of the density of five, M_r, where redshifts reach so far. Common practice. */
const DENSITY_MAG = -20;
/** One galaxy in two tables: nearer than this, arcsec, or than an HI position errs; and in velocity, km/s. Our choice. */
const SAME_ARCSEC = 5;
const SAME_HI_ARCSEC = 60;
const SAME_KMS = 300;

/** One neighbour, whatever tables hold it. */
export interface KnownGalaxy {
  row: NeighbourRow;
  kpc: number;
  /** M_r; NaN where unknown. */
  absoluteMag: number;
  /** Stars and gas with helium, solar masses; NaN where neither is known. */
  mass: number;
  hasGas: boolean;
}

/** Everything that measures the surroundings of a detection with a distance; null without one. */
export function measureSurroundings(
  { detection, surroundings, gasToLight, dominating }: Assessment,
  others: readonly NeighbourRow[],
  photometric: { spoilers: number | null; unverified: number | null },
  context: SurroundingsContext,
): SurroundingsMeasures | null {
  const { angularMpc, luminosityMpc } = detection;
  if (!(angularMpc > 0)) return null;
  const galaxies = oneEach(others, angularMpc, luminosityMpc, context.criteria.counterpart.massToLightR);
  const { reach, covered, membership } = surroundings;
  const reached = reach ? reach.limitR - 5 * Math.log10(luminosityMpc) - 25 : NaN;
  const counted = Math.min(DENSITY_MAG, Number.isNaN(reached) ? DENSITY_MAG : reached);
  const bright = galaxies.filter(({ absoluteMag }) => absoluteMag <= counted);
  const fifth = bright[RANK - 1];
  const disturbers = galaxies
    .filter(({ mass, kpc, row }) => mass > 0 && kpc > 0 && Math.abs(row.velocityDifferenceKms) <= COUNT_WINDOW_KMS)
    .map(({ mass, kpc, row }) => ({ mass, separationMpc: kpc / 1000, row }));
  const strongest = disturbers.reduce<(typeof disturbers)[number] | null>(
    (most, each) => (most && most.mass / most.separationMpc ** 3 >= each.mass / each.separationMpc ** 3 ? most : each),
    null,
  );
  const nearest = galaxies.find(({ row }) => Math.abs(row.velocityDifferenceKms) <= COUNT_WINDOW_KMS);
  const edgeKpc = edgeOf(detection, surroundings);
  const ownStars = dominating && gasToLight > 0 ? 10 ** detection.logHiMass / gasToLight : 0;
  const ownMass = HELIUM_FACTOR * 10 ** detection.logHiMass + ownStars * context.criteria.counterpart.massToLightR;
  const diameterKpc = Number.isNaN(detection.logHiMass) ? NaN : hiDiameterKpc(detection.logHiMass);
  return {
    radiusMpc: MEASURED.radiusMpc,
    nearest: nearest
      ? {
          name: rowName(nearest.row.catalogue, nearest.row.index),
          separationKpc: nearest.kpc,
          velocityDifferenceKms: nearest.row.velocityDifferenceKms,
          isLimit: edgeKpc !== null && nearest.kpc > edgeKpc,
        }
      : null,
    counts: COUNT_RADII_MPC.map((radiusMpc) => ({
      radiusMpc,
      count: galaxies.filter(
        ({ kpc, row }) => kpc <= 1000 * radiusMpc && Math.abs(row.velocityDifferenceKms) <= COUNT_WINDOW_KMS,
      ).length,
    })),
    brighterThanMag: counted,
    fifthDensity:
      fifth && fifth.kpc > 0 ? projectedDensity(RANK, fifth.kpc / 1000) : projectedDensity(RANK, MEASURED.radiusMpc),
    fifthDensityIsLimit: !fifth,
    localDensity: localDensity(RANK, fifth && fifth.kpc > 0 ? fifth.kpc / 1000 : MEASURED.radiusMpc),
    tidalIndex: disturbers.length > 0 ? tidalIndex(disturbers) : null,
    tidalIndexOfFive: disturbers.length > 0 ? tidalIndexOfFive(disturbers) : null,
    disturber: strongest ? rowName(strongest.row.catalogue, strongest.row.index) : null,
    tidalStrength:
      disturbers.length > 0 && ownMass > 0 && diameterKpc > 0
        ? tidalStrength(
            disturbers.map(({ mass, separationMpc }) => ({
              massRatio: mass / ownMass,
              diameters: (1000 * separationMpc) / diameterKpc,
            })),
          )
        : null,
    spoilers: photometric.spoilers,
    group: membership && {
      name: membership.group.name,
      separationKpc: membership.separationKpc,
      velocityDifferenceKms: membership.differenceKms,
      r200Kpc: membership.group.r200Kpc,
    },
    gasNeighbours: galaxies.filter(
      ({ hasGas, kpc, row }) => hasGas && kpc <= 1000 && Math.abs(row.velocityDifferenceKms) <= COUNT_WINDOW_KMS,
    ).length,
    unseen: Number.isNaN(surroundings.missed)
      ? null
      : { meanField: surroundings.missed, clustered: surroundings.missedClustered },
    reachesMag: Number.isNaN(reached) ? null : reached,
    covered,
    edgeKpc,
    unverified: photometric.unverified,
  };
}

/**
 * Neighbours with each galaxy once, nearest first: rows of several tables that are one galaxy are joined, and stars of one
 * and gas of another make its mass.
 *
 * @param massToLightR turns light in r into stars: the stellar mass stands for L_K with M/L_K of one
 */
export function oneEach(
  rows: readonly NeighbourRow[],
  angularMpc: number,
  luminosityMpc: number,
  massToLightR: number,
): KnownGalaxy[] {
  const galaxies: KnownGalaxy[] = [];
  const modulus = 5 * Math.log10(luminosityMpc) + 25;
  const sorted = [...rows].sort(
    (a, b) => Number(a.catalogue.input.kind === 'hi') - Number(b.catalogue.input.kind === 'hi'),
  );
  for (const row of sorted) {
    const isGas = row.catalogue.input.kind === 'hi';
    const stars = massToLightR * 10 ** (0.4 * (BANDS.r.solarAb - (row.magnitudeR - modulus)));
    const gas = row.fluxJyKms > 0 ? HELIUM_FACTOR * hiMass(row.fluxJyKms, luminosityMpc) : NaN;
    const known = galaxies.find((other) => isSame(row, other.row, isGas));
    if (known) {
      if (isGas && !known.hasGas) {
        known.hasGas = true;
        known.mass = (known.mass > 0 ? known.mass : 0) + (gas > 0 ? gas : 0);
      } else if (Number.isNaN(known.absoluteMag)) known.absoluteMag = row.magnitudeR - modulus;
      continue;
    }
    galaxies.push({
      row,
      kpc: projectedKpc(row.separationArcsec, angularMpc),
      absoluteMag: row.magnitudeR - modulus,
      mass: isGas ? gas : stars,
      hasGas: isGas,
    });
  }
  return galaxies.sort((a, b) => a.kpc - b.kpc);
}

function isSame(row: NeighbourRow, other: NeighbourRow, isGas: boolean): boolean {
  if (Math.abs(row.velocityDifferenceKms - other.velocityDifferenceKms) > SAME_KMS) return false;
  if (row.catalogue === other.catalogue) return false;
  const [a, b] = [row, other].map(({ catalogue, index }) => ({
    ra: catalogue.raDeg[index]!,
    dec: catalogue.decDeg[index]!,
  }));
  const apart = Math.hypot(wrapped(a!.ra - b!.ra) * Math.cos(a!.dec * DEGREE), a!.dec - b!.dec) * 3600;
  return apart <= (isGas ? SAME_HI_ARCSEC : SAME_ARCSEC);
}

const wrapped = (deg: number): number => ((((deg + 180) % 360) + 360) % 360) - 180;

/** Distance to the nearest edge of the redshifts' footprint, kpc; null where it lies outside the neighbour circle. */
function edgeOf(
  { raDeg, decDeg, angularMpc }: Assessment['detection'],
  { reach, covered }: Assessment['surroundings'],
): number | null {
  if (!reach?.catalogue.moc || covered === null || covered >= 0.999) return null;
  const edge = distanceToRegion(reach.catalogue.moc, (((raDeg % 360) + 360) % 360) * DEGREE, decDeg * DEGREE, false);
  return Number.isFinite(edge) ? projectedKpc(edge / ARCSECOND, angularMpc) : null;
}
