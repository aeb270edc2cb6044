import { describe, expect, it } from 'vitest';
import { conesCells } from '@eremite/shared/science/sky/healpix-cone';
import { evenSky } from './testing/brute-force.ts';
import { tileCover } from './tile-cover.ts';

describe('the cover of a cone by tiles', () => {
  it.each([0, 1e-6, 0.003, 0.05, 0.4, 2, Math.PI])('holds every cell of the direct search at %d radians', (radius) => {
    const cover = tileCover(4);
    const { raDeg, decDeg } = evenSky(60, 61);
    raDeg.set([0, 0, 45, 359.999]);
    decDeg.set([90, -90, 41.81, 0]);
    let extra = 0;
    let cells = 0;
    for (let i = 0; i < raDeg.length; i++) {
      const [lon, lat] = [(raDeg[i]! * Math.PI) / 180, (decDeg[i]! * Math.PI) / 180];
      const found = cover(lon, lat, radius);
      const direct = conesCells(4, lon, lat, radius);
      expect(direct.filter((cell) => !found.includes(cell))).toEqual([]);
      expect(found).toEqual([...found].sort((a, b) => a - b));
      extra += found.length - direct.length;
      cells += direct.length;
    }
    expect(extra).toBeLessThanOrEqual(0.2 * cells);
  });
});
