import { expect, it } from 'vitest';
import { plotPoint, type PlottedVerdict } from './plot-point.ts';

const verdict: PlottedVerdict = {
  detectionId: 'd',
  name: 'one',
  starlight: 'starlit',
  surroundings: 'alone',
  pNone: 0.01,
  pMissed: 0.02,
  pSpurious: 0.03,
  pAlone: 0.9,
  logHiMass: 9,
  distanceMpc: 40,
  distanceErrorMpc: 4,
  signalToNoise: 10,
  width50Kms: 100,
  gasToLight: 2,
  gasToLightIsLimit: false,
};

it('takes light and stars from the gas and its ratio to light', () => {
  const point = plotPoint(verdict, 0.75);
  // 1e9 / 2 = 5e8 L; 0.75 x 5e8 = 3.75e8 of stars and 1.33e9 of gas: 1.705e9.
  expect(point.logLight).toBeCloseTo(Math.log10(5e8), 12);
  expect(point.logBaryonicMass).toBeCloseTo(Math.log10(1.705e9), 12);
  expect(point.logBaryonicMassUpTo).toBe(point.logBaryonicMass);
  expect(point.pNoStarlight).toBeCloseTo(0.06, 12);
});

it('gives gas alone, and with as many stars as the limit allows, where the light is a limit', () => {
  const point = plotPoint({ ...verdict, gasToLightIsLimit: true }, 0.75);
  expect(point.logBaryonicMass).toBeCloseTo(Math.log10(1.33e9), 12);
  expect(point.logBaryonicMassUpTo).toBeCloseTo(Math.log10(1.705e9), 12);
});

it('gives the mass the errors of flux and, twice over, of distance, and the ratio that of the flux alone', () => {
  const point = plotPoint(verdict, 0.75);
  // sqrt(0.1^2 + (2 x 0.1)^2) / ln 10.
  expect(point.logHiMassError).toBeCloseTo(Math.sqrt(0.05) / Math.LN10, 12);
  expect(point.logGasToLightError).toBeCloseTo(0.1 / Math.LN10, 12);
});

it('gives the speed of a random inclination: the median is that of 60 degrees', () => {
  const point = plotPoint(verdict, 0.75);
  expect(10 ** point.logSpeed!).toBeCloseTo(100 / (2 * Math.sin(Math.PI / 3)), 9);
  expect(point.logSpeedLow!).toBeLessThan(point.logSpeed!);
  expect(point.logSpeedHigh!).toBeGreaterThan(point.logSpeed!);
});

it('leaves out what cannot be told', () => {
  const point = plotPoint({ ...verdict, logHiMass: null, width50Kms: null, gasToLight: null, pAlone: null }, 0.75);
  expect(point).toMatchObject({
    logHiMassError: null,
    logLight: null,
    logBaryonicMass: null,
    logBaryonicMassUpTo: null,
    logSpeed: null,
    logGasToLightError: null,
  });
});
