import { describe, expect, it } from 'vitest';
import { scoreTables } from './testing/score-tables.ts';

/** At this distance a degree is a megaparsec. */
const AT_MPC = 180 / Math.PI;
const CZ = 4000;
const HI = {
  kind: 'hi',
  name: 'gas',
  columns: {
    name: 'id',
    ra: 'ra',
    dec: 'dec',
    velocity: 'cz',
    width50: 'w',
    flux: 's',
    distance: 'd',
    distanceError: 'e',
  },
  units: { distance: 'Mpc', distanceError: 'Mpc' },
  velocity: { convention: 'optical', frame: 'barycentric' },
  beamArcsec: { major: 60, minor: 60, angleDeg: 0 },
};
const HEADER = 'id,ra,dec,cz,w,s,d,e';
const TARGET = `x,150,0,${CZ},80,2,${AT_MPC},1`;
const GALAXIES = {
  kind: 'optical',
  name: 'galaxies',
  columns: {
    name: 'id',
    ra: 'ra',
    dec: 'dec',
    velocity: 'cz',
    effectiveRadius: 're',
    magnitudes: [{ column: 'r', band: 'r' }],
  },
  units: { effectiveRadius: 'arcsec' },
  velocity: { convention: 'optical', frame: 'barycentric' },
  bands: [{ name: 'r', system: 'AB', depth5Sigma: 24, seeingFwhmArcsec: 1.2 }],
  redshiftDepth: { band: 'r', magnitude: 17.8 },
  footprint: { type: 'circles', value: [[150, 0, 6]] },
};
/** Magnitude of a galaxy of M_r at the distance of the gas. */
const r = (absolute: number) => (absolute + 5 * Math.log10(AT_MPC) + 25).toFixed(3);
const galaxy = (id: string, mpc: number, dv: number, absolute: number, re = 1) =>
  `${id},${150 + mpc},0,${CZ + dv * (1 + CZ / 299_792.458)},${re},${r(absolute)}`;

async function measure(galaxies: readonly string[], more: readonly string[] = [], settings: object = {}) {
  const { scored } = await scoreTables([
    { lines: [HEADER, TARGET, ...more], settings: HI },
    { lines: ['id,ra,dec,cz,re,r', 'far,20,40,9000,1,15', ...galaxies], settings: { ...GALAXIES, ...settings } },
  ]);
  return scored[0]!.detail().measures!;
}

describe('the measures of the surroundings', () => {
  const FIVE = [0.3, 0.7, 1.1, 1.5, 1.8].map((mpc, i) => galaxy(`g${i}`, mpc, 100 * i, -20.5));

  it('count each radius and find the nearest', async () => {
    const { counts, nearest } = await measure(FIVE);
    expect(counts).toEqual([
      { radiusMpc: 0.5, count: 1 },
      { radiusMpc: 1, count: 2 },
      { radiusMpc: 2, count: 5 },
    ]);
    expect(nearest).toMatchObject({ name: 'g0', isLimit: false });
    expect(nearest!.separationKpc).toBeCloseTo(300, 1);
  });

  it('give both densities of the fifth neighbour, by hand', async () => {
    const { fifthDensity, fifthDensityIsLimit, localDensity } = await measure(FIVE);
    expect(fifthDensity).toBeCloseTo(5 / (Math.PI * 1.8 ** 2), 3);
    expect(localDensity).toBeCloseTo(Math.log10(4 / ((4 / 3) * Math.PI * 1.8 ** 3)), 3);
    expect(fifthDensityIsLimit).toBe(false);
    const few = await measure(FIVE.slice(0, 4));
    expect([few.fifthDensityIsLimit, few.fifthDensity.toFixed(4)]).toEqual([true, (5 / (Math.PI * 4)).toFixed(4)]);
  });

  it('give the tides of the main disturber and of all, by hand', async () => {
    // M_r -20.5 at M/L 0.75: 0.75 x 10^(0.4 (4.65 + 20.5)) solar masses, at 0.3 Mpc.
    const mass = 0.75 * 10 ** (0.4 * (4.642 + 20.5));
    const one = await measure(FIVE.slice(0, 1));
    expect(one.tidalIndex!).toBeCloseTo(Math.log10(mass / 0.3 ** 3) - 10.96, 2);
    expect(one.tidalIndexOfFive).toBeCloseTo(one.tidalIndex!, 9);
    expect(one.disturber).toBe('g0');
    const all = await measure(FIVE);
    expect(all.tidalIndexOfFive!).toBeGreaterThan(all.tidalIndex!);
    expect(all.tidalStrength!).toBeGreaterThan(one.tidalStrength!);
  });

  it('count a galaxy once that two tables hold, with its gas', async () => {
    const gas = `again,${150.3 + 10 / 3600},0,${CZ + 20},150,4,,`;
    const { counts, gasNeighbours, tidalIndex } = await measure(FIVE.slice(0, 1), [gas]);
    expect(counts.map(({ count }) => count)).toEqual([1, 1, 1]);
    expect(gasNeighbours).toBe(1);
    expect(tidalIndex!).toBeGreaterThan((await measure(FIVE.slice(0, 1))).tidalIndex!);
  });

  it('say that the nearest is a limit where the edge is nearer, and how far the edge is', async () => {
    const { nearest, edgeKpc, covered } = await measure([galaxy('g', 0.6, 0, -20)], [], {
      footprint: { type: 'circles', value: [[151.7, 0, 2]] },
    });
    expect(covered!).toBeLessThan(0.99);
    expect(edgeKpc! / 300).toBeGreaterThan(0.9);
    expect(edgeKpc! / 300).toBeLessThan(1.1);
    expect(nearest!.isLimit).toBe(true);
  });

  it('warn of bright galaxies beside it that no fibre has seen', async () => {
    const beside = `fibre,${150 + 100 / 3600},0,,1,${r(-18)}`;
    const faint = `dwarf,${150 - 100 / 3600},0,,1,${r(-15)}`;
    const farther = `farther,${150 + 130 / 3600},0,,1,${r(-18)}`;
    expect((await measure([beside, faint, farther])).unverified).toBe(1);
    expect((await measure([`${beside.replace(',,', `,${CZ},`)}`])).unverified).toBe(0);
  });

  it('count galaxies of like size that are too near in their own diameters, with a redshift or without', async () => {
    // The gas is 1.5e9 solar masses: some 80 arcsec across, its stars 47. A galaxy of 40 arcsec spoils it within 800.
    const spoiler = `s,${150 + 600 / 3600},0,,10,18`;
    const tooFar = `t,${150 + 900 / 3600},0,,10,18`;
    const tooSmall = `u,${150 + 60 / 3600},0,,2.6,18`;
    expect((await measure([spoiler, tooFar, tooSmall])).spoilers).toBe(1);
  });

  it('are not there without a distance', async () => {
    const { scored } = await scoreTables([
      { lines: [HEADER, 'x,150,0,100,20,2,,'], settings: HI },
      { lines: ['id,ra,dec,cz,re,r', 'far,20,40,9000,1,15'], settings: GALAXIES },
    ]);
    expect(scored[0]!.detail().measures).toBeNull();
  });
});
