import { DomainError } from '../domain-error.ts';
import { erfc } from '../robustness/error-function.ts';
import { extendedLimit, extendedLoss } from './extended-depth.ts';
import type { PointDepth } from './extended-depth.ts';
import type { SizePrior } from './size-prior.ts';

/** How a catalogue loses galaxies near its limit. */
export interface DetectionSettings {
  /** Half of the galaxies at the extended-source limit are found; the fall is an error function of this width, mag. */
  rollOffMag: number;
  /** Loss of real catalogues beyond white noise, mag; 0.5-1 is common. */
  penaltyMag: number;
  /** Largest share found however bright (deblending, star-galaxy cuts). */
  ceiling: number;
}

/** Common practice; settings of the criteria. */
export const DEFAULT_DETECTION: DetectionSettings = { rollOffMag: 0.3, penaltyMag: 0.5, ceiling: 0.995 };

/** The magnitudes expected, AB (or the same system as the depth): a Gaussian core and a wide Gaussian tail. */
export interface MagnitudePrior {
  magnitudeAb: number;
  scatterMag: number;
  tailFraction: number;
  tailScatterMag: number;
}

/** Nodes and weights of Gauss-Hermite quadrature for a standard normal deviate, seven points (Abramowitz & Stegun 25.10). */
const NODES = [
  -3.7504397177257425, -2.366759410734541, -1.1544053947399682, 0, 1.1544053947399682, 2.366759410734541,
  3.7504397177257425,
];
const WEIGHTS = [
  0.0005482688559722178, 0.0307571239675865, 0.24012317860501273, 0.45714285714285713, 0.24012317860501273,
  0.0307571239675865, 0.0005482688559722178,
];

/**
 * Chance that a galaxy of one magnitude and size is in the catalogue.
 *
 * @param magnitude total magnitude, same system as the depth
 * @param effectiveRadiusArcsec half-light radius, arcsec
 * @param depth point-source depth and image quality
 * @param settings roll-off, penalty and ceiling
 * @returns probability in [0, ceiling]
 * @throws {DomainError} if an input is out of range
 */
export function detectionProbability(
  magnitude: number,
  effectiveRadiusArcsec: number,
  depth: PointDepth,
  settings = DEFAULT_DETECTION,
): number {
  check(settings);
  const limit = extendedLimit(depth, effectiveRadiusArcsec, settings.penaltyMag);
  return settings.ceiling * below(limit, magnitude, settings.rollOffMag);
}

/**
 * Chance that the counterpart expected of an HI detection is in the catalogue: its share of the power of a silence.
 *
 * @param expected distribution of magnitudes, dimmed by extinction, same system as the depth
 * @param sizes half-light radii on the sky, arcsec
 * @param depth point-source depth and image quality at the place
 * @param settings roll-off, penalty and ceiling
 * @returns probability in [0, ceiling]
 * @throws {DomainError} if an input is out of range
 *
 * Exact over magnitude (a Gaussian against an error function is an error function), seven-point Gauss-Hermite over the
 * logarithm of each size component: within 1e-3 of a fine sum for scatters up to 0.5 dex; about 5 microseconds.
 * Size and magnitude are taken as independent at the expected stellar mass.
 *
 * Method: absence.
 */
export function expectedDetection(
  expected: MagnitudePrior,
  sizes: SizePrior,
  depth: PointDepth,
  settings = DEFAULT_DETECTION,
): number {
  check(settings);
  const { magnitudeAb, scatterMag, tailFraction, tailScatterMag } = expected;
  const core = Math.hypot(scatterMag, settings.rollOffMag);
  const tail = Math.hypot(tailScatterMag, settings.rollOffMag);
  let total = 0;
  for (const { weight, median, scatterDex } of sizes) {
    const loss = extendedLoss(depth, median);
    for (let k = 0; k < NODES.length; k++) {
      // A radius ten times larger loses 2.5 mag, so that the loss is linear in the nodes.
      const limit = depth.limitMag - Math.max(0, loss + 2.5 * scatterDex * NODES[k]!) - settings.penaltyMag;
      const inCore = below(limit, magnitudeAb, core);
      const found =
        tailFraction > 0 ? (1 - tailFraction) * inCore + tailFraction * below(limit, magnitudeAb, tail) : inCore;
      total += weight * WEIGHTS[k]! * found;
    }
  }
  return settings.ceiling * total;
}

/** Probability that a normal deviate about `magnitude` is brighter than `limit`. */
function below(limit: number, magnitude: number, width: number): number {
  return 0.5 * erfc((magnitude - limit) / (Math.SQRT2 * width));
}

function check({ rollOffMag, penaltyMag, ceiling }: DetectionSettings): void {
  if (!(rollOffMag > 0 && penaltyMag >= 0 && ceiling > 0 && ceiling <= 1)) {
    throw new DomainError(`detection: got roll-off ${rollOffMag}, penalty ${penaltyMag}, ceiling ${ceiling}`);
  }
}
