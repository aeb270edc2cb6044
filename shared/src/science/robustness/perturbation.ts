import type { Random } from './random.ts';
import { truncatedNormal } from './truncated-normal.ts';

/** One-sigma errors of what a score holds fixed. */
export interface FixedErrors {
  /** Distance and its error, Mpc; NaN where no distance is usable, then it is not drawn. */
  distanceMpc: number;
  distanceErrorMpc: number;
  /** sigma_S / S of the HI flux, and the flux scale's, as fractions. */
  fluxFraction: number;
  fluxScaleFraction: number;
  /** Error of a stated depth, mag. */
  depthMag: number;
  /** Fractional error of E(B-V). */
  reddeningFraction: number;
  /** Log-normal errors of the stellar mass-to-light ratio and of the typical half-light radius, dex. */
  massToLightDex: number;
  sizeDex: number;
}

/** Common practice; 10 per cent for the flux scale of a single dish, 16 per cent for the reddening map. */
export const USUAL_ERRORS = {
  fluxScaleFraction: 0.1,
  depthMag: 0.15,
  reddeningFraction: 0.16,
  massToLightDex: 0.3,
  sizeDex: 0.3,
} as const;

/** What one draw changes: factors and shifts to be applied to the nominal inputs. */
export interface Draw {
  distanceFactor: number;
  fluxFactor: number;
  depthShiftMag: number;
  reddeningFactor: number;
  massToLightFactor: number;
  sizeFactor: number;
}

/** The nominal run. */
export const NO_CHANGE: Draw = {
  distanceFactor: 1,
  fluxFactor: 1,
  depthShiftMag: 0,
  reddeningFactor: 1,
  massToLightFactor: 1,
  sizeFactor: 1,
};

/** Distances at or below this are left out, Mpc. */
const LEAST_DISTANCE_MPC = 0.1;
/** Fluxes and reddenings at or below this share of the nominal are left out. */
const LEAST_SHARE = 0.02;

/**
 * Draws what a score holds fixed, all of it together.
 *
 * @param random generator of this source; every call uses the same number of deviates whatever the errors are, so that
 *   variants of the criteria are compared on common random numbers
 * @param errors one-sigma errors
 * @returns one draw, to be shared by every quantity of the source: masses, limits and separations move together
 * @throws {DomainError} if an error is negative
 *
 * Positions are not drawn: the score has integrated over their errors already.
 */
export function drawPerturbation(random: Random, errors: FixedErrors): Draw {
  const usable = errors.distanceMpc > LEAST_DISTANCE_MPC && errors.distanceErrorMpc >= 0;
  const distance = truncatedNormal(
    random,
    usable ? errors.distanceMpc : 1,
    usable ? errors.distanceErrorMpc : 0,
    LEAST_DISTANCE_MPC,
  );
  const noise = truncatedNormal(random, 1, errors.fluxFraction, LEAST_SHARE);
  const scale = truncatedNormal(random, 1, errors.fluxScaleFraction, LEAST_SHARE);
  const reddeningFactor = truncatedNormal(random, 1, errors.reddeningFraction, LEAST_SHARE);
  return {
    distanceFactor: usable ? distance / errors.distanceMpc : 1,
    fluxFactor: noise * scale,
    reddeningFactor,
    depthShiftMag: errors.depthMag * random.gaussian(),
    massToLightFactor: 10 ** (errors.massToLightDex * random.gaussian()),
    sizeFactor: 10 ** (errors.sizeDex * random.gaussian()),
  };
}

/** A draw in which one input alone is changed, to tell which of them flips a verdict. */
export function onlyChanged(draw: Draw, input: keyof Draw): Draw {
  return { ...NO_CHANGE, [input]: draw[input] };
}
