import { describe, expect, it } from 'vitest';
import { containsOrigin, ellipseOutline, rayleighRadius, toPanel } from './panel-plane.ts';

describe('the sky panel', () => {
  const centre = { raDeg: 48, decDeg: 14 };

  it('has east on the left and north up', () => {
    const [eastX] = toPanel(48.01, 14, centre)!;
    const [, northY] = toPanel(48, 14.01, centre)!;
    expect(eastX).toBeLessThan(0);
    // One hundredth of a degree is 36 arcsec; the tangent plane stretches it by less than 1e-6 here.
    expect(northY).toBeCloseTo(36, 3);
    expect(-eastX).toBeCloseTo(36 * Math.cos((14 * Math.PI) / 180), 3);
  });

  it('does not tear at right ascension zero', () => {
    const [x] = toPanel(359.99, 0, { raDeg: 0.01, decDeg: 0 })!;
    expect(x).toBeCloseTo(72, 3);
  });

  it('turns an ellipse from north through east', () => {
    const [x, y] = ellipseOutline(10, 5, 90)[0]!;
    expect(x).toBeCloseTo(-10, 9);
    expect(y).toBeCloseTo(0, 9);
  });

  it('knows whether the detection itself lies in a cell', () => {
    const square = (x: number): [number, number][] => [
      [x - 1, -1],
      [x + 1, -1],
      [x + 1, 1],
      [x - 1, 1],
      [x - 1, -1],
    ];
    expect([containsOrigin(square(0)), containsOrigin(square(3)), containsOrigin(square(-3))]).toEqual([
      true,
      false,
      false,
    ]);
  });

  it('draws error circles at the radii of a circular Gaussian', () => {
    // Rayleigh distribution: 39.35 per cent lie within one sigma, 98.89 per cent within three.
    expect(rayleighRadius(0.3934693)).toBeCloseTo(1, 5);
    expect(rayleighRadius(0.988891)).toBeCloseTo(3, 4);
  });
});
