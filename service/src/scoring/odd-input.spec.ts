import { criteriaSettings, type CriteriaSettingsInput } from '@eremite/shared/contracts/criteria';
import { describe, expect, it } from 'vitest';
import { HitLimitError } from '../matching/hit-limit.ts';
import { asRoleTable } from '../tiles/role-table.ts';
import type { EngineCatalogue, EngineInput } from './engine-input.ts';
import { selectionOf } from './row-selection.ts';
import { runEngine } from './run-engine.ts';
import type { ScoredDetection } from './scored-detection.ts';
import { siftRows } from './sift-rows.ts';

const base = {
  hash: '',
  bands: [],
  beamArcsec: null,
  positionErrorArcsec: 1,
  distanceKind: 'angular' as const,
  redshiftDepth: null,
  coverage: null,
  coverageNote: '',
};

/** Positions with any further columns of the same length. */
function table(
  id: string,
  kind: EngineCatalogue['kind'],
  positions: readonly (readonly [raDeg: number, decDeg: number])[],
  columns: Record<string, number[]> = {},
): EngineCatalogue {
  const more = Object.fromEntries(Object.entries(columns).map(([name, values]) => [name, Float64Array.from(values)]));
  const roles = asRoleTable({
    rows: positions.length,
    columns: {
      row: Uint32Array.from(positions, (_, i) => i + 1),
      raDeg: Float64Array.from(positions, ([ra]) => ra),
      decDeg: Float64Array.from(positions, ([, dec]) => dec),
      ...more,
    },
  });
  return { ...base, id, name: id, kind, roles };
}

async function scored(catalogues: EngineCatalogue[], criteria: CriteriaSettingsInput = {}) {
  const quick = { robustness: { draws: 0 }, control: { offsetsPerSource: 0 }, ...criteria };
  const input: EngineInput = {
    survey: { h0: 70, omegaM: 0.3 },
    criteria: criteriaSettings.parse(quick),
    catalogues,
    decisions: { overrides: [], distances: [] },
  };
  const detections = catalogues.filter(({ kind }) => kind === 'hi');
  const selection = selectionOf({ ...input, catalogues: detections });
  const results: ScoredDetection[] = [];
  const sifted = catalogues.map((one) => ({ ...one, ...siftRows(one.kind, one.roles, selection) }));
  await runEngine({ ...input, catalogues: sifted }, (some) => void results.push(...some));
  return results;
}

const gas = (ra: number, dec: number, cz = 3000) => table('gas', 'hi', [[ra, dec]], { czKms: [cz], fluxJyKms: [3] });

describe('a search radius', () => {
  it.each([0, -1, NaN, 36_001])('of %s arcsec is refused by the criteria', (searchRadiusArcsec) => {
    expect(criteriaSettings.safeParse({ position: { searchRadiusArcsec } }).success).toBe(false);
  });

  it('of ten degrees finds every row within it', async () => {
    const rows = Array.from({ length: 200 }, (_, i): [number, number] => [150 + (i % 20), 2 + Math.floor(i / 20)]);
    const [one] = await scored([gas(150, 2), table('galaxies', 'optical', rows)], {
      position: { searchRadiusArcsec: 36_000 },
    });
    const near = rows.filter(([ra, dec]) => {
      const [a, d, dd] = [(ra - 150) / 57.29577951308232, dec / 57.29577951308232, 2 / 57.29577951308232];
      return Math.acos(Math.sin(d) * Math.sin(dd) + Math.cos(d) * Math.cos(dd) * Math.cos(a)) <= 10 / 57.29577951308232;
    });
    expect(one!.candidates).toHaveLength(near.length);
    expect(near.length).toBeGreaterThan(50);
  });
});

describe('criteria that select everything', () => {
  it('are refused with the count they would give and the limit', async () => {
    const crowd = Array.from({ length: 60_000 }, (_, i): [number, number] => [150 + (i % 300) / 1e3, 2 + i / 1e6]);
    const many = table(
      'gas',
      'hi',
      Array.from({ length: 3000 }, (_, i) => [150 + (i % 300) / 1e3, 2] as const),
      {
        czKms: Array.from({ length: 3000 }, () => 3000),
      },
    );
    const run = scored([many, table('crowd', 'optical', crowd)], { position: { searchRadiusArcsec: 36_000 } });
    await expect(run).rejects.toThrow(HitLimitError);
    await expect(run).rejects.toThrow(/about 1\.8e\+8 pairs, more than the limit of \d+/);
  });
});

describe('tables with little in them', () => {
  it('a catalogue without a row in the field leaves the detection without candidates', async () => {
    const [one] = await scored([gas(150, 2), table('elsewhere', 'optical', [[10, -60]])]);
    expect([one!.candidates.length, one!.item.starlight]).toEqual([0, 'cannot tell']);
  });

  it('an empty catalogue is no harm', async () => {
    const [one] = await scored([gas(150, 2), table('empty', 'optical', [])]);
    expect(one!.item.starlight).toBe('cannot tell');
  });

  it('without any velocity nothing is said of neighbours, and why', async () => {
    const silent = table('gas', 'hi', [[150, 2], [151, 2]], { czKms: [NaN, NaN] }); // prettier-ignore
    const results = await scored([silent, table('galaxies', 'optical', [[150, 2.5]], { czKms: [NaN] })]);
    for (const { item, neighbours } of results) {
      expect([item.surroundings, item.nearest, neighbours.length]).toEqual(['cannot tell', null, 0]);
      expect(item.grounds.map(({ text }) => text).join(' ')).toMatch(/no velocity|no catalogue has velocities/);
    }
  });
});

describe('positions that are odd', () => {
  it('a hundred thousand rows at one place are all candidates, by row number', { timeout: 120_000 }, async () => {
    const heap = Array.from({ length: 100_000 }, () => [150.001, 2] as const);
    const criteria = { position: { searchRadiusArcsec: 10 } };
    const [one] = await scored([gas(150, 2), table('heap', 'optical', heap)], criteria);
    expect(one!.candidates).toHaveLength(100_000);
    expect([one!.candidates[0]!.index, one!.candidates.at(-1)!.index]).toEqual([0, 99_999]);
  });

  it.each([90, -90])('a detection at the pole, %s degrees, meets rows of every right ascension', async (dec) => {
    const around = Array.from({ length: 24 }, (_, i) => [15 * i, dec - Math.sign(dec) * 0.002] as const);
    const far = [[0, dec - Math.sign(dec) * 0.2]] as const;
    const [one] = await scored([gas(123, dec), table('around', 'optical', [...around, ...far])], {
      position: { searchRadiusArcsec: 10 },
    });
    expect(one!.candidates).toHaveLength(24);
    for (const { separationArcsec } of one!.candidates) expect(separationArcsec).toBeCloseTo(7.2, 6);
  });
});
