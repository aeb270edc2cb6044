import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { capPoints } from './cap-points.ts';
import {
  cellArea,
  cellBoundary,
  cellCentre,
  cellCount,
  cellOf,
  cellOfBig,
  cellRadius,
  cellSide,
  neighbours,
} from './healpix.ts';
import { conesCells } from './healpix-cone.ts';
import { separation } from './separation.ts';
import { fromUniq, toUniq } from './uniq.ts';

// Source: Górski et al. (2005), ApJ 622, 759; values computed with healpy 1.16.1; exact.
const CELLS: [name: string, ra: number, dec: number, cells: [number, number, number, number], finest: bigint][] = [
  ['Crab', 83.633083, 22.0145, [377, 24185, 6191509, 396256589], 1701909093095840580n],
  ['origin', 0, 0, [304, 19456, 4980736, 318767104], 1369094286720630784n],
  ['M87', 187.705931, 12.391123, [433, 27765, 7108082, 454917253], 1953854728243274820n],
  ['fieldA', 24.875, 43.475, [38, 2477, 634285, 40594243], 174350948570655285n],
  ['npole', 0, 90, [63, 4095, 1048575, 67108863], 288230376151711743n],
  ['spole', 0, -90, [512, 32768, 8388608, 536870912], 2305843009213693952n],
  ['neg', 359.999, -0.001, [271, 17407, 4456447, 285212671], 1224979098558506967n],
  ['equator_edge', 45, 0, [362, 23210, 5941930, 380283562], 1633305464859699882n],
  ['polar_cap', 100, 75, [123, 7923, 2028506, 129824437], 557591715361021686n],
];
const UNIQ_10: Record<string, number> = {
  Crab: 10385813,
  origin: 9175040,
  M87: 11302386,
  fieldA: 4828589,
  npole: 5242879,
  spole: 12582912,
  neg: 8650751,
  equator_edge: 10136234,
  polar_cap: 6222810,
};

describe('cellOf', () => {
  it.each(CELLS)('gives the check value 12.healpix.%s', (name, ra, dec, cells, finest) => {
    expect([3, 6, 10, 13].map((order) => cellOf(order, ra * DEGREE, dec * DEGREE))).toEqual(cells);
    expect(cellOfBig(29, ra * DEGREE, dec * DEGREE)).toBe(finest);
    expect(Number(toUniq(10, BigInt(cells[2])))).toBe(UNIQ_10[name]);
  });

  it('agrees with the integer form at every order', () => {
    for (let order = 0; order <= 24; order++) {
      for (const [lon, lat] of [
        [0.1, 0.2],
        [3.3, -1.4],
        [6.2, 1.5],
      ] as const) {
        expect(BigInt(cellOf(order, lon, lat))).toBe(cellOfBig(29, lon, lat) >> BigInt(2 * (29 - order)));
      }
    }
  });

  it('refuses orders and directions out of range', () => {
    expect(() => cellOf(25, 0, 0)).toThrow(DomainError);
    expect(() => cellOf(-1, 0, 0)).toThrow(DomainError);
    expect(() => cellOf(5, 0, 2)).toThrow(DomainError);
  });
});

describe('cellCentre', () => {
  it('gives the check value 12.healpix.centre', () => {
    // Source: healpy 1.16.1; 1e-9 deg.
    const { lon, lat } = cellCentre(3, 10);
    expect(Math.abs(lon / DEGREE - 28.124999999999996)).toBeLessThan(1e-9);
    expect(Math.abs(lat / DEGREE - 19.47122063449069)).toBeLessThan(1e-9);
  });

  it('lies in its own cell, for each cell of order 4 and a spread of finer ones', () => {
    for (let cell = 0; cell < cellCount(4); cell++) {
      const { lon, lat } = cellCentre(4, cell);
      expect(cellOf(4, lon, lat)).toBe(cell);
    }
    for (let i = 0; i < 5000; i++) {
      const cell = Math.floor(((i * 0.618034) % 1) * cellCount(20));
      const { lon, lat } = cellCentre(20, cell);
      expect(cellOf(20, lon, lat)).toBe(cell);
    }
  });
});

describe('cellRadius', () => {
  it.each([0, 1, 2, 3, 5])('holds every corner at order %d, and touches one', (order) => {
    let most = 0;
    for (let cell = 0; cell < cellCount(order); cell++) {
      const { lon, lat } = cellCentre(order, cell);
      for (const edge of cellBoundary(order, cell, 4)) most = Math.max(most, separation(lon, lat, edge.lon, edge.lat));
    }
    expect(most).toBeLessThanOrEqual(cellRadius(order) + 1e-12);
    expect(most).toBeGreaterThan(0.999 * cellRadius(order));
  });
});

describe('neighbours', () => {
  it.each([1, 2, 3])('are the cells that share a corner or an edge at order %d', (order) => {
    // Independent of the rule: two cells are neighbours if their corners coincide on the sky.
    const corners = Array.from({ length: cellCount(order) }, (_, cell) => cellBoundary(order, cell));
    for (let cell = 0; cell < corners.length; cell++) {
      const touching = corners.flatMap((others, other) =>
        other !== cell && others.some((a) => corners[cell]!.some((b) => separation(a.lon, a.lat, b.lon, b.lat) < 1e-9))
          ? [other]
          : [],
      );
      expect(neighbours(order, cell)).toEqual(touching);
    }
  });
});

describe('conesCells', () => {
  it.each([
    [6, 0.001, 0.3, 0.05],
    [8, 2, 1.565, 0.02],
    [10, 4, -0.7297, 0.004],
    [3, 1, 0, 2.5],
  ])('covers the cone at order %d about (%d, %d) of radius %d, and little more', (order, lon, lat, radius) => {
    const cells = new Set(conesCells(order, lon, lat, radius));
    const points = capPoints(lon, lat, radius, 20_000);
    for (let i = 0; i < 20_000; i++) expect(cells.has(cellOf(order, points[2 * i]!, points[2 * i + 1]!))).toBe(true);
    for (const cell of cells) {
      const centre = cellCentre(order, cell);
      expect(separation(lon, lat, centre.lon, centre.lat)).toBeLessThan(radius + 1.01 * cellRadius(order));
    }
  });

  it('is one cell for a point and all cells for the sphere', () => {
    expect(conesCells(12, 1, 0.5, 0)).toContain(cellOf(12, 1, 0.5));
    expect(conesCells(2, 1, 0.5, Math.PI)).toHaveLength(192);
  });

  it('refuses a cone of too many cells', () => {
    expect(() => conesCells(20, 0, 0, 1)).toThrow(/use coneRanges/);
  });
});

describe('cell sizes', () => {
  // Source: IVOA MOC 2.0; 12.moc.orders, 1e-9 relative.
  it.each([
    [0, 12, 3437.7467707849396, 3517.9380857010237],
    [3, 768, 53.71479329351468, 439.74226071262797],
    [6, 49152, 0.8392936452111669, 54.967782589078496],
    [8, 786432, 0.05245585282569793, 13.741945647269624],
    [10, 12582912, 0.0032784908016061207, 3.435486411817406],
    [11, 50331648, 0.0008196227004015302, 1.717743205908703],
    [12, 201326592, 0.00020490567510038254, 0.8588716029543515],
    [13, 805306368, 5.1226418775095636e-5, 0.42943580147717575],
    [29, 3458764513820540928, 1.1927080055488189e-14, 6.552670310625851e-6],
  ])('are those of the standard at order %d', (order, cells, areaDeg2, sideArcmin) => {
    expect(cellCount(order)).toBe(cells);
    expect(cellArea(order) / DEGREE ** 2 / areaDeg2).toBeCloseTo(1, 9);
    expect(((cellSide(order) / DEGREE) * 60) / sideArcmin).toBeCloseTo(1, 9);
  });
});

describe('NUNIQ', () => {
  // Source: IVOA MOC 2.0, uniq = 4 · 4^order + index; 12.moc.uniq.*
  it.each([
    [3, 10n, 266n],
    [0, 11n, 15n],
    [10, 1234567n, 5428871n],
    [29, 0n, 1152921504606846976n],
  ])('packs order %d cell %d', (order, cell, uniq) => {
    expect(toUniq(order, cell)).toBe(uniq);
    expect(fromUniq(uniq)).toEqual({ order, cell });
  });
});
