import { describe, expect, it } from 'vitest';
import { scoreTables, textsOf } from './testing/score-tables.ts';

const HI = {
  kind: 'hi',
  name: 'gas',
  columns: { name: 'id', ra: 'ra', dec: 'dec', velocity: 'cz', width50: 'w', flux: 's', signalToNoise: 'snr' },
  velocity: { convention: 'optical', frame: 'barycentric' },
  beamArcsec: { major: 45, minor: 45, angleDeg: 0 },
};
const HEADER = 'id,ra,dec,cz,w,s,snr';
const GALAXIES = {
  kind: 'optical',
  name: 'galaxies',
  columns: { name: 'id', ra: 'ra', dec: 'dec', velocity: 'cz', magnitudes: [{ column: 'r', band: 'r' }] },
  velocity: { convention: 'optical', frame: 'barycentric' },
  bands: [{ name: 'r', system: 'AB', depth5Sigma: 24, seeingFwhmArcsec: 1.2 }],
  footprint: { type: 'circles', value: [[150, 2, 3]] },
};
const SHEET = Array.from(
  { length: 300 },
  (_, i) =>
    `g${i},${(148.9 + 0.02 * (i % 100)).toFixed(3)},${(1.1 + 0.31 * Math.floor(i / 100)).toFixed(3)},,${20 + (i % 4)}`,
);
const HOST = 'host,150,2,3000,15.5';
const NEAR = 'near,150.0003,2,3005,80,6,20';
const FAR = 'far,150.0045,2,3030,60,6,20';

async function score(lists: readonly (readonly string[])[], galaxies = [HOST]) {
  const { scored } = await scoreTables([
    ...lists.map((lines) => ({ lines: [HEADER, ...lines], settings: HI })),
    { lines: ['id,ra,dec,cz,r', ...SHEET, ...galaxies], settings: GALAXIES },
  ]);
  return new Map(scored.map((one) => [one.item.name, one]));
}

describe('one galaxy claimed by two detections', () => {
  it('is the counterpart of each where the other is not there', async () => {
    for (const row of [NEAR, FAR]) {
      const [only] = [...(await score([[row]])).values()];
      expect([only!.item.starlight, only!.item.counterpart!.name]).toEqual(['starlit', 'host']);
      expect(only!.detail().claims).toEqual([]);
    }
  });

  it('goes to the better one, and the other is contested, not dark, and says so', async () => {
    const scored = await score([[NEAR, FAR]]);
    const [near, far] = [scored.get('near')!, scored.get('far')!];
    expect(near.item.starlight).toBe('starlit');
    expect(far.item.starlight).toBe('contested');
    expect(far.item.headline).toContain('the likeliest host is claimed by another detection');
    expect(near.item.counterpart!.probability).toBeGreaterThan(0.9);
    const shared = [near, far].map(
      ({ candidates }) => candidates.find(({ index }) => index === SHEET.length)!.probability,
    );
    expect(shared[0]! + shared[1]!).toBeLessThanOrEqual(1 + 1e-9);
    expect(textsOf(far).join()).toMatch(
      /host \(galaxies\) is claimed by near too, 15\.1 arcsec and -25 km\/s away\..*tail or a cloud/,
    );
    expect(far.detail().claims).toMatchObject([{ galaxy: 'host', detection: 'near' }]);
  });

  it('leaves each its own where there are two galaxies', async () => {
    const scored = await score([[NEAR, FAR]], ['host,150,2,,15.5', 'second,150.0047,2,,16']);
    expect([...scored.values()].map(({ item }) => item.counterpart!.name)).toEqual(['host', 'second']);
    expect([...scored.values()].map(({ item }) => item.starlight)).toEqual(['starlit', 'starlit']);
  });

  it('is no conflict for the same source in two lists', async () => {
    const scored = await score([[NEAR], ['again,150.0005,2,3010,80,6,20']]);
    expect([...scored.values()].map(({ item }) => item.starlight)).toEqual(['starlit', 'starlit']);
    expect(scored.get('again')!.detail().claims).toEqual([]);
  });
});
