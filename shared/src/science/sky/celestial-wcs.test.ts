import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { celestialWcs } from './celestial-wcs.ts';
import { fromIcrs } from './from-icrs.ts';
import { toIcrs } from './frames.ts';
import { separation } from './separation.ts';
import { PROJECTION_CODES } from './sky-projections.ts';
import { toTangentPlane } from './tangent-plane.ts';

const step = 2e-3 * DEGREE;
const keywords = {
  projection: 'TAN',
  pixel: [50.5, 40.5],
  value: [1.2, 0.4],
  matrix: [
    [-step, 0],
    [0, step],
  ],
} as const;

describe('celestialWcs', () => {
  it('of a TAN image is the tangent plane in pixels', () => {
    const wcs = celestialWcs(keywords);
    const place = wcs.toSky(70, 10)!;
    const plane = toTangentPlane(place.lon, place.lat, 1.2, 0.4)!;
    expect(plane.xi / step).toBeCloseTo(-19.5, 8);
    expect(plane.eta / step).toBeCloseTo(-30.5, 8);
  });

  it.each(PROJECTION_CODES)('%s brings back every pixel it sent to the sky', (projection) => {
    const wcs = celestialWcs({ ...keywords, projection, lonPole: projection === 'TAN' ? 2 : undefined });
    for (const [x, y] of [
      [1, 1],
      [50.5, 40.5],
      [99, 3],
      [-500, 900],
    ] as const) {
      const place = wcs.toSky(x, y)!;
      const back = wcs.toPixel(place.lon, place.lat)!;
      expect(Math.hypot(back.x - x, back.y - y)).toBeLessThan(1e-6);
    }
  });

  it('shows nothing behind the tangent point, and has no sky beyond an ellipse', () => {
    expect(celestialWcs(keywords).toPixel(1.2 + Math.PI, -0.4)).toBeUndefined();
    expect(celestialWcs({ ...keywords, projection: 'AIT' }).toSky(1e6, 0)).toBeUndefined();
    expect(celestialWcs({ ...keywords, projection: 'SIN' }).toSky(1e6, 0)).toBeUndefined();
  });

  it('refuses a singular matrix and a value that is not finite', () => {
    const matrix = [
      [1, 2],
      [2, 4],
    ] as const;
    expect(() => celestialWcs({ ...keywords, matrix })).toThrow(DomainError);
    expect(() => celestialWcs({ ...keywords, pixel: [NaN, 1] })).toThrow(/finite/);
  });

  it('gives up on a distortion that cannot be undone in place of a wrong pixel', () => {
    const wild = { a: [{ p: 2, q: 0, value: 5 }], b: [{ p: 0, q: 2, value: 5 }] };
    const wcs = celestialWcs({ ...keywords, distortion: wild });
    expect(wcs.toPixel(1.2 + 30 * step, 0.4 + 30 * step)).toBeUndefined();
  });
});

describe('fromIcrs', () => {
  it.each(['icrs', 'fk5', 'b1950', 'galactic'] as const)('undoes toIcrs in %s', (frame) => {
    for (const [lon, lat] of [
      [0.1, 0.2],
      [3, -1.5],
      [6.2, 1.57],
    ] as const) {
      const icrs = toIcrs(frame, lon, lat);
      const back = fromIcrs(frame, icrs.lon, icrs.lat);
      expect(separation(back.lon, back.lat, lon, lat)).toBeLessThan(1e-14);
    }
  });
});
