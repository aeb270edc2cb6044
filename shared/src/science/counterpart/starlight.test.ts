import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exclusiveProbabilities } from './exclusive.ts';
import { learnPrior, priorOf } from './learn-prior.ts';
import { fitLine } from './learn-relation.ts';
import { backgroundDensity, brighterDensity, counterpartDensity, countMagnitudes } from './magnitude-term.ts';
import { mergeIntoObjects, type RowPlace } from './merge-objects.ts';
import { dominatingObject, starlightVerdict, type StarlightEvidence } from './starlight.ts';

const LIMITS = {
  darkProbability: 0.8,
  noneOrMissedProbability: 0.9,
  minimumPower: 0.99,
  starlitProbability: 0.9,
  minimumProbability: 0.5,
  dominanceRatio: 5,
  nearlyDarkRatio: 20,
};
const evidence = (objects: number[], none: number, power: number | null, more: Partial<StarlightEvidence> = {}) => ({
  probabilities: { none, missed: 1 - none - objects.reduce((a, b) => a + b, 0), spurious: 0, objects },
  power,
  galaxiesInBeam: 0,
  discordant: objects.map(() => false),
  gasToLight: 1,
  ...more,
});
const verdict = (...args: Parameters<typeof evidence>) => starlightVerdict(evidence(...args), LIMITS);

describe('the starlight verdict', () => {
  it('is dark when nothing is found and the silence has power', () =>
    expect(verdict([0.02], 0.85, 0.995)).toBe('dark'));
  it('is never dark without power', () => {
    expect(verdict([0.02], 0.95, 0.98)).toBe('cannot tell');
    expect(verdict([0.02], 0.95, null)).toBe('cannot tell');
  });
  it('is starlit in shallow data too', () => {
    expect(verdict([0.95], 0.01, 0.1)).toBe('starlit');
    expect(verdict([0.95], 0.01, null)).toBe('starlit');
  });
  it('is starlit for an object that leads the next by five', () => expect(verdict([0.6, 0.1], 0.1, 1)).toBe('starlit'));
  it('is contested when none leads', () => expect(verdict([0.5, 0.3], 0.1, 1)).toBe('contested'));
  it('is contested when the leading object has another velocity', () =>
    expect(verdict([0.95], 0.03, 1, { discordant: [true] })).toBe('contested'));
  it('is nearly dark for an object with too little light, given the power', () => {
    expect(verdict([0.95], 0.01, 1, { gasToLight: 46 })).toBe('nearly dark');
    expect(verdict([0.95], 0.01, 0.5, { gasToLight: 46 })).toBe('cannot tell');
    expect(verdict([0.95], 0.01, 1, { gasToLight: NaN })).toBe('starlit');
  });
  it('is confused before anything else', () =>
    expect(verdict([0.95], 0.01, 1, { galaxiesInBeam: 2 })).toBe('confused'));
  it('cannot tell when nothing is sure', () => expect(verdict([0.3], 0.4, 1)).toBe('cannot tell'));
  it('always gives one of its words, and dark only as its thresholds say', () => {
    const p = fc.double({ min: 0, max: 1, noNaN: true });
    const weights = fc.array(fc.double({ min: 0, max: 1e4, noNaN: true }), { maxLength: 5 });
    fc.assert(
      fc.property(weights, p, p, fc.double({ min: 0, max: 100 }), fc.nat(3), (w, c, r, ratio, inBeam) => {
        const probabilities = exclusiveProbabilities(w, 0.97, c, r);
        const given = {
          probabilities,
          power: c,
          galaxiesInBeam: inBeam,
          discordant: w.map(() => false),
          gasToLight: ratio,
        };
        const word = starlightVerdict(given, LIMITS);
        expect(['dark', 'nearly dark', 'starlit', 'contested', 'confused', 'cannot tell']).toContain(word);
        if (word === 'dark') expect(probabilities.none >= 0.8 && c >= 0.99).toBe(true);
        if (word === 'starlit') expect(dominatingObject(given, LIMITS)).toBeGreaterThanOrEqual(0);
      }),
    );
  });
});

describe('the magnitude term', () => {
  const uniform = Float64Array.from({ length: 20_000 }, (_, i) => 15 + Math.log10(1 + (i * 9999) / 20_000) / 0.4 / 2.5);
  it('counts what is in the table', () => {
    const counts = countMagnitudes(uniform, 1e6)!;
    expect(counts.total).toBeCloseTo(0.02, 12);
    expect(brighterDensity(counts, 99)).toBe(counts.total);
    let sum = 0;
    for (let m = 10; m < 30; m += 0.01)
      sum += counterpartDensity({ magnitude: 18, scatterMag: 1.5, tailFraction: 0.05, tailScatterMag: 3 }, m) * 0.01;
    expect(sum).toBeCloseTo(1, 3);
  });
  it('never lets the background fall towards the faint end', () => {
    const counts = countMagnitudes(
      Float64Array.from({ length: 5000 }, (_, i) => 18 + Math.sin(i) * Math.cos(3 * i)),
      1e6,
    )!;
    for (let m = 14; m < 24; m += 0.1) {
      expect(backgroundDensity(counts, m + 0.1)).toBeGreaterThanOrEqual(backgroundDensity(counts, m) * (1 - 1e-12));
      expect(backgroundDensity(counts, m)).toBeGreaterThan(0);
    }
  });
  it('has nothing to count without magnitudes', () => expect(countMagnitudes([NaN, NaN], 1)).toBeUndefined());
});

describe('merging rows into objects', () => {
  const row = (east: number, catalogue: number, more: Partial<RowPlace> = {}): RowPlace => ({
    eastArcsec: east,
    northArcsec: 0,
    sigmaArcsec: 0.2,
    effectiveRadiusArcsec: NaN,
    catalogue,
    density: 1e-4,
    czKms: NaN,
    ...more,
  });
  it('joins one galaxy seen in two catalogues', () =>
    expect([...mergeIntoObjects([row(0, 0), row(0.8, 1)])]).toEqual([0, 0]));
  it('keeps two galaxies of two catalogues apart', () =>
    expect([...mergeIntoObjects([row(0, 0), row(6, 1)])]).toEqual([0, 1]));
  it('keeps a foreground star apart from the large galaxy behind it', () => {
    const rows = [row(0, 0, { effectiveRadiusArcsec: 30 }), row(20, 0, { isStar: true }), row(12, 0)];
    expect([...mergeIntoObjects(rows)]).toEqual([0, 1, 0]);
  });
  it('joins pieces inside the half-light radius', () =>
    expect([...mergeIntoObjects([row(0, 0, { effectiveRadiusArcsec: 10 }), row(8, 0), row(12, 0)])]).toEqual([
      0, 0, 1,
    ]));
  it('keeps neighbours of one catalogue apart', () =>
    expect([...mergeIntoObjects([row(0, 0), row(1, 0)])]).toEqual([0, 1]));
  it('keeps different velocities apart', () =>
    expect([...mergeIntoObjects([row(0, 0, { czKms: 3000 }), row(0.3, 1, { czKms: 9000 })])]).toEqual([0, 1]));
});

describe('learning from the survey', () => {
  it('finds the share of counterparts of a bin', () => {
    // Three quarters have evidence of a thousand, one quarter of a thousandth.
    const n = 4000;
    const evidence = Float64Array.from({ length: n }, (_, i) => (i % 4 === 0 ? 1e-3 : 1e3));
    const mass = new Float64Array(n).fill(8.7);
    const bins = learnPrior(mass, evidence, { fallback: 0.97, widthDex: 0.5, minimum: 100, pseudoCounts: 20 });
    expect(bins).toHaveLength(1);
    expect(priorOf(bins, 8.7, 0.97)).toBeCloseTo(0.75, 2);
    expect(priorOf(bins, 10, 0.97)).toBe(0.97);
  });
  it('stays with the fallback where there are few, or where the data say nothing', () => {
    const settings = { fallback: 0.97, widthDex: 0.5, minimum: 100, pseudoCounts: 20 };
    expect(learnPrior([9, 9], [1e-9, 1e-9], settings)[0]!.prior).toBe(0.97);
    const silent = learnPrior(new Float64Array(500).fill(9), new Float64Array(500).fill(1), settings);
    expect(silent[0]!.prior).toBeCloseTo(0.97, 6);
  });
  it('fits a line with outliers, and none with fewer than two hundred', () => {
    const x = Float64Array.from({ length: 500 }, (_, i) => 8 + (i % 50) / 20);
    const y = Float64Array.from(x, (v, i) => 9 + 1.1 * (v - 9.5) + 0.2 * Math.sin(i) + (i % 40 === 0 ? 8 : 0));
    const line = fitLine(x, y, 9.5)!;
    expect(line.slope).toBeCloseTo(1.1, 1);
    expect(line.intercept).toBeCloseTo(9, 1);
    expect(fitLine(x.subarray(0, 199), y.subarray(0, 199), 9.5)).toBeUndefined();
  });
});
