import { describe, expect, it } from 'vitest';
import { ARCSECOND, DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { fromBarycentric } from '../velocity/frames.ts';
import {
  distanceErrorEffect,
  hubbleConstantError,
  massFractionalError,
  redshiftDistanceError,
} from './distance-error.ts';
import { hubbleConsistency, hubbleDistance } from './hubble.ts';
import { angleOfKpc, kpcPerArcmin, megaLightYearsToMpc, projectedKpc, LIGHT_YEARS_PER_PARSEC } from './projection.ts';

const relative = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('hubbleDistance', () => {
  // Source: D = cz/H0; 1e-9.
  it.each([
    ['2488.28.70', 2488.277, 70, 35.546814285714284],
    ['2488.28.67.74', 2488.277, 67.74, 36.73275760259817],
    ['2464.4.70', 2464.4, 70, 35.205714285714286],
  ])('gives the check value 4.hubble.%s', (_name, velocity, h0, distance) => {
    expect(Math.abs(hubbleDistance(velocity, h0) - distance)).toBeLessThan(1e-9);
  });

  it('shows that z = 0.0083 and 28 Mpc do not go together (4.hubble.28Mpc_z0083)', () => {
    // Source: arithmetic; 1e-6.
    const { czKms, hubbleMpc, impliedH0, impliedPeculiarKms } = hubbleConsistency(0.0083, 28, 70);
    expect(czKms).toBeCloseTo(2488.2774013999997, 6);
    expect(hubbleMpc).toBeCloseTo(35.54682002, 6);
    expect(impliedH0).toBeCloseTo(88.86705004999999, 6);
    expect(impliedPeculiarKms).toBeCloseTo(528.2774013999997, 6);
  });

  it('differs by frame as in 4.hubble.fieldA.allframes', () => {
    // Source: computed with astropy 5.2; 0.01 Mpc.
    const at = (frame: 'barycentric' | 'km96' | 'yts77' | 'cmb') =>
      hubbleDistance(fromBarycentric(frame, 2464.4, 24.875 * DEGREE, 43.475 * DEGREE), 70);
    const distances = [at('barycentric'), at('km96'), at('yts77'), at('cmb')];
    [35.205714285714286, 38.61922243419441, 39.061259469450725, 31.695555084367477].forEach((expected, i) =>
      expect(Math.abs(distances[i]! - expected)).toBeLessThan(1e-6),
    );
    expect((Math.max(...distances) / Math.min(...distances)) ** 2).toBeCloseTo(1.5187831165952088, 6);
  });

  it('refuses a negative velocity', () => {
    expect(() => hubbleDistance(-100, 70)).toThrow(DomainError);
    expect(() => hubbleConsistency(0.01, 0, 70)).toThrow(DomainError);
  });
});

describe('distance errors', () => {
  // Source: quadrature; 1e-6 relative. 4.err.*
  it.each([
    [5, 0.571607114964073, 1.143214229928146, 0.49649163169106914, 1.2412290792276728],
    [10, 0.2858035574820365, 0.571607114964073, 0.24824581584553457, 0.6206145396138364],
    [20, 0.14290177874101825, 0.2858035574820365, 0.12412290792276728, 0.3103072698069182],
    [28, 0.10207269910072733, 0.20414539820145466, 0.08865921994483378, 0.22164804986208445],
    [50, 0.05716071149640731, 0.11432142299281461, 0.04964916316910692, 0.12412290792276728],
    [100, 0.028580355748203654, 0.05716071149640731, 0.02482458158455346, 0.06206145396138364],
  ])('give the check values at %d Mpc', (distance, fraction, massFraction, massDex, modulusMag) => {
    const error = redshiftDistanceError(200, 5, 70);
    expect(relative(error, 2.858035574820365)).toBeLessThan(1e-9);
    const effect = distanceErrorEffect(distance, error);
    expect(relative(effect.fraction, fraction)).toBeLessThan(1e-9);
    expect(relative(effect.massFraction, massFraction)).toBeLessThan(1e-9);
    expect(relative(effect.massDex, massDex)).toBeLessThan(1e-9);
    expect(relative(effect.modulusMag, modulusMag)).toBeLessThan(1e-9);
  });

  it('give the check value 4.err.mhi', () => {
    // Source: first-order propagation; 1e-6 relative.
    const fraction = massFractionalError(0.042 / 0.42, 2.858035574820365 / 28);
    expect(relative(fraction, 0.22732211420543866)).toBeLessThan(1e-9);
    expect(relative(fraction / Math.LN10, 0.09872473981400282)).toBeLessThan(1e-9);
  });

  it('never assume less than 160 km/s, and keep that of the Hubble constant apart', () => {
    expect(redshiftDistanceError(0, 0, 70)).toBe(160 / 70);
    expect(hubbleConstantError(28, 70, 2)).toBeCloseTo(0.8, 12);
    expect(() => redshiftDistanceError(-1, 0, 70)).toThrow(DomainError);
    expect(() => distanceErrorEffect(0, 1)).toThrow(DomainError);
  });
});

describe('projection', () => {
  it('gives the check values 4.units', () => {
    // Source: astropy.constants, Julian year; 1e-6 relative.
    expect(relative(megaLightYearsToMpc(94), 28.820531015841755)).toBeLessThan(1e-9);
    expect(relative(LIGHT_YEARS_PER_PARSEC, 3.2615637771674333)).toBeLessThan(1e-12);
    expect(relative(kpcPerArcmin(28), 8.144869842640205)).toBeLessThan(1e-9);
    expect(relative(projectedKpc(ARCSECOND, 28) * 1000, 135.7478307106701)).toBeLessThan(1e-9);
    expect(relative(projectedKpc(DEGREE, 28) / 1000, 0.4886921905584123)).toBeLessThan(1e-9);
    expect(relative(angleOfKpc(1000, 28) / DEGREE, 2.04627783975294)).toBeLessThan(1e-9);
    // The record's exact figure is the angle whose tangent is 1/28.
    expect(relative(Math.atan(angleOfKpc(1000, 28)) / DEGREE, 2.0454084888872277)).toBeLessThan(1e-9);
  });

  it('refuses a distance of nought', () => {
    expect(() => angleOfKpc(1000, 0)).toThrow(DomainError);
    expect(() => projectedKpc(-1, 28)).toThrow(DomainError);
  });
});
