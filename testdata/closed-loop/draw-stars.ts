import { erfc } from '@eremite/shared/science/robustness/error-function';
import type { Random } from '@eremite/shared/science/robustness/random';
import type { Gas } from './draw-gas.ts';

/** The light of a galaxy as a deep image would show it. */
export interface Stars {
  r: number;
  radiusArcsec: number;
}

export const SEEING_ARCSEC = 1.3;
const SOLAR_R = 4.65;
/** Catalogues lose this much beyond white noise, and fall over this width, mag: the defaults of the criteria. */
const PENALTY_MAG = 0.5;
const ROLL_OFF_MAG = 0.3;

/**
 * Stars that go with gas: log M* = 9 + 1.1 (log M_HI - 9.5), M/L_r 0.75, half a magnitude brighter, scatter
 * 1.3 exp(-0.4 (log M_HI - 9.5)) mag with a 5 per cent wide tail; half-light radii of Shen et al. (2003), coefficients
 * from memory, one in seven diffuse.
 */
export function drawStars({ logHiMass, distanceMpc }: Gas, random: Random): Stars {
  const scatter = Math.min(2.5, Math.max(0.7, 1.3 * Math.exp(-0.4 * (logHiMass - 9.5))));
  const wide = random.uniform() < 0.05 ? Math.max(3, 2 * scatter) : scatter;
  const meanLogStars = 9 + 1.1 * (logHiMass - 9.5);
  const absolute = SOLAR_R - 2.5 * (meanLogStars - Math.log10(0.75)) - 0.5 + wide * random.gaussian();
  const ratio = 10 ** (meanLogStars - Math.log10(3.98e10));
  const spread = (0.34 + 0.13 / (1 + ratio ** 2)) / Math.LN10;
  const diffuse = random.uniform() < 0.15;
  const median = 0.1 * 10 ** (0.14 * meanLogStars) * (1 + ratio) ** 0.25 * (diffuse ? 2.5 : 1);
  const kpc = median * 10 ** ((diffuse ? 0.2 : spread) * random.gaussian());
  return { r: absolute + 5 * Math.log10(distanceMpc) + 25, radiusArcsec: (kpc / distanceMpc) * 206.265 };
}

/** Whether a table of some depth holds a galaxy: an error function about the limit for its size. */
export function isSeen(r: number, radiusArcsec: number, depth: number, random: Random): boolean {
  const point = 4 * Math.PI * (SEEING_ARCSEC / 2.35482) ** 2;
  const loss = 1.25 * Math.log10((Math.PI * radiusArcsec ** 2) / point) + 0.7526;
  const limit = depth - Math.max(0, loss) - PENALTY_MAG;
  return random.uniform() < 0.5 * erfc((r - limit) / (Math.SQRT2 * ROLL_OFF_MAG));
}
