import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { continuum } from './continuum.ts';
import { distanceDoubt } from './distance.ts';
import { doubt, inWords, worstGrade } from './doubt.ts';
import { edge } from './edge.ts';
import { extinctionDoubt } from './extinction.ts';
import { hydroxyl } from './hydroxyl.ts';
import type { InfraredSource } from './hydroxyl.ts';
import { COMMON_INTERFERENCE, interference } from './interference.ts';
import { recombinationLine } from './recombination-line.ts';
import { sidelobe } from './sidelobe.ts';
import { spuriousLine } from './spurious-line.ts';

// Thresholds are common practice unless a source stands beside them.

describe('a doubt', () => {
  const rule = { name: 'edge', rule: '', source: '' } as const;

  it('leaves out a number that is not finite', () => {
    expect(doubt(rule, 'clear', '.', NaN, 'mag')).not.toHaveProperty('value');
    expect(doubt(rule, 'clear', '.', 0, 'mag')).toMatchObject({ value: 0, unit: 'mag' });
  });

  it('counts as worse when not testable than when clear, but not as watched', () => {
    const of = (grade: 'clear' | 'watch' | 'serious' | 'not testable here') => doubt(rule, grade, '.');
    expect(worstGrade([])).toBe('clear');
    expect(worstGrade([of('clear'), of('not testable here')])).toBe('not testable here');
    expect(worstGrade([of('watch'), of('not testable here')])).toBe('watch');
    expect(worstGrade([of('serious'), of('watch')])).toBe('serious');
  });

  it.each([
    [0, '0'],
    [0.0123456, '0.0123'],
    [97.73844, '97.7'],
    [1234.5, '1235'],
    [2.5e9, '2.5e+9'],
    [-31.04, '-31'],
  ])('writes %d as %s', (value, text) => {
    expect(inWords(value)).toBe(text);
  });
});

describe('doubt of a spurious line', () => {
  it.each([
    [0.94, 20, 'serious'],
    [0.97, 20, 'watch'],
    [0.999, 3, 'clear'],
    [NaN, 4, 'serious'],
    [NaN, 6, 'watch'],
    [NaN, 10, 'clear'],
    [NaN, NaN, 'not testable here'],
  ])('with reliability %d and S/N %d is %s', (reliability, signalToNoise, grade) => {
    expect(spuriousLine({ reliability, signalToNoise }).grade).toBe(grade);
  });

  it('refuses a reliability in per cent', () => {
    expect(() => spuriousLine({ reliability: 98, signalToNoise: 5 })).toThrow(DomainError);
  });
});

describe('doubt of hydroxyl', () => {
  const source = (values: Partial<InfraredSource>): InfraredSource => ({
    name: 'source',
    separationArcsec: 10,
    w1MinusW2: 0.9,
    redshift: NaN,
    redshiftError: NaN,
    ...values,
  });
  const of = (...sources: InfraredSource[]) => hydroxyl({ redshift: 0.03, sources, radiusArcsec: 40, covered: true });

  it('is serious for a red source at z 0.2091, where 1667 MHz would be (ratio of the rest frequencies)', () => {
    expect(of(source({ redshift: 0.2088 }))).toMatchObject({ grade: 'serious', unit: 'redshift' });
    expect(of(source({ redshift: 0.2088 })).value).toBeCloseTo(0.20907691253879546, 9);
    expect(of(source({ redshift: 0.18, redshiftError: 0.03 })).grade).toBe('serious');
  });

  it('is watched for a red source without a redshift, and clear for one elsewhere, blue or outside', () => {
    expect(of(source({})).grade).toBe('watch');
    expect(of(source({ redshift: 0.08 })).grade).toBe('clear');
    expect(of(source({ redshift: 0.2088, w1MinusW2: 0.1 })).grade).toBe('clear');
    expect(of(source({ redshift: 0.2088, separationArcsec: 41 })).grade).toBe('clear');
    expect(of(source({ redshift: 0.2088, w1MinusW2: NaN })).grade).toBe('clear');
  });

  it('is not testable without infrared coverage or a velocity', () => {
    expect(hydroxyl({ redshift: 0.03, sources: [], radiusArcsec: 40, covered: false }).grade).toBe('not testable here');
    expect(hydroxyl({ redshift: NaN, sources: [], radiusArcsec: 40, covered: true }).grade).toBe('not testable here');
  });
});

describe('doubt of a recombination line', () => {
  const at = (czKms: number, latitude: number, continuumMjy: number) =>
    recombinationLine({ czKms, width50Kms: 40, galacticLatRad: latitude * DEGREE, continuumMjy });

  it('is serious at cz 4507 (H167 alpha, Rydberg formula) in the plane with continuum', () => {
    expect(at(4507, 0.5, 400).grade).toBe('serious');
    expect(at(4507, 0.5, 400).sentence).toContain('H167 alpha');
    expect(at(4507, 0.5, NaN).grade).toBe('watch');
  });

  it('is clear away from the plane, without continuum, or at another velocity', () => {
    expect(at(4507, 30, 400).grade).toBe('clear');
    expect(at(4507, 0.5, 3).grade).toBe('clear');
    expect(at(7000, 0.5, 400).grade).toBe('clear');
    expect(at(NaN, 0.5, 400).grade).toBe('not testable here');
  });
});

describe('doubt of interference', () => {
  const at = (czKms: number, topocentric = false, width50Kms = 40) =>
    interference({ czKms, topocentric, width50Kms, channelKms: 5, bands: COMMON_INTERFERENCE });

  it('is serious at 1381.05 MHz, cz 8543.18 (GPS L3)', () => {
    expect(at(8543.18)).toMatchObject({ grade: 'serious', value: 0 });
    expect(at(8543.18).sentence).toContain('GPS L3');
  });

  it('allows for the motion of the Earth where the velocity is barycentric', () => {
    // GPS L3 ends at 1380.05 MHz, cz 8766.4; 45 km/s beyond is outside W50/2 + 1 channel = 25 but inside 25 + 31
    const beyond = 8766.4 + 45 * 1.03;
    expect(at(beyond).grade).toBe('watch');
    expect(at(beyond, true).grade).toBe('clear');
    expect(at(5000).grade).toBe('clear');
  });

  it('does not let a missing width hide it, and is not testable without a list', () => {
    expect(at(8543.18, false, NaN).grade).toBe('serious');
    const none = { czKms: 5000, topocentric: false, width50Kms: 40, channelKms: 5, bands: [] };
    expect(interference(none).grade).toBe('not testable here');
    expect(() => interference({ ...none, bands: [{ name: 'x', lowMhz: 1400, highMhz: 1300 }] })).toThrow(/x runs from/);
  });
});

describe('doubt of a sidelobe', () => {
  const strong = { name: 'strong', separationArcmin: 3.5, velocityDifferenceKms: 20, fluxJyKms: 30, width50Kms: 100 };
  const of = (values: Partial<typeof strong>) =>
    sidelobe({ sources: [{ ...strong, ...values }], beamArcmin: 3.5, fluxJyKms: 1, width50Kms: 40 });

  it('is serious beside a source 30 times brighter at the same velocity', () => {
    expect(of({})).toMatchObject({ grade: 'serious', value: 30, unit: 'flux ratio' });
    expect(of({ fluxJyKms: 8 }).grade).toBe('watch');
  });

  it('is clear for one at another velocity, in the beam, too far or too faint', () => {
    expect(of({ velocityDifferenceKms: 300 }).grade).toBe('clear');
    expect(of({ separationArcmin: 1 }).grade).toBe('clear');
    expect(of({ separationArcmin: 10 }).grade).toBe('clear');
    expect(of({ fluxJyKms: 4 }).grade).toBe('clear');
    expect(of({ fluxJyKms: NaN }).grade).toBe('clear');
  });

  it('is not testable without beam or flux', () => {
    expect(sidelobe({ sources: [], beamArcmin: NaN, fluxJyKms: 1, width50Kms: 40 }).grade).toBe('not testable here');
    expect(sidelobe({ sources: [], beamArcmin: 3, fluxJyKms: 0, width50Kms: 40 }).grade).toBe('not testable here');
  });
});

describe('doubt of continuum', () => {
  it.each([
    [20, true, 'clear'],
    [70, true, 'watch'],
    [150, true, 'serious'],
    [NaN, true, 'clear'],
    [NaN, false, 'not testable here'],
  ])('with %d mJy and coverage %s is %s', (strongestMjy, covered, grade) => {
    expect(continuum({ strongestMjy, covered }).grade).toBe(grade);
  });
});

describe('doubt of extinction', () => {
  it.each([
    [0.03, 50, 'clear'],
    [0.2, 50, 'watch'],
    [5, 50, 'not testable here'],
    [0.03, -5, 'watch'],
    [0.5, -5, 'not testable here'],
    [NaN, 3, 'not testable here'],
    [NaN, 50, 'not testable here'],
  ])('with E(B-V) %d at latitude %d is %s', (ebvMag, latitude, grade) => {
    const result = extinctionDoubt({ ebvMag, galacticLatRad: latitude * DEGREE });
    expect(result.grade).toBe(grade);
    expect(result.sentence).not.toContain('NaN');
  });

  it('refuses a negative E(B-V)', () => {
    expect(() => extinctionDoubt({ ebvMag: -0.1, galacticLatRad: 1 })).toThrow(DomainError);
  });
});

describe('doubt of an edge', () => {
  it.each([
    [1, 1, 'clear'],
    [0.9, 1, 'watch'],
    [0.79, 1, 'serious'],
    [1, 0.5, 'serious'],
    [NaN, NaN, 'not testable here'],
    [NaN, 1, 'not testable here'],
    [NaN, 0.5, 'serious'],
  ])('with %d of the window and %d of the circle covered is %s', (neighbourCovered, counterpartCovered, grade) => {
    expect(edge({ neighbourCovered, counterpartCovered }).grade).toBe(grade);
  });

  it('refuses a share in per cent', () => {
    expect(() => edge({ neighbourCovered: 95, counterpartCovered: 1 })).toThrow(DomainError);
  });
});

describe('doubt of the distance', () => {
  const base = { kind: 'hubble' as const, distanceMpc: 38.6, errorMpc: 2.9, localGroupKms: 2703, cautions: [] };

  it.each([
    [{}, 'clear'],
    [{ errorMpc: 10 }, 'watch'],
    [{ errorMpc: 20 }, 'serious'],
    [{ localGroupKms: 1200 }, 'watch'],
    [{ localGroupKms: 1200, kind: 'measured' as const }, 'clear'],
    [{ cautions: ['inside the cone of Virgo'] }, 'watch'],
    [{ errorMpc: NaN }, 'watch'],
    [{ kind: 'none' as const, distanceMpc: NaN, errorMpc: NaN }, 'serious'],
  ])('with %j is %s', (values, grade) => {
    const result = distanceDoubt({ ...base, ...values });
    expect(result.grade).toBe(grade);
    expect(result.sentence).not.toContain('NaN');
  });
});
