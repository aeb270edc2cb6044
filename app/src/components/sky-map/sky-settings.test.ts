import type { SkyMark } from '@eremite/shared/drawing/sky-mark';
import { describe, expect, it } from 'vitest';
import { panelLayers } from './panel-layer.ts';
import { EVERYTHING, isShown } from './sky-settings.ts';

const mark = (change: Partial<SkyMark> = {}): SkyMark => ({
  key: 'c:1',
  role: 'field',
  catalogueId: 'c',
  name: '1',
  kind: 'optical',
  raDeg: 40,
  decDeg: 10,
  separationArcsec: 5,
  separationKpc: null,
  velocityDifferenceKms: null,
  magnitude: 20,
  band: 'r',
  isStar: false,
  agreement: 'none',
  ...change,
});

describe('what the sky panel shows', () => {
  it('is everything unless told otherwise', () => {
    expect(isShown(mark({ magnitude: null }), EVERYTHING)).toBe(true);
  });

  it('leaves out tables, what is too faint, and velocities too far off, limits included', () => {
    expect(isShown(mark(), { ...EVERYTHING, hidden: ['c'] })).toBe(false);
    expect(isShown(mark(), { ...EVERYTHING, faintestMag: 20 })).toBe(true);
    expect(isShown(mark(), { ...EVERYTHING, faintestMag: 19.9 })).toBe(false);
    const slow = { ...EVERYTHING, windowKms: 500 };
    expect(isShown(mark({ velocityDifferenceKms: -500 }), slow)).toBe(true);
    expect(isShown(mark({ velocityDifferenceKms: -501 }), slow)).toBe(false);
  });

  it('keeps what has no magnitude or no velocity: a limit says nothing of it', () => {
    expect(isShown(mark({ magnitude: null }), { ...EVERYTHING, faintestMag: 15 })).toBe(true);
    expect(isShown(mark(), { ...EVERYTHING, windowKms: 100 })).toBe(true);
    expect(isShown(mark(), { ...EVERYTHING, withoutVelocity: false })).toBe(false);
    expect(isShown(mark({ velocityDifferenceKms: 9 }), { ...EVERYTHING, withoutVelocity: false })).toBe(true);
  });

  it('counts the objects of each table, none included', () => {
    const tables = [
      { catalogueId: 'c', name: 'C', kind: 'optical' },
      { catalogueId: 'd', name: 'D', kind: 'hi' },
    ];
    expect(panelLayers(tables, [mark(), mark()]).map(({ objects }) => objects)).toEqual([2, 0]);
  });
});
