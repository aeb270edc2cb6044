import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { readPlan } from '../plan/read-plan.ts';
import { readTables } from '../plan/read-tables.ts';
import { Engine } from './engine.ts';

const root = mkdtempSync(join(tmpdir(), 'eremite-engine-'));
afterAll(() => rmSync(root, { recursive: true, force: true }));
let folders = 0;

const HI = {
  kind: 'hi',
  name: 'gas',
  columns: { name: 'id', ra: 'ra', dec: 'dec', velocity: 'cz', flux: 's', distance: 'd' },
  units: { distance: 'kpc' },
};
const GALAXIES = {
  kind: 'optical',
  name: 'stars',
  columns: { name: 'id', ra: 'ra', dec: 'dec', velocity: 'cz', magnitude: 'r' },
  band: 'r',
};

/** Scores an HI list with columns id, ra, dec, cz, s, d (kpc) against galaxies with id, ra, dec, cz, r. */
async function score(hi: readonly string[], galaxies: readonly string[], criteria: unknown = {}, extra: object = {}) {
  const folder = join(root, String(folders++));
  mkdirSync(folder);
  writeFileSync(join(folder, 'hi.csv'), ['id,ra,dec,cz,s,d', ...hi, ''].join('\n'));
  writeFileSync(join(folder, 'galaxies.csv'), ['id,ra,dec,cz,r', ...galaxies, ''].join('\n'));
  const plan = {
    tables: [
      { file: 'hi.csv', settings: HI },
      { file: 'galaxies.csv', settings: { ...GALAXIES, ...extra } },
    ],
    criteria,
  };
  const path = join(folder, 'plan.json');
  writeFileSync(path, JSON.stringify(plan));
  const read = readPlan(path);
  const tables = await readTables(read, () => undefined);
  const engine = new Engine({
    survey: { h0: 70, omegaM: 0.3 },
    criteria: read.plan.criteria,
    catalogues: tables.map(({ catalogue }) => catalogue),
    decisions: { overrides: [], distances: [] },
  });
  return engine.score(0, engine.detections.length);
}

const doubtOf = ({ item }: { item: { doubts: { name: string; grade: string }[] } }, name: string) =>
  item.doubts.find((doubt) => doubt.name === name)?.grade;
const texts = ({ item }: { item: { grounds: { text: string }[] } }) => item.grounds.map(({ text }) => text);

/** A slow dwarf at 1300 kpc, far from the Galactic plane; its own galaxy stands at the same place. */
const DWARF = 'near,150.779,-26.16,403,1130,1300';
const OWN = 'own,150.779,-26.1598,402,10';

describe('the doubt about a cloud of the Galaxy', () => {
  it('is serious where nothing else moves as the gas does, and only a watch beside a galaxy that does', async () => {
    const [bare] = await score([DWARF], ['other,10,10,9000,15']);
    const [seen] = await score([DWARF], [OWN]);
    expect([doubtOf(bare!, 'cloud'), doubtOf(seen!, 'cloud')]).toEqual(['serious', 'watch']);
    expect(bare!.item.headline).toContain('cloud of the Galaxy');
    expect(seen!.item.headline).toBe('starlight found: own');
  });

  it('stays serious beside a galaxy without a velocity', async () => {
    const [seen] = await score([DWARF], [OWN.replace('402', '')]);
    expect(seen!.item.starlight).toBe('starlit');
    expect(doubtOf(seen!, 'cloud')).toBe('serious');
  });

  it('keeps to the velocities of the criteria', async () => {
    const criteria = { doubts: { cloudVelocityKms: 100 } };
    const [bare] = await score([DWARF], ['other,10,10,9000,15'], criteria);
    expect(doubtOf(bare!, 'cloud')).toBeUndefined();
  });
});

describe('the sentences of a near detection', () => {
  it('give its distance in kpc, with the digits of its error', async () => {
    const [magellanic] = await score(['m,16.25,-72.42,145.6,400000,62.81'], [OWN]);
    expect(texts(magellanic!)).toContain('Distance 63 +/- 6 kpc, measured, from the table.');
  });

  it('tell of a galaxy at its velocity just outside the search radius', async () => {
    // 80 arcsec away, outside 3.4 times the assumed 20 arcsec; one at another velocity is not told of.
    const [gas] = await score(
      ['gas,150,-26,2500,2,30000'],
      ['beside,150,-25.97778,2505,14', 'other,150,-26.02222,4000,14'],
    );
    const told = texts(gas!).filter((text) => text.includes('outside the search radius'));
    expect(told).toHaveLength(1);
    expect(told[0]).toMatch(/^beside \(stars\) has the velocity of the gas \(\+5 km\/s\) and lies 80\.0 arcsec away/);
  });

  it('say that a neighbour may lie behind where the velocity window is deeper than the distance', async () => {
    const galaxy = 'far,151,-26,600,8';
    const [near, distant] = await score(['near,150,-26,400,100,1000', 'distant,150,-26,400,100,30000'], [galaxy]);
    const behind = (of: typeof near) => texts(of!).filter((text) => text.includes('may lie far behind'));
    expect(near!.item.surroundings).toBe('accompanied');
    expect(behind(near)).toEqual([
      'No distance of far (stars) is known. The window of 500 km/s is 7.1 Mpc of Hubble flow, more than the 1.0 Mpc to the gas: it may lie far behind.',
    ]);
    expect(behind(distant)).toEqual([]);
    const [approaching] = await score(['m,150,-26,-200,100,800'], ['a,151,-26,-250,5']);
    expect(approaching!.item.surroundings).toBe('accompanied');
    expect(behind(approaching)).toEqual([]);
  });

  it('tell galaxies that are elsewhere by their own distances from those too faint to count', async () => {
    const [gas] = await score(
      ['gas,150,-26,400,100,1000', 'behind,150.5,-26,420,100,5000'],
      ['faint,150.2,-26.1,410,19', 'other,10,10,9000,15'],
    );
    expect(texts(gas!)).toContain('1 known galaxy lies in the window, too faint to count.');
    expect(texts(gas!)).toContain('1 known galaxy lies in the window, but elsewhere by distances of their own.');
  });
});

describe('the window of neighbours', () => {
  /** At this distance a degree is a megaparsec. */
  const AT = 1000 * (180 / Math.PI);
  it.each([
    [0, 1],
    [45, 46],
    [-89, -88],
  ])('includes its limits, at declination %d', async (from, to) => {
    const [gas] = await score(
      [`gas,359.9999,${from},0,1,${AT}`],
      [
        `on,359.9999,${to},500,15`,
        `before,359.9999,${to},-500,15`,
        `fast,359.9999,${to},500.001,15`,
        `out,359.9999,${from + 1.000001 * (to - from)},0,15`,
      ],
    );
    expect(gas!.neighbours.map(({ catalogue, index }) => [catalogue.input.name, index])).toEqual([
      ['stars', 0],
      ['stars', 1],
    ]);
    expect(gas!.item.count1Mpc500Kms).toBe(2);
  });
});

describe('dust', () => {
  it('is a doubt by the limits of the criteria', async () => {
    const at = async (criteria: unknown) => {
      const [gas] = await score(['gas,150,-26,2500,2,30000'], [OWN], criteria);
      return gas!.detail().doubts.find(({ name }) => name === 'extinction')!.rule;
    };
    expect(await at({})).toContain('E(B-V) > 0.3 mag');
    expect(await at({ absence: { maximumReddeningMag: 0.5 } })).toContain('E(B-V) > 0.5 mag');
  });
});
