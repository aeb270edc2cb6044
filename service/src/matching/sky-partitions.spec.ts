import { describe, expect, it } from 'vitest';
import { cellOf } from '@eremite/shared/science/sky/healpix';
import { brutePairs, evenSky, type SkyPoints } from './testing/brute-force.ts';
import { planPartitions } from './sky-partitions.ts';

const DEGREE = Math.PI / 180;
const ORDER = 3;
const rows = evenSky(4000, 51);
const tileOf = (points: SkyPoints, i: number) => cellOf(ORDER, points.raDeg[i]! * DEGREE, points.decDeg[i]! * DEGREE);
const tiles = new Map<number, number[]>();
for (let i = 0; i < 4000; i++) tiles.set(tileOf(rows, i), [...(tiles.get(tileOf(rows, i)) ?? []), i]);
const rowsInCell = (cell: number) => tiles.get(cell)?.length ?? 0;
const detections = (radiusDeg: number, count = 300) => ({
  ...evenSky(count, 52),
  radiusArcsec: new Float64Array(count).fill(radiusDeg * 3600),
});

describe('partitions of a run', () => {
  it.each([
    [0.01, 200],
    [3, 300],
    [20, 1500],
  ])('hold every detection once and, within %d degrees, every pair', (radius, maxRows) => {
    const at = detections(radius);
    const partitions = planPartitions(at, { order: ORDER, rowsInCell, maxRows });
    expect(partitions.flatMap(({ detections: d }) => [...d]).sort((a, b) => a - b)).toEqual([...Array(300).keys()]);
    const reads = new Map(partitions.flatMap((p) => [...p.detections].map((d) => [d, new Set(p.cells)] as const)));
    for (const pair of brutePairs(at, rows)) {
      const [detection, row] = pair.split(' ').map(Number) as [number, number];
      expect(reads.get(detection)!.has(tileOf(rows, row))).toBe(true);
    }
  });
  it('stay below the rows allowed, and count what they read', () => {
    const partitions = planPartitions(detections(3), { order: ORDER, rowsInCell, maxRows: 300 });
    expect(partitions.length).toBeGreaterThan(5);
    for (const { cells, rows: count } of partitions) {
      expect(count).toBeLessThanOrEqual(300);
      expect(count).toBe([...cells].reduce((sum, cell) => sum + rowsInCell(cell), 0));
      expect([...cells].every((cell) => rowsInCell(cell) > 0)).toBe(true);
    }
  });
  it('give a detection that needs more than is allowed one of its own', () => {
    const partitions = planPartitions(detections(60, 5), { order: ORDER, rowsInCell, maxRows: 100 });
    expect(partitions.map(({ detections: d }) => d.length)).toEqual([1, 1, 1, 1, 1]);
    expect(partitions[0]!.rows).toBeGreaterThan(100);
  });
  it('hold no more detections than allowed', () => {
    const sizes = planPartitions(detections(3), { order: ORDER, rowsInCell, maxRows: 1e9, maxDetections: 128 });
    expect(sizes.map(({ detections: d }) => d.length)).toEqual([128, 128, 44]);
  });
  it('are the same each time', () => {
    const plan = () => planPartitions(detections(3), { order: ORDER, rowsInCell, maxRows: 300 });
    expect(plan()).toEqual(plan());
  });
  it('read nothing where the catalogue has no rows, and are none for no detections', () => {
    const [only, ...others] = planPartitions(detections(3), { order: ORDER, rowsInCell: () => 0, maxRows: 300 });
    expect([only!.rows, only!.cells.length, only!.detections.length, others.length]).toEqual([0, 0, 300, 0]);
    expect(planPartitions(detections(3, 0), { order: ORDER, rowsInCell, maxRows: 300 })).toEqual([]);
  });
  it('are refused for settings, positions and radii that make no sense', () => {
    expect(() => planPartitions(detections(3), { order: ORDER, rowsInCell, maxRows: 0 })).toThrow(/cannot be made/);
    expect(() => planPartitions(detections(181), { order: ORDER, rowsInCell, maxRows: 9 })).toThrow(/search radius/);
    const astray = { ...detections(3, 1), decDeg: Float64Array.of(NaN) };
    expect(() => planPartitions(astray, { order: ORDER, rowsInCell, maxRows: 9 })).toThrow(/no position/);
  });
});
