import type { PlotPoint } from '@eremite/shared/contracts/plot';
import { HELIUM_FACTOR } from '@eremite/shared/science/hydrogen/baryonic-mass';
import { rotationOfUnknownInclination } from '@eremite/shared/science/velocity/inclination';

/** What a verdict holds that the plots of a survey need. */
export type PlottedVerdict = Pick<
  PlotPoint,
  'detectionId' | 'name' | 'starlight' | 'surroundings' | 'pAlone' | 'logHiMass'
> & {
  pNone: number;
  pMissed: number;
  pSpurious: number;
  distanceMpc: number | null;
  distanceErrorMpc: number | null;
  signalToNoise: number | null;
  width50Kms: number | null;
  gasToLight: number | null;
  gasToLightIsLimit: boolean;
};

/** Fractional flux error where no signal-to-noise ratio is given. Common practice. */
const UNSTATED_FLUX_ERROR = 0.1;

const logOf = (value: number | null): number | null => (value !== null && value > 0 ? Math.log10(value) : null);
const sum = (a: number, b: number): number => Math.log10(10 ** a + 10 ** b);

/**
 * Numbers of one detection behind the plots.
 *
 * @param massToLightR stellar mass over r luminosity, solar units
 * @returns the point; null where a quantity cannot be told
 *
 * The mass error is that of the flux (1 / (S/N)) and twice that of the distance, in quadrature; the ratio of gas to light
 * has only the first, for the distance drops out. Width is W50 as listed: neither the instrument nor turbulence is taken
 * off. Inclinations are unknown where there is no starlight: the speed is that of random orientations.
 */
export function plotPoint(verdict: PlottedVerdict, massToLightR: number): PlotPoint {
  const { detectionId, name, starlight, surroundings, pAlone, logHiMass, gasToLightIsLimit } = verdict;
  const fluxError = (verdict.signalToNoise ?? 0) > 0 ? 1 / verdict.signalToNoise! : UNSTATED_FLUX_ERROR;
  const far = verdict.distanceMpc ?? 0;
  const distanceError = far > 0 ? (verdict.distanceErrorMpc ?? 0) / far : 0;
  const logGasToLight = logOf(verdict.gasToLight);
  const logLight = logHiMass !== null && logGasToLight !== null ? logHiMass - logGasToLight : null;
  const logGas = logHiMass === null ? null : logHiMass + Math.log10(HELIUM_FACTOR);
  const logStars = logLight === null ? null : logLight + Math.log10(massToLightR);
  const whole = logGas !== null && logStars !== null ? sum(logGas, logStars) : null;
  const width = verdict.width50Kms;
  const speed = width !== null && width > 0 ? rotationOfUnknownInclination(width) : undefined;
  return {
    detectionId,
    name,
    starlight,
    surroundings,
    pNoStarlight: Math.min(1, verdict.pNone + verdict.pMissed + verdict.pSpurious),
    pAlone,
    logHiMass,
    logHiMassError: logHiMass === null ? null : Math.hypot(fluxError, 2 * distanceError) / Math.LN10,
    logLight,
    lightIsLimit: gasToLightIsLimit,
    logGasToLight,
    logGasToLightError: logGasToLight === null ? null : fluxError / Math.LN10,
    logBaryonicMass: gasToLightIsLimit ? logGas : whole,
    logBaryonicMassUpTo: whole,
    logSpeed: logOf(speed?.medianKms ?? null),
    logSpeedLow: logOf(speed?.lower16Kms ?? null),
    logSpeedHigh: logOf(speed?.upper84Kms ?? null),
  };
}
