import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { allSkyFootprint, circlesFootprint, mocFootprint, polygonsFootprint } from './footprint.ts';
import { cellSide } from './healpix.ts';
import { Moc } from './moc.ts';
import { offsetBy } from './offset.ts';
import { rowsFootprint } from './rows-footprint.ts';
import { separation } from './separation.ts';

/** Seeded uniform numbers in [0, 1): mulberry32. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** Rows spread evenly over RA 150..160, Dec 0..8 degrees, but for what `keep` refuses. */
function rowsInBox(count: number, keep: (ra: number, dec: number) => boolean = () => true) {
  const random = seeded(7);
  const ra: number[] = [];
  const dec: number[] = [];
  while (ra.length < count) {
    const a = 150 + 10 * random();
    const d = Math.asin(random() * Math.sin(8 * DEGREE)) / DEGREE;
    if (keep(a, d)) {
      ra.push(a);
      dec.push(d);
    }
  }
  return { ra, dec };
}

describe('circlesFootprint', () => {
  it('loses none of very many small circles', () => {
    // 2,500 circles of 10 arcsec: by their edges alone the cells would be larger than they are.
    const circles = Array.from({ length: 2500 }, (_, i) => ({
      lon: (100 + (i % 50) * 0.5) * DEGREE,
      lat: (Math.floor(i / 50) * 0.5 - 12) * DEGREE,
      radius: 10 * (DEGREE / 3600),
    }));
    const { region } = circlesFootprint(circles);
    expect(circles.every(({ lon, lat }) => region.contains(lon, lat))).toBe(true);
    expect(region.area / (2500 * Math.PI * (10 * (DEGREE / 3600)) ** 2)).toBeCloseTo(1, 2);
  });

  it('covers its circle to a four-hundredth of the radius', () => {
    const footprint = circlesFootprint([{ lon: 1, lat: 0.8, radius: 2 * DEGREE }]);
    expect(footprint.region.area / (2 * Math.PI * (1 - Math.cos(2 * DEGREE)))).toBeCloseTo(1, 3);
    const random = seeded(1);
    for (let i = 0; i < 2000; i++) {
      const place = offsetBy(1, 0.8, 2 * Math.PI * random(), 4 * DEGREE * random());
      const distance = separation(1, 0.8, place.lon, place.lat);
      if (Math.abs(distance - 2 * DEGREE) < footprint.edgeUncertainty) continue;
      expect(footprint.covers(place.lon, place.lat)).toBe(distance < 2 * DEGREE);
    }
    expect(footprint.edgeUncertainty).toBeLessThan((2 * DEGREE) / 400);
  });

  it('gives the covered fraction of a cone at the rim, and the distance to the rim', () => {
    const footprint = circlesFootprint([{ lon: 1, lat: 0, radius: 5 * DEGREE }]);
    // Source: two plane circles of radii 5 and 1 at distance 5: area of the lens by the usual formula.
    const [big, small, apart] = [5, 1, 5];
    const a = Math.acos((apart ** 2 + small ** 2 - big ** 2) / (2 * apart * small));
    const b = Math.acos((apart ** 2 + big ** 2 - small ** 2) / (2 * apart * big));
    const lens = small ** 2 * (a - Math.sin(2 * a) / 2) + big ** 2 * (b - Math.sin(2 * b) / 2);
    expect(Math.abs(footprint.coveredFraction(1 + 5 * DEGREE, 0, DEGREE) - lens / Math.PI)).toBeLessThan(0.02);
    expect(footprint.coveredFraction(1, 0, DEGREE)).toBe(1);
    expect(footprint.coveredFraction(2, 0, DEGREE)).toBe(0);
    expect(footprint.distanceToEdge(1 + 2 * DEGREE, 0) / DEGREE).toBeGreaterThan(2.85);
    expect(footprint.distanceToEdge(1 + 2 * DEGREE, 0) / DEGREE).toBeLessThan(3.02);
    expect(footprint.distanceToEdge(2, 0)).toBe(0);
  });

  it('is the same each time it is asked', () => {
    const footprint = circlesFootprint([{ lon: 1, lat: 0, radius: 0.05 }]);
    const first = footprint.coveredFraction(1.05, 0, 0.01);
    expect(footprint.coveredFraction(1.05, 0, 0.01)).toBe(first);
  });

  it('refuses an empty list and a circle without size', () => {
    expect(() => circlesFootprint([])).toThrow(DomainError);
    expect(() => circlesFootprint([{ lon: 0, lat: 0, radius: 0 }])).toThrow(DomainError);
  });
});

describe('polygonsFootprint', () => {
  const octant = [
    { lon: 0, lat: 0 },
    { lon: Math.PI / 2, lat: 0 },
    { lon: 0, lat: Math.PI / 2 },
  ];

  it('covers an octant of the sphere, whichever way round it is given', () => {
    for (const corners of [octant, [...octant].reverse()]) {
      const footprint = polygonsFootprint([corners]);
      expect(footprint.region.skyFraction).toBeCloseTo(1 / 8, 3); // cell centres lie on its edges
      expect(footprint.covers(0.7, 0.5)).toBe(true);
      expect(footprint.covers(-0.1, 0.5)).toBe(false);
      expect(footprint.covers(0.7 + Math.PI, -0.5)).toBe(false);
    }
  });

  it('holds a field across RA 0 and a dent in it', () => {
    const corner = (ra: number, dec: number) => ({ lon: ra * DEGREE, lat: dec * DEGREE });
    const footprint = polygonsFootprint([[corner(358, -2), corner(2, -2), corner(2, 2), corner(0, 0), corner(358, 2)]]);
    expect(footprint.covers(0, -1 * DEGREE)).toBe(true);
    expect(footprint.covers(359 * DEGREE, 0.5 * DEGREE)).toBe(true);
    expect(footprint.covers(0, 1 * DEGREE)).toBe(false);
    expect(footprint.region.area / DEGREE ** 2).toBeCloseTo(12, 1);
  });

  it('refuses what is no polygon or too large', () => {
    expect(() => polygonsFootprint([octant.slice(0, 2)])).toThrow(/three corners/);
    const third = [0, 2, 4].map((lon) => ({ lon, lat: 0 }));
    expect(() => polygonsFootprint([third])).toThrow(/hemisphere/);
  });
});

describe('allSkyFootprint', () => {
  it('covers everything and has no edge', () => {
    const footprint = allSkyFootprint();
    expect(footprint.covers(3, -1.5)).toBe(true);
    expect(footprint.distanceToEdge(3, -1.5)).toBe(Infinity);
    expect(footprint.edgeUncertainty).toBe(0);
    expect(() => mocFootprint(Moc.fromCells(3, []))).toThrow(/empty/);
  });
});

describe('rowsFootprint', () => {
  it('finds the field of a dense table, to a cell', () => {
    const { ra, dec } = rowsInBox(40_000);
    const found = rowsFootprint(ra, dec);
    if (!found.known) throw new Error(found.reason);
    expect(found.rowsPerCell).toBeGreaterThanOrEqual(5);
    // The next finer order would hold fewer than five.
    expect(found.rowsPerCell / 4).toBeLessThan(5);
    const trueArea = 10 * DEGREE * Math.sin(8 * DEGREE);
    expect(Math.abs(found.footprint.region.area / trueArea - 1)).toBeLessThan(0.05);
    const margin = (1.5 * cellSide(found.order)) / DEGREE;
    const random = seeded(3);
    let missed = 0;
    for (let i = 0; i < 4000; i++) {
      const a = 148 + 14 * random();
      const d = -2 + 12 * random();
      const inside = Math.min(a - 150, 160 - a, d, 8 - d);
      if (Math.abs(inside) < margin) continue;
      const covered = found.footprint.covers(a * DEGREE, d * DEGREE);
      if (inside < 0) expect(covered).toBe(false);
      else if (!covered) missed++;
    }
    expect(missed).toBeLessThan(8);
  });

  it('leaves a real hole open and ignores strays', () => {
    const { ra, dec } = rowsInBox(40_000, (a, d) => Math.hypot(a - 155, d - 4) > 1);
    const found = rowsFootprint([...ra, 20], [...dec, -50]);
    if (!found.known) throw new Error(found.reason);
    expect(found.footprint.covers(155 * DEGREE, 4 * DEGREE)).toBe(false);
    expect(found.footprint.covers(152 * DEGREE, 2 * DEGREE)).toBe(true);
    expect(found.footprint.covers(20 * DEGREE, -50 * DEGREE)).toBe(false);
    expect(found.footprint.coveredFraction(155 * DEGREE, 4 * DEGREE, 0.5 * DEGREE)).toBeLessThan(0.1);
  });

  it('refuses a sparse table over the sky, with the reason', () => {
    const random = seeded(5);
    const ra = Array.from({ length: 14_000 }, () => 360 * random());
    const dec = Array.from({ length: 14_000 }, () => Math.asin(2 * random() - 1) / DEGREE);
    const found = rowsFootprint(ra, dec);
    expect(found.known).toBe(false);
    expect(!found.known && found.reason).toMatch(/14000 rows are too sparse/);
  });

  it.each([
    ['no rows', [], /no row with a position/],
    ['rows without positions', [Number.NaN], /no row with a position/],
    ['ten rows', [1, 1.1, 1.2, 1.3, 1.4, 1.5, 1.6, 1.7, 1.8, 1.9], /too few to tell/],
    ['one clump', Array.from({ length: 500 }, (_, i) => 10 + i * 1e-5), /too few to tell/],
  ])('refuses %s', (_name, places, reason) => {
    const found = rowsFootprint(places, places);
    expect(found.known).toBe(false);
    expect(!found.known && found.reason).toMatch(reason);
  });

  it('refuses a table of pointed observations: clumps with nothing between', () => {
    const random = seeded(11);
    const ra: number[] = [];
    const dec: number[] = [];
    for (let clump = 0; clump < 300; clump++) {
      const [a, d] = [100 + 60 * random(), -20 + 40 * random()];
      const rows = clump % 3 === 0 ? 40 : 1;
      for (let i = 0; i < rows; i++) {
        ra.push(a + 0.02 * random());
        dec.push(d + 0.02 * random());
      }
    }
    expect(rowsFootprint(ra, dec).known).toBe(false);
  });
});
