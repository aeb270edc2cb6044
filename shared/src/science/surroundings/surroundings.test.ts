import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { aloneProbability } from './alone-probability.ts';
import {
  localDensity,
  projectedDensity,
  spoilsIsolation,
  tidalIndex,
  tidalIndexOfFive,
  tidalStrength,
} from './density-measures.ts';
import { criticalDensity, isMember, r200Kpc, v200Kms } from './group-membership.ts';
import { upperIncompleteGamma } from '../robustness/gamma-function.ts';
import {
  clusteringBoost,
  coverageCorrected,
  excessVolume,
  hiClustering,
  luminousClustering,
  missedNeighbours,
  windowLength,
  windowVolume,
} from './missed-neighbours.ts';
import { angleOfKpc, projectedKpc } from './projected-separation.ts';
import { measuredRedshiftDepth } from './redshift-depth.ts';
import { densityBrighterThan } from './schechter.ts';
import { surroundingsVerdict } from './surroundings-verdict.ts';

const WINDOW = { radiusMpc: 1, velocityWindowKms: 500, h0: 70 };

describe('projected separations', () => {
  it.each([
    // small angle; records 7.offset.*
    [30, 10, 1.454441043328608],
    [30, 28, 4.072434921320102],
    [30, 100, 14.54441043328608],
    [3600, 28, 488.6921905584123], // record 8.rproj
  ])('of %f arcsec at %f Mpc', (angle, distance, kpc) => {
    expect(projectedKpc(angle, distance)).toBeCloseTo(kpc, 6);
    expect(angleOfKpc(kpc, distance)).toBeCloseTo(angle, 6);
  });
});

describe('tidal measures', () => {
  it.each([
    // Karachentsev & Makarov (1999); constant of Karachentsev et al. (2013) (from memory); records 8.theta.*
    [1e11, 1, 0.03999999999999915],
    [1e11, 0.5, 0.9430899869919429],
    [1e10, 0.25, 0.8461799739838867],
    [1e12, 3, -0.39136376415898866],
  ])('of disturbers: mass and distance %s, %s', (mass, separationMpc, theta) => {
    expect(tidalIndex([{ mass, separationMpc }])).toBeCloseTo(theta, 6);
  });
  it('of several disturbers', () => {
    // definition; record 8.theta.max
    const list = [
      { mass: 1e11, separationMpc: 1 },
      { mass: 1e10, separationMpc: 0.25 },
      { mass: 1e12, separationMpc: 3 },
    ];
    expect(tidalIndex(list)).toBeCloseTo(0.8461799739838867, 6);
    expect(tidalIndexOfFive(list)).toBeCloseTo(0.9304417196985515, 6);
    expect(() => tidalIndex([])).toThrow(DomainError);
  });
  it('of neighbours in diameters', () => {
    // Dahari (1984); Verley et al. (2007) A&A 472, 121; record 8.Q
    const q = tidalStrength([
      { massRatio: 10, diameters: 20 },
      { massRatio: 3, diameters: 12 },
    ]);
    expect(q).toBeCloseTo(-2.524894036515663, 6);
  });
  it('of number densities', () => {
    // Verley et al. (2007), unit Mpc from memory; Balogh/Baldry convention; records 8.eta and 8.sigma5
    expect(localDensity(5, 0.156)).toBeCloseTo(2.4005975869621436, 6);
    expect(localDensity(5, 0.35)).toBeCloseTo(1.347767248974702, 6);
    expect(projectedDensity(5, 2.5)).toBeCloseTo(0.25464790894703254, 6);
  });
  it('of angular diameters', () => {
    // Karachentseva (1973); record 8.karachentseva
    const spoil = [
      [0.5, 8],
      [0.5, 11],
      [0.2, 3],
      [3, 50],
    ].map(([diameter, apart]) => spoilsIsolation(1, diameter!, apart!));
    expect(spoil).toEqual([true, false, false, true]);
  });
});

describe('groups', () => {
  it.each([
    // definition; records 8.r200.*
    [1e11, 95.74617316862248, 67.02232121803571],
    [1e12, 206.27887691228023, 144.3952138385961],
    [1e13, 444.4143682406335, 311.0900577684434],
    [1e14, 957.4617316862247, 670.2232121803572],
  ])('of a mass of %s reach %s kpc', (mass, radius, velocity) => {
    expect(r200Kpc(mass) / radius).toBeCloseTo(1, 5);
    expect(v200Kms(mass) / velocity).toBeCloseTo(1, 5);
    expect(criticalDensity(70) / 135993177225.91621).toBeCloseTo(1, 5);
  });
  it('hold what is near in place and velocity, both limits inclusive', () => {
    const group = { r200Kpc: 300, dispersionKms: 100 };
    expect(isMember(group, 600, 300, 2)).toBe(true);
    expect(isMember(group, 601, 0, 2)).toBe(false);
    expect(isMember(group, 0, -301, 2)).toBe(false);
  });
});

describe('unseen neighbours', () => {
  it.each([
    // Blanton et al. (2003) ApJ 592, 819 (phi*, alpha from memory); record 8.schechter.blanton
    [-20, 0.004385713517092773, 0.19683036237211587],
    [-19, 0.008510110877895128, 0.3819328830747131],
    [-18, 0.013412471154779478, 0.6019502978048603],
    [-17, 0.018813248348200893, 0.8443366114409748],
    [-16, 0.02458432498375811, 1.1033419251776928],
    [-14, 0.037076096067178245, 1.663971300406237],
  ])('brighter than M_r %f', (limit, density, count) => {
    expect(densityBrighterThan(limit) / density).toBeCloseTo(1, 4);
    expect((densityBrighterThan(limit) * windowVolume(WINDOW)) / count).toBeCloseTo(1, 4);
  });
  it.each([
    // Schechter integral with negative argument; records 8.incomplete.*
    [28, -14.465790156711098, 1.5284729742550356, 0.1354983261512016],
    [50, -15.724850021680094, 1.1771789736673404, 0.4867923267388968],
    [100, -17.23, 0.7869833621163213, 0.876987938289916],
    [200, -18.735149978319907, 0.43747818372033315, 1.2264931166859039],
  ])('at %f Mpc for redshifts to r 17.77', (distance, limit, seen, missed) => {
    expect(17.77 - 5 * Math.log10(distance) - 25).toBeCloseTo(limit, 9);
    expect((densityBrighterThan(limit) * windowVolume(WINDOW)) / seen).toBeCloseTo(1, 4);
    expect(missedNeighbours(limit, -14, WINDOW) / missed).toBeCloseTo(1, 4);
    expect(missedNeighbours(-13, -14, WINDOW)).toBe(0);
  });
  it('in a clustered field', () => {
    // power law (Davis & Peebles 1983); Martin et al. (2012) (from memory); records 8.cluster, 8.cluster.HI, 8.velwindow
    expect(windowLength(WINDOW)).toBeCloseTo(14.285714285714286, 6);
    expect(windowVolume(WINDOW) / 44.87989505128276).toBeCloseTo(1, 9);
    expect(excessVolume(WINDOW, luminousClustering(70)) / 663.2985377214213).toBeCloseTo(1, 4);
    expect(clusteringBoost(WINDOW, luminousClustering(70)) / 15.77941374335863).toBeCloseTo(1, 4);
    expect(excessVolume(WINDOW, hiClustering(70)) / 226.34994713088548).toBeCloseTo(1, 4);
    expect(clusteringBoost(WINDOW, hiClustering(70)) / 6.043459813625744).toBeCloseTo(1, 4);
  });
  it('where only part of the circle is covered', () => {
    // area weighting; record 8.edge: P0 = exp(-mu (1 - f)) at the mean mu of one
    expect(coverageCorrected(2, 0.65)).toBeCloseTo(3.0769230769230766, 9);
    expect(() => coverageCorrected(2, 0)).toThrow(DomainError);
  });
});

describe('the incomplete gamma function', () => {
  it('keeps its recurrence on both sides of zero', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1.9, max: 3, noNaN: true }),
        fc.double({ min: 1e-4, max: 30, noNaN: true }),
        (a, x) => {
          if (Math.abs(a - Math.round(a)) < 1e-3) return;
          const right = a * upperIncompleteGamma(a, x) + x ** a * Math.exp(-x);
          expect(upperIncompleteGamma(a + 1, x) / right).toBeCloseTo(1, 6);
        },
      ),
    );
  });
  it('is exp(-x) for one', () => expect(upperIncompleteGamma(1, 2.5)).toBeCloseTo(Math.exp(-2.5), 13));
});

describe('P(no neighbour)', () => {
  it('is the mean over the draws times the covered share', () => {
    const draws = [
      { accompanied: false, missed: 0 },
      { accompanied: true, missed: 0 },
      { accompanied: false, missed: Math.LN2 },
      { accompanied: false, missed: 0 },
    ];
    expect(aloneProbability(draws, 0.8)).toEqual({
      noneKnown: 0.75,
      noneUnseen: 0.875,
      covered: 0.8,
      probability: expect.closeTo(0.5, 12),
    });
  });
});

describe('the depth of redshifts', () => {
  const table = Float64Array.from({ length: 4000 }, (_, i) => 14 + (i % 800) / 100);
  it('ends where rows lose their velocities', () =>
    expect(measuredRedshiftDepth(table, (i) => table[i]! < 17.5)).toBeCloseTo(17.5, 9));
  it('cannot be told from few rows, or where even bright ones have none', () => {
    expect(measuredRedshiftDepth(table.subarray(0, 50), () => true)).toBeUndefined();
    expect(measuredRedshiftDepth(table, (i) => i % 2 === 0)).toBeUndefined();
  });
});

describe('the surroundings verdict', () => {
  const thresholds = { aloneProbability: 0.8, minimumCovered: 0.8 };
  const base = { inCluster: false, inGroup: false, hasNeighbour: false, aloneProbability: 0.9, covered: 1 };
  const verdict = (more: Partial<typeof base> | Record<string, unknown>) =>
    surroundingsVerdict({ ...base, ...more } as typeof base, thresholds);
  it('tries its rules in order', () => {
    expect(verdict({ inCluster: true, inGroup: true, hasNeighbour: true })).toBe('in a cluster');
    expect(verdict({ inGroup: true, hasNeighbour: true })).toBe('in a group');
    expect(verdict({ hasNeighbour: true, aloneProbability: null, covered: null })).toBe('accompanied');
    expect(verdict({})).toBe('alone');
  });
  it('lets incompleteness, edges and an unusable distance defeat only alone', () => {
    expect(verdict({ aloneProbability: 0.79 })).toBe('cannot tell');
    expect(verdict({ covered: 0.79 })).toBe('cannot tell');
    expect(verdict({ aloneProbability: null })).toBe('cannot tell');
    expect(verdict({ covered: null })).toBe('cannot tell');
  });
});
