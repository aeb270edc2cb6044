import { describe, expect, it } from 'vitest';
import { ARCSECOND } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { BANDS } from '../photometry/bands.ts';
import { expectedCounterpart, expectedCounterpartFromFlux } from './expected-counterpart.ts';
import type { ExpectedCounterpart } from './expected-counterpart.ts';
import { hiMass } from './hi-mass.ts';

function predicted(result: ReturnType<typeof expectedCounterpart>): ExpectedCounterpart {
  if (result.kind !== 'expected') throw new Error(result.reason);
  return result;
}

describe('expected counterpart', () => {
  it('at the pivot has the magnitude of 1e9 solar masses at M/L 0.75, half a magnitude brighter', () => {
    const { magnitudeAb, scatterMag, logStellarMass } = predicted(expectedCounterpart(9.5, 40, 'r', 0));
    expect(logStellarMass).toBe(9);
    expect(magnitudeAb).toBeCloseTo(BANDS.r.solarAb - 2.5 * Math.log10(1e9 / 0.75) - 0.5 + 5 * Math.log10(40) + 25, 9);
    expect(scatterMag).toBe(1.3);
  });

  it('is dimmed by extinction in its band', () => {
    const clear = predicted(expectedCounterpart(8.5, 30, 'NUV', 0));
    const dusty = predicted(expectedCounterpart(8.5, 30, 'NUV', 0.1));
    expect(dusty.magnitudeAb - clear.magnitudeAb).toBeCloseTo(0.795, 9);
  });

  it('has the same physical size at any distance and half the angle at twice the distance', () => {
    const near = predicted(expectedCounterpart(8.5, 30, 'r', 0));
    const far = predicted(expectedCounterpart(8.5, 60, 'r', 0));
    expect(near.radiusKpc).toEqual(far.radiusKpc);
    expect(near.radiusArcsec[0]!.median / far.radiusArcsec[0]!.median).toBeCloseTo(2, 12);
    expect(near.radiusArcsec[0]!.median * ARCSECOND * 30_000).toBeCloseTo(near.radiusKpc[0]!.median, 9);
  });

  it('is not predicted in W3 and W4, and says why', () => {
    const result = expectedCounterpart(8.5, 30, 'W4', 0);
    expect(result).toMatchObject({ kind: 'not predicted', band: 'W4' });
  });

  it('without a distance follows from the flux within half a magnitude per factor ten in distance', () => {
    const fromFlux = predicted(expectedCounterpartFromFlux(1, 'r', 0));
    const at5 = predicted(expectedCounterpart(Math.log10(hiMass(1, 5)), 5, 'r', 0));
    expect(Math.abs(fromFlux.magnitudeAb - at5.magnitudeAb)).toBeLessThan(0.25);
    expect(fromFlux.scatterMag).toBeGreaterThanOrEqual(1.5);
    expect(fromFlux.basis).toBe('flux');
    expect(fromFlux.radiusArcsec[0]!.scatterDex).toBeGreaterThan(at5.radiusArcsec[0]!.scatterDex);
  });

  it('refuses a distance or a flux that is not usable', () => {
    expect(() => expectedCounterpart(8.5, 0, 'r', 0)).toThrow(DomainError);
    expect(() => expectedCounterpart(NaN, 10, 'r', 0)).toThrow(DomainError);
    expect(() => expectedCounterpart(8.5, 10, 'r', -0.1)).toThrow(DomainError);
    expect(() => expectedCounterpartFromFlux(0, 'r', 0)).toThrow(DomainError);
  });
});
