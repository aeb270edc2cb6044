import { separation } from '@eremite/shared/science/sky/separation';
import { describe, expect, it } from 'vitest';
import { PartOverlaps } from './part-overlaps.ts';

const RAD = Math.PI / 180;
interface Row {
  ra: number;
  dec: number;
  part: number;
}

/** Seeded uniform numbers in [0, 1). */
function seeded(state: number): () => number {
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

/** Row numbers of the rows that an earlier part has, each with the nearest that stays, the plain way. */
function bruteForce(rows: readonly Row[], radiusArcsec: number): [number, number][] {
  const kept: number[] = [];
  return rows.flatMap(({ ra, dec, part }, i): [number, number][] => {
    const near = kept
      .filter((k) => rows[k]!.part !== part)
      .map((k) => ({ k, apart: separation(ra * RAD, dec * RAD, rows[k]!.ra * RAD, rows[k]!.dec * RAD) }))
      .filter(({ apart }) => apart <= (radiusArcsec / 3600) * RAD)
      .sort((a, b) => a.apart - b.apart);
    if (near.length > 0) return [[i + 1, near[0]!.k + 1]];
    kept.push(i);
    return [];
  });
}

function overlaps(rows: readonly Row[], radiusArcsec: number): [number, number][] {
  const finder = new PartOverlaps(radiusArcsec);
  const found: [number, number][] = [];
  for (let part = 0, from = 0; from < rows.length; part++) {
    const own = rows.filter((row) => row.part === part);
    const chunk = {
      rows: own.length,
      columns: {
        row: Uint32Array.from(own, (_, i) => from + i + 1),
        raDeg: Float64Array.from(own, ({ ra }) => ra),
        decDeg: Float64Array.from(own, ({ dec }) => dec),
      },
    };
    for (const [i, row] of finder.take(chunk, part)) found.push([from + i + 1, row]);
    from += own.length;
  }
  return found;
}

describe('overlaps of parts', () => {
  it.each([
    ['across the zero of right ascension', 0, 0.01, 30],
    ['near the pole', 80, 89.998, 40],
    ['at the pole itself', 0, 89.9999, 3600],
    ['at the south pole', 10, -89.999, 60],
    ['with a fine radius', 150, 2, 0.5],
  ])('are those of brute force %s', (_, ra0, dec0, radius) => {
    const random = seeded(11);
    const spread = dec0 > 89 || dec0 < -89 ? 360 : (radius / 3600) * 20;
    const rows = Array.from({ length: 1500 }, (_, i) => ({
      ra: (((ra0 + (random() - 0.5) * spread) % 360) + 360) % 360,
      dec: Math.max(-90, Math.min(90, dec0 + (random() - 0.5) * (radius / 3600) * 20)),
      part: Math.floor(i / 500),
    }));
    const expected = bruteForce(rows, radius);
    expect(expected.length).toBeGreaterThan(50);
    expect(overlaps(rows, radius)).toEqual(expected);
  });

  it('never are two rows of one part, however near', () => {
    const rows = [0, 0, 1, 1].map((part) => ({ ra: 10, dec: 20, part }));
    expect(overlaps(rows, 1)).toEqual([
      [3, 1],
      [4, 1],
    ]);
  });
});
