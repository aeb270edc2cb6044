import { describe, expect, it } from 'vitest';
import { capPoints } from './cap-points.ts';
import { Moc } from './moc.ts';
import { intersectRanges, normalRanges, type Ranges, rangesHold, rangesSize, uniteRanges } from './ranges.ts';
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

const members = (ranges: Ranges): Set<number> => {
  const set = new Set<number>();
  for (let i = 0; i < ranges.length; i += 2) for (let n = ranges[i]!; n < ranges[i + 1]!; n++) set.add(n);
  return set;
};
const sorted = (set: Iterable<number>) => [...set].sort((a, b) => a - b);

describe('ranges', () => {
  it('agree with plain sets on random ranges, overlapping, touching and empty', () => {
    const random = seeded(4);
    const some = () =>
      Array.from({ length: 12 }, () => Math.floor(120 * random())).flatMap((start) => [
        start,
        start + Math.floor(12 * random()),
      ]);
    for (let trial = 0; trial < 300; trial++) {
      const [flatA, flatB] = [some(), some()];
      const [a, b] = [normalRanges(flatA), normalRanges(flatB)];
      const [setA, setB] = [members(Float64Array.from(flatA)), members(Float64Array.from(flatB))];
      expect(sorted(members(a))).toEqual(sorted(setA));
      expect(rangesSize(a)).toBe(setA.size);
      expect(sorted(members(uniteRanges(a, b)))).toEqual(sorted(new Set([...setA, ...setB])));
      expect(sorted(members(intersectRanges(a, b)))).toEqual(sorted([...setA].filter((n) => setB.has(n))));
      for (let i = 2; i < a.length; i += 2) expect(a[i]!).toBeGreaterThan(a[i - 1]!);
      for (let start = 0; start < 135; start += 3) {
        const held = [0, 1, 2, 3].filter((n) => setA.has(start + n)).length;
        expect(rangesHold(a, start, start + 4)).toBe(held === 4 ? 'all' : held === 0 ? 'none' : 'some');
      }
    }
  });
});

describe('Moc of random cells', () => {
  it('comes back from ASCII, JSON and NUNIQ, at any order up to 24', () => {
    const random = seeded(9);
    for (let order = 0; order <= 24; order += 3) {
      const cells = Array.from({ length: 200 }, () => Math.floor(random() * 12 * 4 ** order));
      const moc = Moc.fromCells(order, cells);
      for (const back of [Moc.parse(moc.toAscii()), Moc.parse(moc.toJson()), Moc.fromUniq(moc.toUniq(), order)]) {
        expect(back.order).toBe(order);
        expect(back.ranges).toEqual(moc.ranges);
      }
    }
  });
});

describe('capPoints', () => {
  it.each([1e-6, 0.01, 1, Math.PI])('spread evenly over a cone of %d rad', (radius) => {
    const count = 4000;
    const points = capPoints(2, -1.2, radius, count);
    // Equal areas: half of the points lie within the angle that bounds half of the cap.
    const half = 2 * Math.asin(Math.sin(radius / 2) / Math.SQRT2);
    let within = 0;
    for (let i = 0; i < count; i++) {
      const distance = separation(2, -1.2, points[2 * i]!, points[2 * i + 1]!);
      expect(distance).toBeLessThan(radius * (1 + 1e-9));
      if (distance < half) within++;
    }
    expect(Math.abs(within - count / 2)).toBeLessThanOrEqual(2);
  });
});
