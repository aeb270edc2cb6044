import { C_KMS, H0, localGroupCorrection } from './field.ts';
import type { Random } from './random.ts';

/** One galaxy (or one cloud of gas) of the made-up universe. Magnitudes are as observed; NaN is "none". */
export interface Source {
  raDeg: number;
  decDeg: number;
  /** Optical, barycentric. */
  czKms: number;
  distanceMpc: number;
  logHi: number;
  rMag: number;
  gMag: number;
  nuvMag: number;
  /** Vega. */
  w1Mag: number;
  effectiveRadiusArcsec: number;
  width50Kms: number;
  /** What it stands for; `field` for the ordinary ones. */
  story: string;
}

const SOLAR_R = 4.65;

/** Absolute r magnitude of the stars that go with this much gas: log M* = 9 + 1.1 (log M_HI - 9.5), M/L_r 0.75, with scatter. */
export function starsFor(logHi: number, random: Random): { absoluteR: number; logStars: number } {
  const scatterMag = Math.min(2.5, Math.max(0.7, 1.3 * Math.exp(-0.4 * (logHi - 9.5))));
  const wide = random.uniform() < 0.05 ? 1.6 : 1;
  const mean = SOLAR_R - 2.5 * (9 + 1.1 * (logHi - 9.5) - Math.log10(0.75)) - 0.5;
  const absoluteR = mean + random.normal(0, Math.min(1.6, scatterMag) * wide);
  return { absoluteR, logStars: 0.4 * (SOLAR_R - absoluteR) + Math.log10(0.75) };
}

/** Effective radius in kpc: exponential size-luminosity relation of dwarfs and discs with 0.2 dex scatter (from memory). */
export function radiusKpc(absoluteR: number, random: Random): number {
  return 10 ** (0.45 - 0.12 * (absoluteR + 20) + random.normal(0, 0.2)) * (absoluteR > -15 ? 0.8 : 1);
}

/** W50 from the baryonic Tully-Fisher relation for line widths, log M_b = 3.24 log V + 3.21 (Bradford et al. 2016), random tilt. */
export function width50(logHi: number, logStars: number, random: Random): number {
  const baryons = 1.33 * 10 ** logHi + (Number.isFinite(logStars) ? 10 ** logStars : 0);
  const rotation = 10 ** ((Math.log10(baryons) - 3.21) / 3.24 + random.normal(0, 0.06));
  const sine = Math.sqrt(1 - random.uniform() ** 2);
  return Math.max(18, Math.hypot(2 * rotation * sine, 16));
}

export interface Place {
  raDeg: number;
  decDeg: number;
  distanceMpc: number;
  peculiarKms: number;
}

/** The ordinary galaxy that goes with `logHi` of gas at a place. */
export function galaxyAt(place: Place, logHi: number, random: Random, story = 'field'): Source {
  const { absoluteR, logStars } = starsFor(logHi, random);
  return withStars(place, logHi, absoluteR, logStars, radiusKpc(absoluteR, random), random, story);
}

export function withStars(
  place: Place,
  logHi: number,
  absoluteR: number,
  logStars: number,
  sizeKpc: number,
  random: Random,
  story: string,
): Source {
  const modulus = 5 * Math.log10(place.distanceMpc) + 25;
  const blue = Math.min(1, Math.max(0, (absoluteR + 22) / 8));
  const rMag = absoluteR + modulus + 0.28;
  return {
    raDeg: place.raDeg,
    decDeg: place.decDeg,
    czKms:
      H0 * place.distanceMpc * (1 + (0.225 * H0 * place.distanceMpc) / C_KMS) +
      place.peculiarKms -
      localGroupCorrection(place.raDeg, place.decDeg),
    distanceMpc: place.distanceMpc,
    logHi,
    rMag,
    gMag: rMag + 0.62 - 0.3 * blue + random.normal(0, 0.06) + 0.12,
    nuvMag: rMag + 3.2 - 1.5 * blue + random.normal(0, 0.3) + 0.7,
    w1Mag: rMag - 2.55 + 0.75 * blue + random.normal(0, 0.15),
    effectiveRadiusArcsec: (sizeKpc / place.distanceMpc) * 206.265,
    width50Kms: width50(logHi, logStars, random),
    story,
  };
}

/** Gas without stars. */
export function darkAt(place: Place, logHi: number, random: Random, story: string): Source {
  return { ...withStars(place, logHi, NaN, NaN, NaN, random, story), rMag: NaN, gMag: NaN, nuvMag: NaN, w1Mag: NaN };
}

/** Flux in Jy km/s of `logHi` at a distance: M = 2.356e5 D^2 S/(1+z)^2. */
export function fluxOf(source: Source): number {
  return (10 ** source.logHi / 2.356e5 / source.distanceMpc ** 2) * (1 + source.czKms / C_KMS) ** 2;
}
