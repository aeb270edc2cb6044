import type { Random } from '@eremite/shared/science/robustness/random';

/** The gas of one detection, as an HI survey lists it. */
export interface Gas {
  logHiMass: number;
  distanceMpc: number;
  czKms: number;
  width50Kms: number;
  fluxJyKms: number;
  signalToNoise: number;
}

/** HI mass function: Jones et al. (2018), from memory. */
const MASS_FUNCTION = { alpha: -1.25, logStar: 9.94 };
const MASSES = { from: 7, to: 10.8 };
const DISTANCES = { from: 12, to: 220 };
/** Noise of a 10 km/s channel, mJy, and the least signal-to-noise ratio of the list. */
const NOISE_MJY = 2.2;
const LEAST_SNR = 6.5;
const H0 = 70;

/** Detections of a flux-limited survey: a mass function in a volume, thinned by signal-to-noise. */
export function drawGas(random: Random, count: number): Gas[] {
  const gas: Gas[] = [];
  const cumulative = cumulativeMasses();
  while (gas.length < count) {
    const logHiMass = pick(cumulative, random.uniform());
    const { from, to } = DISTANCES;
    const distanceMpc = Math.cbrt(from ** 3 + (to ** 3 - from ** 3) * random.uniform());
    const fluxJyKms = 10 ** logHiMass / 2.356e5 / distanceMpc ** 2;
    // Line widths by the baryonic relation of Bradford et al. (2016), random inclination.
    const rotation = 10 ** ((Math.log10(1.33 * 10 ** logHiMass) - 3.21) / 3.24 + 0.06 * random.gaussian());
    const width50Kms = Math.max(20, 2 * rotation * Math.sqrt(1 - random.uniform() ** 2));
    const signalToNoise = ((1000 * fluxJyKms) / width50Kms) * (Math.sqrt(width50Kms / 20) / NOISE_MJY);
    if (signalToNoise < LEAST_SNR) continue;
    const czKms = H0 * distanceMpc + 200 * random.gaussian();
    gas.push({ logHiMass, distanceMpc, czKms, width50Kms, fluxJyKms, signalToNoise });
  }
  return gas;
}

const STEP = 0.02;

function cumulativeMasses(): number[] {
  const sums: number[] = [];
  let sum = 0;
  for (let log = MASSES.from; log < MASSES.to; log += STEP) {
    const x = 10 ** (log - MASS_FUNCTION.logStar);
    sums.push((sum += x ** (MASS_FUNCTION.alpha + 1) * Math.exp(-x)));
  }
  return sums.map((each) => each / sum);
}

function pick(cumulative: readonly number[], share: number): number {
  const bin = cumulative.findIndex((each) => each >= share);
  const before = bin > 0 ? cumulative[bin - 1]! : 0;
  return MASSES.from + STEP * (bin + (share - before) / (cumulative[bin]! - before));
}
