import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { bandOf } from './band-of.ts';
import { BANDS, BAND_IDS } from './bands.ts';
import type { BandId } from './bands.ts';
import { extinction } from './extinction.ts';
import { SUN_TO_TEN_PARSEC_MAG, abFromFlux, solarMagnitude, toAb, toVega } from './magnitude-system.ts';

describe('bands', () => {
  // Willmer (2018), ApJS 236, 47, Tables 3-4: Sun AB, Sun Vega, AB - Vega; to 0.01 mag
  it.each<[BandId, number, number, number]>([
    ['FUV', 17.3021, 15.2167, 2.0854],
    ['NUV', 10.1621, 8.5328, 1.6293],
    ['B', 5.3121, 5.4402, -0.1281],
    ['V', 4.8021, 4.8151, -0.013],
    ['u', 6.3921, 5.4917, 0.9004],
    ['g', 5.1021, 5.2272, -0.1251],
    ['r', 4.6421, 4.5236, 0.1185],
    ['i', 4.5221, 4.1901, 0.332],
    ['z', 4.5021, 4.008, 0.4941],
    ['PS1 g', 5.0321, 5.1442, -0.1121],
    ['PS1 r', 4.6421, 4.5223, 0.1198],
    ['PS1 i', 4.5221, 4.1827, 0.3394],
    ['PS1 z', 4.5021, 4.0187, 0.4834],
    ['PS1 y', 4.5021, 3.987, 0.5151],
    ['DES g', 5.0521, 5.1661, -0.114],
    ['DES r', 4.6121, 4.4535, 0.1586],
    ['DES i', 4.5221, 4.1402, 0.3819],
    ['DES z', 4.5021, 4.0087, 0.4934],
    ['LSST g', 5.0521, 5.1685, -0.1164],
    ['LSST r', 4.6421, 4.5209, 0.1212],
    ['LSST i', 4.5221, 4.1824, 0.3397],
    ['J', 4.5421, 3.6718, 0.8703],
    ['H', 4.6621, 3.3183, 1.3438],
    ['Ks', 5.0821, 3.2682, 1.8139],
    ['W1', 5.9121, 3.2568, 2.6553],
    ['W2', 6.5721, 3.2807, 3.2914],
    ['W3', 8.4821, 3.2674, 5.2147],
    ['W4', 9.8721, 3.2704, 6.6017],
  ])('hold the Sun in %s', (band, ab, vega, offset) => {
    expect(solarMagnitude(band, 'AB')).toBeCloseTo(ab, 4);
    expect(solarMagnitude(band, 'Vega')).toBeCloseTo(vega, 4);
    expect(toAb(0, band, 'Vega')).toBeCloseTo(offset, 4);
  });

  it.each(BAND_IDS)('are consistent: Sun AB - Sun Vega = AB - Vega in %s', (band) => {
    const { solarAb, solarVega, abMinusVega } = BANDS[band];
    expect(Math.abs(solarAb - solarVega - abMinusVega)).toBeLessThan(0.0011);
  });

  // Willmer (2018), ApJS 236, 47: pivot wavelengths, micron
  it.each<[BandId, number]>([
    ['FUV', 0.1535],
    ['NUV', 0.2301],
    ['B', 0.4396],
    ['V', 0.5511],
    ['u', 0.3556],
    ['g', 0.4702],
    ['r', 0.6176],
    ['i', 0.749],
    ['z', 0.8947],
    ['PS1 g', 0.4849],
    ['PS1 r', 0.6201],
    ['PS1 i', 0.7535],
    ['PS1 z', 0.8674],
    ['PS1 y', 0.9628],
    ['DES g', 0.482],
    ['DES r', 0.6423],
    ['DES i', 0.7807],
    ['DES z', 0.9158],
    ['LSST g', 0.4808],
    ['LSST r', 0.621],
    ['LSST i', 0.7537],
    ['J', 1.2393],
    ['H', 1.6495],
    ['Ks', 2.1638],
    ['W1', 3.3897],
    ['W2', 4.6406],
    ['W3', 12.5705],
    ['W4', 22.3142],
  ])('know the wavelength of %s', (band, micron) => {
    expect(BANDS[band].pivotMicron).toBeCloseTo(micron, 4);
  });

  it('convert to AB and back, and leave a missing magnitude missing', () => {
    expect(toVega(toAb(14.3, 'Ks', 'Vega'), 'Ks', 'AB')).toBeCloseTo(14.3, 12);
    expect(toAb(20, 'r', 'AB')).toBe(20);
    expect(toAb(NaN, 'r', 'Vega')).toBeNaN();
  });

  it('know the distance modulus of the Sun (10 pc = 2062648.06 au: 31.5721)', () => {
    expect(SUN_TO_TEN_PARSEC_MAG).toBeCloseTo(31.572125665882297, 9);
  });

  it('turn 3631 Jy into magnitude zero and refuse a negative flux', () => {
    expect(abFromFlux(3.631e6)).toBeCloseTo(0, 12);
    expect(() => abFromFlux(-1)).toThrow(DomainError);
  });
});

describe('extinction', () => {
  // SDSS, 2MASS, WISE: Schlafly & Finkbeiner (2011) as served by IRSA; PS1, DES: their Table 6, from memory; UV: Bianchi et al. (2017)
  it.each<[BandId, number]>([
    ['u', 4.239],
    ['g', 3.303],
    ['r', 2.285],
    ['i', 1.698],
    ['z', 1.263],
    ['J', 0.723],
    ['H', 0.46],
    ['Ks', 0.31],
    ['W1', 0.189],
    ['W2', 0.146],
    ['FUV', 8.06],
    ['NUV', 7.95],
    ['DES g', 3.237],
    ['DES r', 2.176],
    ['DES i', 1.595],
    ['DES z', 1.217],
    ['PS1 g', 3.172],
    ['PS1 r', 2.271],
    ['PS1 i', 1.682],
    ['PS1 z', 1.322],
    ['PS1 y', 1.087],
  ])('has in %s the coefficient %d', (band, coefficient) => {
    expect(extinction(band, 1)).toBeCloseTo(coefficient, 9);
  });

  // A = R E(B-V) at 0.08
  it.each<[BandId, number]>([
    ['g', 0.26424],
    ['r', 0.1828],
    ['i', 0.13584],
    ['Ks', 0.0248],
    ['W1', 0.01512],
    ['FUV', 0.6448],
    ['NUV', 0.636],
  ])('at E(B-V) 0.08 in %s is %d', (band, mag) => {
    expect(extinction(band, 0.08)).toBeCloseTo(mag, 9);
  });

  it('follows Wyder et al. (2007) where asked: 8.24 E in FUV, 8.24 E - 0.67 E^2 in NUV (from memory)', () => {
    expect(extinction('FUV', 0.08, 'wyder2007')).toBeCloseTo(0.6592, 9);
    expect(extinction('NUV', 0.08, 'wyder2007')).toBeCloseTo(0.654912, 9);
    expect(extinction('NUV', 20, 'wyder2007')).toBe(0);
  });

  it('refuses a negative or missing E(B-V)', () => {
    expect(() => extinction('r', -0.01)).toThrow(/-0.01/);
    expect(() => extinction('r', NaN)).toThrow(DomainError);
  });
});

describe('band of a name', () => {
  it.each<[string, BandId]>([
    ['r', 'r'],
    ['R', 'R'],
    ['rmag', 'r'],
    ['Rmag', 'R'],
    ['gmag', 'g'],
    ['mag_g', 'g'],
    ['dered_r', 'r'],
    ['petromag_r', 'r'],
    ['rPSFMag', 'r'],
    ['cModelMag_i', 'i'],
    ['NUV', 'NUV'],
    ['NUVmag', 'NUV'],
    ['fuv_mag', 'FUV'],
    ['W1', 'W1'],
    ['W1mpro', 'W1'],
    ['w2mpro', 'W2'],
    ['W1mag', 'W1'],
    ['Ks', 'Ks'],
    ['K', 'Ks'],
    ['Kmag', 'Ks'],
    ['k_m_ext', 'Ks'],
    ['j_m', 'J'],
    ['B-Mag', 'B'],
    ['V-Mag', 'V'],
    ['apparent_magnitude_v', 'V'],
    ['PS1 r', 'PS1 r'],
    ['gPS1', 'PS1 g'],
    ['Pan-STARRS i', 'PS1 i'],
    ['ps1_z', 'PS1 z'],
    ['DES r', 'DES r'],
    ['decam_g', 'DES g'],
    ['LSST i', 'LSST i'],
    ['ymag', 'PS1 y'],
    ['SDSS u', 'u'],
    ['GALEX NUV', 'NUV'],
    ['2MASS Ks', 'Ks'],
    ['WISE W4', 'W4'],
    ['flux_g', 'g'],
    ['Cousins I', 'I'],
    ['Johnson B', 'B'],
    [' z ', 'z'],
    ['G', 'G'],
    ['Gmag', 'G'],
    ['phot_g_mean_mag', 'G'],
    ['Gaia G', 'G'],
    ['PS1 Y', 'PS1 y'],
  ])('%s is %s', (name, band) => {
    expect(bandOf(name)).toBe(band);
  });

  it.each([
    '',
    'mag',
    'total_mag',
    'e_rmag',
    'b',
    'v',
    'h',
    'distance',
    'image',
    'ra',
    're',
    'rms',
    'W5',
    'U',
    'Z',
    'Y',
    'phot_bp_mean_mag',
    'desk',
    'g_r',
    'x',
    'W50',
    'logmag',
  ])('does not guess from %j', (name) => {
    expect(bandOf(name)).toBeUndefined();
  });
});
