import { describe, expect, it } from 'vitest';
import { ARCSECOND, DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { separation } from '../sky/separation.ts';
import { CONTROL_RING, clearOfSources, controlPositions, independentOffsets } from './control-positions.ts';
import { PUBLISHED_BASE_RATES, chanceAlignment, chanceFraction, correctedCounts } from './control.ts';
import { drawError, drawsForError, drawsForHalfWidth, neverMetLimit, nextDraws } from './draws.ts';
import { normalCdf } from './error-function.ts';
import { FWHM_PER_SIGMA } from './gaussian.ts';
import { incompleteBeta } from './incomplete-beta.ts';
import { clopperPearsonInterval, poissonInterval, wilsonInterval } from './intervals.ts';
import { normalQuantile } from './normal-quantile.ts';
import { Random, randomStream } from './random.ts';

describe('random numbers', () => {
  it('are those of xoshiro128** 1.1 from the state 1, 2, 3, 4 (computed with an independent implementation)', () => {
    const random = Random.fromState([1, 2, 3, 4]);
    const expected = [
      11520, 0, 5927040, 70819200, 2031721883, 1637235492, 1287239034, 3734860849, 3729100597, 4258142804,
    ];
    expect(expected.map(() => random.bits())).toEqual(expected);
  });

  it('repeat with the same seed and key and differ with another', () => {
    const take = (random: Random) => Array.from({ length: 5 }, () => random.gaussian());
    expect(take(randomStream(7, 'source 12, distance'))).toEqual(take(randomStream(7, 'source 12, distance')));
    expect(take(randomStream(7, 'source 12, distance'))).not.toEqual(take(randomStream(7, 'source 13, distance')));
    expect(take(randomStream(7, 'source 12, distance'))).not.toEqual(take(randomStream(8, 'source 12, distance')));
  });

  it('are uniform: 16 bins of 160000 pass a chi-square test at 0.1 per cent', () => {
    const random = new Random(2026);
    const bins = new Array<number>(16).fill(0);
    for (let k = 0; k < 160_000; k++) bins[Math.floor(16 * random.uniform())]!++;
    const chiSquare = bins.reduce((sum, n) => sum + (n - 10_000) ** 2 / 10_000, 0);
    expect(chiSquare).toBeLessThan(37.7); // 99.9 per cent point of 15 degrees of freedom
  });

  it('are normal: mean, variance and tail of 200000', () => {
    const random = new Random(5);
    const values = Array.from({ length: 200_000 }, () => random.gaussian());
    const mean = values.reduce((a, b) => a + b, 0) / values.length;
    const variance = values.reduce((a, b) => a + (b - mean) ** 2, 0) / values.length;
    const beyond = values.filter((x) => Math.abs(x) > 1.959963984540054).length / values.length;
    expect(Math.abs(mean)).toBeLessThan(4 / Math.sqrt(200_000));
    expect(Math.abs(variance - 1)).toBeLessThan(4 * Math.sqrt(2 / 200_000));
    expect(Math.abs(beyond - 0.05)).toBeLessThan(4 * Math.sqrt((0.05 * 0.95) / 200_000));
  });

  it('refuse a seed that is no unsigned 32-bit integer', () => {
    expect(() => new Random(-1)).toThrow(DomainError);
    expect(() => new Random(0.5)).toThrow(DomainError);
    expect(() => Random.fromState([0, 0, 0, 0])).toThrow(DomainError);
  });
});

describe('quantiles', () => {
  it('of the normal deviate: 1.959963984540054 at 0.975, 3.090232306167814 at 0.999 (Abramowitz & Stegun, Table 26.5)', () => {
    expect(normalQuantile(0.975)).toBeCloseTo(1.959963984540054, 13);
    expect(normalQuantile(0.001)).toBeCloseTo(-3.090232306167814, 12);
    expect(normalQuantile(0.5)).toBe(0);
    expect(() => normalQuantile(1)).toThrow(DomainError);
  });

  it.each([1e-9, 1e-4, 0.3, 0.7, 0.9999])('are undone by the distribution at %d', (p) => {
    expect(Math.abs(normalCdf(normalQuantile(p)) / p - 1)).toBeLessThan(1e-12);
  });

  it('FWHM over sigma is 2 sqrt(2 ln 2)', () => {
    expect(FWHM_PER_SIGMA).toBeCloseTo(2.3548200450309493, 12);
  });

  it('of the incomplete beta function: I_x(2, 3) is a polynomial', () => {
    const x = 0.37;
    expect(incompleteBeta(2, 3, x)).toBeCloseTo(6 * x ** 2 - 8 * x ** 3 + 3 * x ** 4, 13);
    expect(incompleteBeta(2, 3, 0.8)).toBeCloseTo(6 * 0.64 - 8 * 0.512 + 3 * 0.4096, 13);
  });
});

describe('intervals', () => {
  // Wilson (1927); Clopper & Pearson (1934); 95 per cent, computed with scipy
  it.each([
    [950, 1000, [0.9346861797557492, 0.9618697376072513], [0.9346095120845064, 0.9626646023953382]],
    [0, 1000, [0, 0.0038267584855551234], [0, 0.003682083896865671]],
    [1000, 1000, [0.996173241514445, 1], [0.9963179161031344, 1]],
    [3, 200, [0.00511423779325831, 0.04316572879269026], [0.003104107621553509, 0.0432082819177126]],
  ] as const)('of %d in %d', (k, n, wilson, exact) => {
    expect(wilsonInterval(k, n).low).toBeCloseTo(wilson[0], 9);
    expect(wilsonInterval(k, n).high).toBeCloseTo(wilson[1], 9);
    expect(clopperPearsonInterval(k, n).low).toBeCloseTo(exact[0], 9);
    expect(clopperPearsonInterval(k, n).high).toBeCloseTo(exact[1], 9);
  });

  // Garwood (1936); Gehrels (1986), ApJ 303, 336
  it.each([
    [0, [0, 1.841021644892387], [0, 3.6888794541139354]],
    [1, [0.17275377904548955, 3.2995265589635574], [0.025317807984289897, 5.571643390938898]],
    [3, [1.3672953139682904, 5.9181858326838706], [0.6186721228956015, 8.767273069742323]],
    [10, [6.891305560827194, 14.266949760706916], [4.7953886961324335, 18.39035604201778]],
    [50, [42.95266317463354, 58.118224605876186], [37.110963737461866, 65.91876666433681]],
  ] as const)('of a count of %d', (k, one, two) => {
    const oneSigma = poissonInterval(k, 0.6827);
    expect(Math.abs(oneSigma.low - one[0])).toBeLessThan(1e-3);
    expect(Math.abs(oneSigma.high - one[1])).toBeLessThan(1e-3);
    expect(Math.abs(poissonInterval(k).low - one[0])).toBeLessThan(1e-5);
    expect(Math.abs(poissonInterval(k).high - one[1])).toBeLessThan(1e-5);
    expect(Math.abs(poissonInterval(k, 0.95).low - two[0])).toBeLessThan(1e-9);
    expect(Math.abs(poissonInterval(k, 0.95).high - two[1])).toBeLessThan(1e-9);
  });

  it('refuse counts that are not whole or too many', () => {
    expect(() => wilsonInterval(3, 2)).toThrow(DomainError);
    expect(() => clopperPearsonInterval(1.5, 2)).toThrow(DomainError);
    expect(() => poissonInterval(-1)).toThrow(DomainError);
    expect(() => poissonInterval(1, 1)).toThrow(DomainError);
  });
});

describe('number of draws', () => {
  // binomial variance
  it.each([
    [0.5, 0.01, 2500],
    [0.95, 0.005, 1900],
    [0.05, 0.005, 1900],
    [0.99, 0.002, 2475],
  ])('at p %d for a standard error of %d is %d', (p, error, n) => {
    expect(drawsForError(p, error)).toBeCloseTo(n, 9);
  });

  it('for a 95 per cent half-width of 0.01 (normal approximation)', () => {
    // To a millionth; the listed values use 1.959963985 for the deviate.
    expect(Math.abs(drawsForHalfWidth(0.5, 0.01) / 9603.6470562427 - 1)).toBeLessThan(1e-6);
    expect(Math.abs(drawsForHalfWidth(0.95, 0.01) / 1824.6929406861145 - 1)).toBeLessThan(1e-6);
  });

  it('gives at p 0.9 and 1000 draws a standard error of 0.00949 (binomial)', () => {
    expect(drawError(0.9, 1000)).toBeCloseTo(0.009486832980505138, 9);
  });

  it('without a success in 1000 limits the probability to 0.00299 (1 - 0.05^(1/N)), near 3/N', () => {
    expect(neverMetLimit(1000)).toBeCloseTo(0.0029912495450953314, 9);
    expect(Math.abs(neverMetLimit(1000) - 0.003)).toBeLessThan(1e-5);
  });

  it('doubles while the interval straddles the cut, up to the cap', () => {
    expect(nextDraws(1600, 2000, 0.8)).toBe(4000);
    expect(nextDraws(1990, 2000, 0.8)).toBe(2000);
    expect(nextDraws(6400, 8000, 0.8)).toBe(10_000);
    expect(nextDraws(8000, 10_000, 0.8)).toBe(10_000);
  });

  it('finds a neighbour 2 degrees away inside 1 Mpc with probability 0.59 when D = 28 +- 2.858 Mpc (Gaussian)', () => {
    const separationMpc = 28 * 2 * DEGREE;
    const sigma = 2.858035574820365 * 2 * DEGREE;
    expect(separationMpc).toBeCloseTo(0.9773843811168246, 9);
    expect(sigma).toBeCloseTo(0.09976426183948824, 9);
    expect(normalCdf((1 - separationMpc) / sigma)).toBeCloseTo(0.5896678257021722, 9);
    // The same from draws of one shared distance, with the generator.
    const random = new Random(11);
    const draws = 40_000;
    let inside = 0;
    for (let k = 0; k < draws; k++) if ((28 + 2.858035574820365 * random.gaussian()) * 2 * DEGREE <= 1) inside++;
    const { low, high } = wilsonInterval(inside, draws, 0.999);
    expect(low).toBeLessThan(0.5896678257021722);
    expect(high).toBeGreaterThan(0.5896678257021722);
  });
});

describe('control', () => {
  it('gives chance and true fractions: 240 chance matches in 200 x 20, 150 of 200 matched (binomial, Poisson)', () => {
    const chance = chanceFraction(240, 4000);
    expect(chance.fraction).toBeCloseTo(0.06, 12);
    expect(chance.error).toBeCloseTo(0.003872983346207417, 9);
    expect(chance.interval.low).toBeLessThan(0.06);
    expect(chance.interval.high).toBeGreaterThan(0.06);
    const counts = correctedCounts(150, 200, chance.fraction);
    expect(counts.trueFraction).toBeCloseTo(0.7340425531914894, 9);
    expect(counts.trueFractionError).toBeCloseTo(0.03257300189871248, 9);
    expect(counts.withoutCounterpart).toBeCloseTo(53.19148936170213, 9);
    expect(counts.hiddenByChance).toBeCloseTo(3.1914893617021276, 9);
  });

  it('without a chance match still allows 1.841 of them (Garwood 1936)', () => {
    expect(chanceFraction(0, 100)).toMatchObject({ fraction: 0, error: 0, interval: { low: 0 } });
    expect(chanceFraction(0, 100).interval.high).toBeCloseTo(0.01841, 5);
    expect(() => chanceFraction(0, 0)).toThrow(DomainError);
    expect(() => correctedCounts(1, 10, 1)).toThrow(DomainError);
  });

  // Poisson
  it.each([
    [1000, 60, 0.8726646259971648, 0.5821633139356791],
    [1000, 30, 0.2181661564992912, 0.19600815790229298],
    [50, 60, 0.04363323129985824, 0.04269499739562732],
  ])('at %d per square degree inside %d arcsec', (density, radius, mean, probability) => {
    expect(chanceAlignment(density, radius).mean).toBeCloseTo(mean, 6);
    expect(chanceAlignment(density, radius).probability).toBeCloseTo(probability, 6);
  });

  it("holds the published base rates (O'Beirne et al. 2025; Kwon et al. 2025; Haynes et al. 2018)", () => {
    const [wallaby, alfalfa] = PUBLISHED_BASE_RATES;
    expect(wallaby.dark / wallaby.sources).toBeCloseTo(0.030071077091306724, 12);
    expect(wallaby.reliable / wallaby.sources).toBeCloseTo(0.02077638053581192, 12);
    expect(wallaby.tidal / wallaby.reliable).toBeCloseTo(0.34210526315789475, 12);
    expect(wallaby.isolated / wallaby.sources).toBeCloseTo(0.01366867140513942, 12);
    expect(alfalfa.dark / alfalfa.sources).toBeCloseTo(0.010920634920634921, 12);
    expect(alfalfa.isolated / alfalfa.sources).toBeCloseTo(0.004507936507936508, 12);
    expect(alfalfa.tidal / alfalfa.dark).toBeCloseTo(0.24127906976744187, 12);
  });
});

describe('control positions', () => {
  const source = { lon: 0.001, lat: 1.2 };
  const radius = 60 * ARCSECOND;

  it('lie in the ring, repeat with the seed, and fill it evenly by area', () => {
    const ring = { ...CONTROL_RING, count: 4000 };
    const { positions } = controlPositions(source, radius, new Random(3), () => true, ring);
    const distances = positions.map(({ lon, lat }) => separation(source.lon, source.lat, lon, lat) / radius);
    expect(Math.min(...distances)).toBeGreaterThanOrEqual(5);
    expect(Math.max(...distances)).toBeLessThanOrEqual(60);
    const median = distances.sort((a, b) => a - b)[2000]!;
    expect(Math.abs(median - Math.sqrt((25 + 3600) / 2))).toBeLessThan(1);
    expect(controlPositions(source, radius, new Random(3), () => true, ring).positions).toEqual(positions);
  });

  it('keep clear of HI sources, and are dropped rather than counted where nothing is usable', () => {
    const others = [source, { lon: 0.01, lat: 1.2 }];
    const clear = clearOfSources(others, 10 * radius);
    const { positions } = controlPositions(source, radius, new Random(3), clear);
    expect(positions.length).toBeGreaterThan(0);
    for (const place of positions) {
      expect(separation(place.lon, place.lat, 0.01, 1.2)).toBeGreaterThanOrEqual(10 * radius);
    }
    expect(controlPositions(source, radius, new Random(3), () => false)).toEqual({ positions: [], asked: 20 });
  });

  it('hold 3575 independent circles in the default ring', () => {
    expect(independentOffsets()).toBe(3575);
    expect(() => controlPositions(source, 0, new Random(1), () => true)).toThrow(DomainError);
  });
});
