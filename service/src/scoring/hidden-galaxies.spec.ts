import { describe, expect, it } from 'vitest';
import { scoreTables, textsOf } from './testing/score-tables.ts';

const HI = {
  kind: 'hi',
  name: 'gas',
  columns: { name: 'id', ra: 'ra', dec: 'dec', velocity: 'cz', width50: 'w', flux: 's', signalToNoise: 'snr' },
  velocity: { convention: 'optical', frame: 'barycentric' },
  beamArcsec: { major: 45, minor: 45, angleDeg: 0 },
};
const DETECTION = ['id,ra,dec,cz,w,s,snr', 'x,150,2,3000,60,8,20'];
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
  footprint: { type: 'circles', value: [[150, 2, 3]] },
};
/** Four thousand faint galaxies a square degree, none within an arcmin of the detection but those that a test adds. */
const SHEET = Array.from({ length: 16000 }, (_, i) => {
  const ra = 149 + 2 * ((i * 0.618034) % 1);
  const dec = 1 + 2 * ((i * 0.7548777) % 1);
  return { ra, dec, line: `g${i},${ra},${dec},,1,${22.9 + (i % 4) / 4}` };
})
  .filter(({ ra, dec }) => Math.hypot(ra - 150, dec - 2) > 1 / 60)
  .map(({ line }) => line);

async function score(extra: readonly string[], criteria: Record<string, object> = {}) {
  const { scored } = await scoreTables(
    [
      { lines: DETECTION, settings: HI },
      { lines: ['id,ra,dec,cz,re,r', ...SHEET, ...extra], settings: GALAXIES },
    ],
    criteria,
  );
  return scored[0]!;
}

describe('a galaxy that stands in the catalogue in pieces', () => {
  /** Six faint objects within eight arcsec, whose light together an ordinary dwarf would have. */
  const PIECES = Array.from({ length: 6 }, (_, i) => {
    const angle = (i * Math.PI) / 3;
    return `p${i},${150 + (8 / 3600) * Math.sin(angle)},${2 + (8 / 3600) * Math.cos(angle)},,0.8,24`;
  });

  it('keeps the detection from being called dark, and is told of', async () => {
    const crowded = await score(PIECES);
    expect(crowded.item.starlight).toBe('cannot tell');
    expect(textsOf(crowded).join()).toMatch(/A galaxy may be there in pieces: galaxies holds 6 faint objects/);
  });

  it('is nothing where nothing crowds, and nothing when switched off', async () => {
    const empty = await score([]);
    expect(empty.item.starlight).toBe('dark');
    expect(textsOf(empty).join()).toContain('No crowd of faint pieces');
    const off = await score(PIECES, { absence: { piecesChance: 0 } });
    expect(off.item.starlight).toBe('dark');
  });
});

describe('a large galaxy in front', () => {
  const inFront = (cz: number | '') => [`big,150.004,2,${cz},40,12.5`];

  it('hides what lies behind it', async () => {
    const hidden = await score(inFront(1100));
    expect(hidden.item.power!).toBeLessThan(0.5);
    expect(hidden.item.starlight).not.toBe('dark');
    expect(hidden.detail().masks).toMatchObject([{ label: 'galaxy big', radiusArcsec: 80 }]);
    const off = await score(inFront(1100), { absence: { galaxyMaskRadii: 0 } });
    expect(off.item.power!).toBeGreaterThan(0.99);
  });

  it('does not hide itself where it may be the counterpart', async () => {
    for (const cz of [3010, ''] as const) {
      const own = await score(inFront(cz));
      expect(own.detail().masks).toEqual([]);
      expect(own.item.starlight).toBe('starlit');
    }
  });
});
