import { describe, expect, it } from 'vitest';
import { chooseProjection, meanDirection } from './project-sky.ts';

describe('the map of a survey', () => {
  it('finds the middle of a field across right ascension zero', () => {
    const { raDeg, decDeg } = meanDirection([
      { raDeg: 359, decDeg: 10 },
      { raDeg: 1, decDeg: 10 },
    ]);
    expect(Math.min(raDeg, 360 - raDeg)).toBeLessThan(1e-9);
    // The mean of two directions on a parallel lies a little poleward of it.
    expect(decDeg).toBeGreaterThan(10);
  });

  it('draws a field as a plane and scattered detections as the whole sky, east left in both', () => {
    const field = chooseProjection([
      { raDeg: 40, decDeg: 10 },
      { raDeg: 50, decDeg: 12 },
    ]);
    const whole = chooseProjection([
      { raDeg: 10, decDeg: 0 },
      { raDeg: 190, decDeg: 0 },
    ]);
    expect([field.kind, whole.kind]).toEqual(['field', 'whole sky']);
    expect(field.place(50, 11)![0]).toBeLessThan(field.place(40, 11)![0]);
    expect(whole.place(190, 0)![0]).toBeLessThan(whole.place(170, 0)![0]);
  });
});
