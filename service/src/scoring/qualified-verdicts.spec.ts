import { describe, expect, it } from 'vitest';
import { scoreTables } from './testing/score-tables.ts';

/** At this distance a degree is a megaparsec. */
const AT_MPC = 180 / Math.PI;
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
    signalToNoise: 'n',
    distance: 'd',
    distanceError: 'e',
  },
  units: { distance: 'Mpc', distanceError: 'Mpc' },
  velocity: { convention: 'optical', frame: 'barycentric' },
  beamArcsec: { major: 45, minor: 45, angleDeg: 0 },
};
const GALAXIES = {
  kind: 'optical',
  name: 'galaxies',
  columns: { name: 'id', ra: 'ra', dec: 'dec', velocity: 'cz', magnitudes: [{ column: 'r', band: 'r' }] },
  velocity: { convention: 'optical', frame: 'barycentric' },
  bands: [{ name: 'r', system: 'AB', depth5Sigma: 24.5, seeingFwhmArcsec: 1.2 }],
  redshiftDepth: { band: 'r', magnitude: 17.8 },
  footprint: { type: 'circles', value: [[150, 2, 5]] },
};
const SHEET = Array.from(
  { length: 300 },
  (_, i) =>
    `g${i},${(148.9 + 0.02 * (i % 100)).toFixed(3)},${(1.1 + 0.31 * Math.floor(i / 100)).toFixed(3)},,${20 + (i % 4)}`,
);
const GAS = `x,150,2,4000,80,4,20,${AT_MPC},3`;

async function score(galaxies: readonly string[], draws = 0) {
  const { scored } = await scoreTables(
    [
      { lines: ['id,ra,dec,cz,w,s,n,d,e', GAS], settings: HI },
      { lines: ['id,ra,dec,cz,r', ...SHEET, ...galaxies], settings: GALAXIES },
    ],
    { robustness: { draws, seed: 1 } },
  );
  const one = scored[0]!;
  return { item: one.item, debris: one.detail().doubts.find(({ name }) => name === 'debris')!.grade };
}

describe('the doubt of debris', () => {
  /** 100 kpc and 50 km/s away, a galaxy that can shed gas. */
  const BIG = 'big,150.1,2,4050,12.5';

  it('is serious where gas has no galaxy of its own, and qualifies the headline', async () => {
    const { item, debris } = await score([BIG]);
    expect([item.starlight, debris]).toEqual(['dark', 'serious']);
    expect(item.headline).toContain('debris likely');
  });

  it('is clear beside a galaxy at the velocity of the gas, a watch beside one without a velocity', async () => {
    const moving = await score([BIG, 'own,150,2,4005,16']);
    expect([moving.item.starlight, moving.debris, moving.item.headline]).toEqual([
      'starlit',
      'clear',
      'starlight found: own',
    ]);
    const still = await score([BIG, 'own,150,2,,16']);
    expect([still.item.starlight, still.debris]).toEqual(['starlit', 'watch']);
    expect(still.item.headline).not.toContain('debris');
  });
});

describe('what would flip a verdict', () => {
  it('is told of surroundings that half of the draws change, though the detection is plainly starlit', async () => {
    // A neighbour at the very edge of the window: a little nearer and it lies inside.
    const { item } = await score(['own,150,2,4005,16', 'edge,151.003,2,4000,14'], 200);
    expect(item.starlight).toBe('starlit');
    expect(item.robustness!.surroundingsStability!).toBeLessThan(0.8);
    expect(item.robustness!.flips.join()).toMatch(
      /^Surroundings would be "accompanied" \(edge\) instead of .* were it nearer than 57\.\d Mpc/,
    );
  });

  it('is not asked of surroundings that stand', async () => {
    const { item } = await score(['own,150,2,4005,16', 'inside,150.2,2,4000,14'], 200);
    expect(item.robustness!.surroundingsStability).toBe(1);
    expect(item.robustness!.flips).toEqual([]);
  });
});
