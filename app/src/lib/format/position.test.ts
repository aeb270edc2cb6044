import { describe, expect, it } from 'vitest';
import { declination, rightAscension } from './position.ts';

describe('positions on the screen', () => {
  it('round to the next minute instead of showing 60 seconds', () => {
    expect(rightAscension(359.999999)).toBe('00ʰ00ᵐ00.0ˢ');
    expect(declination(14.999999)).toBe('+15°00′00″');
  });

  it('keep the sign of a declination between zero and minus one degree', () => {
    expect(declination(-0.5)).toBe('−00°30′00″');
  });

  it('agree with degrees worked by hand', () => {
    // 48.017083 / 15 = 3.2011389 h = 3 h 12 min 4.1 s; 14.122778 = 14 deg 7 arcmin 22 arcsec.
    expect(rightAscension(48.017083)).toBe('03ʰ12ᵐ04.1ˢ');
    expect(declination(14.122778)).toBe('+14°07′22″');
  });
});
