import { criteriaSettings } from '@eremite/shared/contracts/criteria';
import { describe, expect, it } from 'vitest';
import { scaleWords } from './scale-words.ts';

describe('what criteria come to at a distance', () => {
  it('is 14 kpc for 90 arcsec at 33 Mpc', () => {
    // By hand: 33 000 kpc x 90 / 206 264.8 = 14.4 kpc; 1 Mpc there is 57.2958 deg / 33 = 1.736 deg; 500 / 70 = 7.14 Mpc.
    expect(scaleWords(criteriaSettings.parse({}), 33, 90, 70)).toEqual([
      'a search of 90.0 arcsec is 14 kpc',
      '1 Mpc of neighbourhood is 1.74°',
      '500 km/s is 7.1 Mpc of Hubble flow, before and behind',
    ]);
  });

  it('leaves out the search where no radius is known', () => {
    expect(scaleWords(criteriaSettings.parse({}), 100, undefined, 70)).toHaveLength(2);
  });
});
