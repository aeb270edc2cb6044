import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import { describe, expect, it } from 'vitest';
import { MarkField } from './mark-field.ts';
import type { MarkSprites } from './mark-sprites.ts';

const mark = (key: string, change: Partial<SkyMark> = {}): SkyMark => ({
  key,
  role: 'field',
  catalogueId: 'c',
  name: key,
  kind: 'optical',
  raDeg: 40,
  decDeg: 10,
  separationArcsec: 0,
  separationKpc: null,
  velocityDifferenceKms: null,
  magnitude: 20,
  band: 'r',
  isStar: false,
  agreement: 'none',
  ...change,
});
const centre = { raDeg: 40, decDeg: 10 };
const north = (arcsec: number) => ({ decDeg: 10 + arcsec / 3600 });

describe('the marks of a panel', () => {
  it('finds the mark nearest to the pointer, and none beyond the tolerance', () => {
    const field = new MarkField([mark('near', north(10)), mark('far', north(30))], centre);
    expect(field.nearest(0, 12, 5)).toBe('near');
    expect(field.nearest(1, 27, 5)).toBe('far');
    expect(field.nearest(0, 20, 5)).toBeNull();
  });

  it('takes of two at one place the one that is drawn on top: that with an agreeing velocity', () => {
    const field = new MarkField([mark('gas', { agreement: 'concordant' }), mark('plain')], centre);
    expect(field.nearest(0, 0, 5)).toBe('gas');
  });

  it('stamps only what is in view, in the orientation of the sky', () => {
    const stamps: number[][] = [];
    const context = { drawImage: (_: unknown, x: number, y: number) => stamps.push([x, y]) };
    const sprites = { of: () => ({ image: null, half: 4, radius: 2 }) } as unknown as MarkSprites;
    const field = new MarkField(
      [mark('a', north(50)), mark('b', { raDeg: 40 + 50 / 3600 }), mark('outside', north(500))],
      centre,
    );
    const view = { centre: [0, 0] as [number, number], resolution: 1, width: 200, height: 200 };
    const drawn = field.draw(context as unknown as CanvasRenderingContext2D, view, sprites);
    expect(drawn).toBe(2);
    expect(stamps[0]![1]).toBeCloseTo(100 - 50 - 4, 3);
    // 50 arcsec of right ascension at declination 10 are 50 cos 10 on the sky, to the left for the east.
    expect(stamps[1]![0]).toBeCloseTo(100 - 50 * Math.cos((10 * Math.PI) / 180) - 4, 2);
  });

  it('tells where a mark stands, and leaves one behind the sky out', () => {
    const field = new MarkField([mark('here', north(7)), mark('behind', { raDeg: 220, decDeg: -10 })], centre);
    expect(field.find('here')!.y).toBeCloseTo(7, 6);
    expect(field.find('behind')).toBeUndefined();
    expect(field.find('unknown')).toBeUndefined();
    expect(field.find(null)).toBeUndefined();
  });
});
