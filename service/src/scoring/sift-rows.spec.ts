import { criteriaSettings } from '@eremite/shared/contracts/criteria';
import { DEGREE } from '@eremite/shared/science/constants';
import { polygonsFootprint } from '@eremite/shared/science/sky/footprint';
import { describe, expect, it } from 'vitest';
import { seeded } from '../matching/testing/brute-force.ts';
import { textColumn } from '../tiles/column-pack.ts';
import { selectRows } from '../tiles/column-rows.ts';
import { asRoleTable, type RoleTable } from '../tiles/role-table.ts';
import { digestOf, mergeDigests } from './catalogue-digest.ts';
import type { EngineCatalogue, EngineInput } from './engine-input.ts';
import { selectionOf } from './row-selection.ts';
import { runEngine } from './run-engine.ts';
import { joinSifted, siftRows } from './sift-rows.ts';

const random = seeded(5);
const FIELD = { ra: 355, width: 10, dec: 60, height: 8 };
const column = (rows: number, of: (i: number) => number) => Float64Array.from({ length: rows }, (_, i) => of(i));

function places(rows: number) {
  return {
    row: Uint32Array.from({ length: rows }, (_, i) => i + 1),
    raDeg: column(rows, () => (FIELD.ra + FIELD.width * random()) % 360),
    decDeg: column(rows, () => FIELD.dec + FIELD.height * random()),
  };
}

function catalogue(id: string, kind: EngineCatalogue['kind'], roles: RoleTable, more: object = {}): EngineCatalogue {
  return {
    id,
    name: id,
    kind,
    hash: id,
    bands: [],
    beamArcsec: null,
    positionErrorArcsec: 0.3,
    distanceKind: 'angular',
    redshiftDepth: null,
    coverage: null,
    coverageNote: '',
    roles,
    ...more,
  };
}

const names = (rows: number) => textColumn(Array.from({ length: rows }, (_, i) => `n${i}`));
const band = (name: string, depth: number) => ({
  name,
  system: 'AB',
  depth5Sigma: depth,
  seeingFwhmArcsec: 1.2,
  extinction: 'none',
});

/** A field across 0 h with gas, a deep table without an area, a table with redshifts and sizes, and stars. */
function universe(): EngineInput {
  const gas = places(300);
  const hi = asRoleTable({
    rows: 300,
    columns: {
      ...gas,
      czKms: column(300, (i) => (i % 29 === 0 ? NaN : 1500 + 6000 * random())),
      width50Kms: column(300, () => 90),
      fluxJyKms: column(300, () => 0.5 + 4 * random()),
      signalToNoise: column(300, () => 6 + 20 * random()),
      name: names(300),
    },
  });
  const deepRows = 12_000;
  const deep = asRoleTable({
    rows: deepRows,
    columns: {
      ...places(deepRows),
      'mag:r': column(deepRows, (i) => (i % 50 === 0 ? NaN : 24 + Math.log10(random()) / 0.45)),
      'magLimit:r': Uint8Array.from({ length: deepRows }, (_, i) => (i % 97 === 0 ? 1 : 0)),
      starProbability: column(deepRows, () => (random() < 0.2 ? 0.9 : 0.1)),
      ebvMag: column(deepRows, () => 0.03 + 0.02 * random()),
      name: names(deepRows),
    },
  });
  const nearRows = 4000;
  const near = asRoleTable({
    rows: nearRows,
    columns: {
      ...places(nearRows),
      'mag:g': column(nearRows, () => 19 + Math.log10(random()) / 0.5),
      czKms: column(nearRows, () => (random() < 0.6 ? 1000 + 9000 * random() : NaN)),
      effectiveRadiusArcsec: column(nearRows, () => 40 * random() ** 6),
      name: names(nearRows),
    },
  });
  const stars = asRoleTable({ rows: 500, columns: { ...places(500), 'mag:G': column(500, () => 8 + 8 * random()) } });
  const { ra, width, dec, height } = FIELD;
  const corners = [[ra, dec], [ra + width - 360, dec], [ra + width - 360, dec + height], [ra, dec + height]] as const; // prettier-ignore
  const { region } = polygonsFootprint([corners.map(([lon, lat]) => ({ lon: lon * DEGREE, lat: lat * DEGREE }))]);
  const coverage = { order: region.order, ranges: Float64Array.from(region.ranges) };
  return {
    survey: { h0: 70, omegaM: 0.3 },
    criteria: criteriaSettings.parse({ robustness: { draws: 20 }, control: { offsetsPerSource: 4 } }),
    catalogues: [
      catalogue('deep', 'optical', deep, { bands: [band('r', 24)] }),
      catalogue('hi', 'hi', hi, { beamArcsec: { major: 45, minor: 30, angleDeg: 20 } }),
      catalogue('near', 'optical', near, { bands: [band('g', 19)], coverage }),
      catalogue('stars', 'stars', stars),
    ],
    decisions: { overrides: [], distances: [] },
  };
}

async function resultsOf(input: EngineInput): Promise<string> {
  const said: unknown[] = [];
  const { notes, control } = await runEngine(input, (scored) => {
    for (const { item, detail, candidates, neighbours } of scored) {
      const rows = [...candidates, ...neighbours].map((row) => [
        row.catalogue.input.id,
        row.catalogue.input.roles.columns.row[row.index],
        row.separationArcsec,
      ]);
      said.push([item, detail(), rows]);
    }
  });
  return JSON.stringify([said, notes, control], null, 1);
}

/** The rows of a table in so many parts, dealt out like cards, as tiles deal them out. */
function dealt(roles: RoleTable, parts: number): RoleTable[] {
  return Array.from({ length: parts }, (_, k) =>
    asRoleTable(
      selectRows(
        roles,
        Uint32Array.from({ length: roles.rows }, (__, i) => i).filter((i) => i % parts === k),
      ),
    ),
  );
}

describe('a run on the rows that can matter', () => {
  const input = universe();
  const selection = selectionOf({ ...input, catalogues: input.catalogues.filter(({ kind }) => kind === 'hi') });

  it('says of every detection what a run on all rows says, to the last digit', { timeout: 120_000 }, async () => {
    const catalogues = input.catalogues.map((table) => ({
      ...table,
      ...joinSifted(dealt(table.roles, 5).map((part) => siftRows(table.kind, part, selection))),
    }));
    expect(catalogues[0]!.roles.rows).toBeLessThan(0.7 * input.catalogues[0]!.roles.rows);
    expect(catalogues[3]!.roles.rows).toBeLessThan(500);
    const [sifted, whole] = [await resultsOf({ ...input, catalogues }), await resultsOf(input)];
    expect(sifted === whole, 'the results differ').toBe(true);
    expect(whole.length).toBeGreaterThan(1e6);
  });

  it('takes all detections', () => {
    const { kind, roles } = input.catalogues[1]!;
    expect(siftRows(kind, roles, selection).roles.rows).toBe(300);
  });
});

describe('the digest of a table', () => {
  it('is that of its parts together, in any order', () => {
    for (const { roles } of universe().catalogues) {
      const whole = mergeDigests([digestOf(roles)]);
      const parts = dealt(roles, 7).map(digestOf);
      expect(mergeDigests(parts)).toEqual(whole);
      expect(mergeDigests(parts.reverse())).toEqual(whole);
    }
  });
});
