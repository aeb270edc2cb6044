import { describe, expect, it } from 'vitest';
import type { ColumnFacts } from '../tables/table.ts';
import { guessRoles, SAFE_GUESS } from './guess-roles.ts';
import { nameParts, nearNames } from './name-parts.ts';
import type { ColumnSample } from './sample.ts';
import { conversionOf } from './units.ts';

const sampleOf = (median: number): ColumnSample => ({
  rows: 9,
  numbers: 9,
  texts: 0,
  min: median,
  max: median,
  median,
  sexagesimal: 0,
});
const column = (name: string, median: number, more: Partial<ColumnFacts> = {}): [ColumnFacts, ColumnSample] => [
  { name, type: 'number', ...more },
  sampleOf(median),
];
const guess = (...columns: [ColumnFacts, ColumnSample][]) =>
  Object.fromEntries(
    guessRoles(
      columns.map(([facts]) => facts),
      columns.map(([, sample]) => sample),
    ).map(({ column: i, role }) => [columns[i]![0].name, role]),
  );

describe('guessing roles', () => {
  it('knows the usual names of an HI list and their error columns', () => {
    const names = ['ra_deg', 'dec_deg', 'cz_kms', 'e_cz', 'w50_kms', 'w20', 'flux_jykms', 'e_flux', 'snr', 'dist_mpc'];
    const middles = [180, 10, 3000, 5, 120, 150, 2.5, 0.2, 9, 40];
    expect(guess(...names.map((name, i) => column(name, middles[i]!)))).toEqual({
      ra_deg: 'ra',
      dec_deg: 'dec',
      cz_kms: 'velocity',
      e_cz: 'velocityError',
      w50_kms: 'width50',
      w20: 'width20',
      flux_jykms: 'flux',
      e_flux: 'fluxError',
      snr: 'signalToNoise',
      dist_mpc: 'distance',
    });
  });

  it('sets a UCD above a name', () => {
    const ucd = { ucd: 'pos.eq.ra;meta.main' };
    expect(guess(column('ra', 180), column('x1', 181, ucd))).toMatchObject({ x1: 'ra' });
    const [doubtful] = guessRoles([{ name: 'alpha', type: 'number', ucd: 'src.redshift' }], [sampleOf(100)]);
    expect(doubtful!.confidence).toBeLessThan(SAFE_GUESS);
  });

  it('tells redshift z from magnitude z by its values', () => {
    expect(guess(column('z', 0.02))).toEqual({ z: 'redshift' });
    expect(guess(column('z', 18.4), column('g', 19))).toEqual({ z: 'magnitude:z', g: 'magnitude:g' });
  });

  it('takes a distance with a unit before a modulus, and a modulus before a distance without', () => {
    const modulus = column('distance_modulus', 24.4);
    expect(guess(modulus, column('distance', 760, { unit: 'kpc' }))['distance']).toBe('distance');
    expect(guess(modulus, column('distance_kpc', 760))['distance_kpc']).toBe('distance');
    expect(guess(modulus, column('distance', 760))['distance_modulus']).toBe('distance');
    expect(nameParts('distance_modulus').unit).toBe('mag');
  });

  it('finds bands, their errors and their limit flags', () => {
    const found = guess(
      column('gmag', 19),
      column('e_gmag', 0.02),
      column('l_gmag', 0),
      column('W1mpro', 14),
      column('NUV', 20),
      column('B-Mag', 15),
    );
    expect(found).toEqual({
      gmag: 'magnitude:g',
      e_gmag: 'magnitudeError:g',
      l_gmag: 'magnitudeLimit:g',
      W1mpro: 'magnitude:W1',
      NUV: 'magnitude:NUV',
      'B-Mag': 'magnitude:B',
    });
  });

  it('takes no absolute magnitude, photometric redshift, dispersion or unit-less distance for what it is not', () => {
    expect(
      guess(column('M_V', -14), column('z_phot', 0.1, { ucd: 'src.redshift.phot' }), column('vlos_sigma', 8)),
    ).toEqual({});
    const [distance] = guessRoles([{ name: 'distance', type: 'number' }], [sampleOf(800)]);
    expect(distance!.confidence).toBeLessThan(SAFE_GUESS);
  });

  it('trusts values over a name', () => {
    expect(guess(column('ra', 180), column('dec', 4000))['dec']).toBeUndefined();
  });
});

describe('a column name', () => {
  it.each([
    ['cz_kms', 'cz', 'km/s'],
    ['CZ [km/s]', 'cz', 'km/s'],
    ['dist (Mpc)', 'dist', 'Mpc'],
    ['flux_jykms', 'flux', 'Jy km/s'],
    ['RA_deg', 'ra', 'deg'],
    ['DE-', 'de-', undefined],
  ])('%s is taken apart', (name, base, unit) => {
    expect([nameParts(name).base, nameParts(name).unit]).toEqual([base, unit]);
  });
  it('finds what was probably meant', () => {
    expect(nearNames('decl', ['ra', 'dec', 'cz'])).toEqual(['dec']);
    expect(nearNames('colour', ['ra', 'dec'])).toEqual([]);
  });
});

describe('a unit', () => {
  it.each(['km/s', 'km s-1', 'km.s-1', 'km s^-1', 'km s**-1', 'kms', 'km/sec', 'kmps', 'km s^{-1}'])(
    '%s is km/s',
    (unit) => {
      expect(conversionOf('velocity', unit)).toEqual({ factor: 1 });
    },
  );
  it.each(['Jy km/s', 'Jy.km.s-1', 'Jy km s-1', 'Jy*km/s', '(Jy km/s)'])('%s is Jy km/s', (unit) => {
    expect(conversionOf('lineFlux', unit)).toEqual({ factor: 1 });
  });
  it('of another quantity is none', () => {
    expect(conversionOf('velocity', 'Mpc')).toBeUndefined();
    expect(conversionOf('distance', 'mag')).toEqual({ factor: 1, rule: 'distanceModulus' });
    expect(conversionOf('properMotion', 'mas.yr-1')).toEqual({ factor: 1 });
  });
});
