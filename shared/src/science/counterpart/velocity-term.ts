import { DomainError } from '../domain-error.ts';
import { densityAt, type VelocityHistogram } from './velocity-background.ts';

/** How redshifts of unrelated objects are spread, and how far redshifts are trusted. */
export interface VelocityModel {
  /** Density of unrelated redshifts over velocity, 1/(km/s): 1/18000 where nothing better is known. */
  backgroundDensity: number;
  /** Share of unrelated redshift objects near a detection that are at its velocity, by clustering. */
  clusteredFraction: number;
  /** 1-D velocity scatter of those, km/s. */
  clusteredScatterKms: number;
  /** Share of bad redshifts. */
  badFraction: number;
  /** A difference beyond it rules out, km/s. */
  discordantKms: number;
  /** Spread of the survey's own redshifts, in place of `backgroundDensity`, where it could be measured. */
  histogram?: VelocityHistogram;
  /** Redshift objects in rings about detections from which `clusteredFraction` was measured; 0 or missing: it is the setting. */
  ringObjects?: number;
}

/** Chance density of unrelated redshifts at a velocity by a model, per km/s. */
export function unrelatedDensity({ histogram, backgroundDensity }: VelocityModel, czKms: number): number {
  return histogram && Number.isFinite(czKms) ? densityAt(histogram, czKms) : backgroundDensity;
}

/** Common practice, with the starting points measured on published assignments. */
export const DEFAULT_VELOCITY_MODEL: VelocityModel = {
  backgroundDensity: 1 / 18_000,
  clusteredFraction: 0.33,
  clusteredScatterKms: 200,
  badFraction: 0.005,
  discordantKms: 500,
};

const normal = (x: number, sigma: number): number =>
  Math.exp(-0.5 * (x / sigma) ** 2) / (sigma * Math.sqrt(2 * Math.PI));

/**
 * Scatter of the velocity difference of gas and stars.
 *
 * @param hiErrorKms error of the HI velocity, km/s
 * @param opticalErrorKms error of the redshift, km/s
 * @param intrinsicKms gas-star scatter, km/s (30 for dwarfs, a quarter of W50 for fast rotators)
 */
export function velocityScatter(hiErrorKms: number, opticalErrorKms: number, intrinsicKms: number): number {
  return Math.hypot(hiErrorKms, opticalErrorKms, intrinsicKms);
}

/** Bayes factor of a velocity difference against a plain chance density; without clustering it is overstated. */
export function plainVelocityFactor(differenceKms: number, scatterKms: number, chanceDensity: number): number {
  if (!(scatterKms > 0 && chanceDensity > 0)) {
    throw new DomainError(`velocityFactor: scatter ${scatterKms} km/s, chance density ${chanceDensity}`);
  }
  return normal(differenceKms, scatterKms) / chanceDensity;
}

/**
 * Bayes factor of a velocity difference.
 *
 * @param differenceKms cz difference over (1 + z), km/s
 * @param scatterKms see {@link velocityScatter}
 * @param model spread of unrelated redshifts
 * @returns the floor for a discordant redshift; never below it, for redshifts can be wrong
 * @throws {DomainError} if the scatter or the background is not positive
 *
 * N(dv) over the chance density, which has a clustered part: a third of the unrelated redshift objects near a detection
 * are at its velocity too, and a bonus that forgets them makes matches worse.
 *
 * Method: velocity.
 */
export function velocityFactor(differenceKms: number, scatterKms: number, model = DEFAULT_VELOCITY_MODEL): number {
  if (Math.abs(differenceKms) > model.discordantKms) return model.badFraction;
  const { clusteredFraction: share, backgroundDensity } = model;
  const chance = (1 - share) * backgroundDensity + share * normal(differenceKms, model.clusteredScatterKms);
  const good = plainVelocityFactor(differenceKms, scatterKms, chance);
  return model.badFraction + (1 - model.badFraction) * good;
}

/** Redshifts that no candidate of a nearby detection can have: they are taken as missing. */
export const ABSURD_REDSHIFT = { above: 0.3, below: -0.01 } as const;

/**
 * Whether a redshift is to be ignored as nonsense against a nearby detection.
 *
 * @param redshift cz / c of the candidate
 * @param detectionRedshift the detection's; beyond z = 0.15 nothing is ignored
 */
export function isAbsurdRedshift(redshift: number, detectionRedshift: number): boolean {
  return detectionRedshift < 0.15 && (redshift > ABSURD_REDSHIFT.above || redshift < ABSURD_REDSHIFT.below);
}
