import { describe, expect, it } from 'vitest';
import { angleWords, byName, degreesOff } from './match-observation.ts';

const at = (name: string) => ({ name, raDeg: 10, decDeg: 0 });
const LIST = ['S1', 'S10', 'HS J0123+45', 'HS J0123+456'].map(at);

describe('byName', () => {
  it.each([
    ['S1_r.fits', 'S1'],
    ['S10_r.fits', 'S10'],
    ['s10.csv', 'S10'],
    ['hs_j0123+456 r.fits', 'HS J0123+456'],
    ['HSJ0123+45-spectrum.csv', 'HS J0123+45'],
  ])('finds the detection of %s', (file, name) => expect(byName(LIST, file)?.name).toBe(name));

  it('goes by the object of the header too, and finds nothing in other words', () => {
    expect(byName(LIST, 'cutout.fits', 'S10')?.name).toBe('S10');
    expect(byName(LIST, 'S100.fits', null)).toBeUndefined();
  });
});

it('says how far off an image is', () => {
  expect(degreesOff({ raDeg: 12, decDeg: 0 }, at('x'))).toBeCloseTo(2, 9);
  expect([3.21, 0.5, 0.001].map(angleWords)).toEqual(['3.2°', '30.0′', '4″']);
});
