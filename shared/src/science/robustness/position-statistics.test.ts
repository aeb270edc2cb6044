import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import {
  CONDON_FACTOR,
  centroidError,
  covarianceOf,
  mahalanobisSquared,
  rayleighRadius,
  sigmaOfError,
  widened,
} from '../counterpart/position-error.ts';

const off = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('radius that holds a share of a circular Gaussian', () => {
  // Rayleigh distribution, r = sigma sqrt(-2 ln(1 - p))
  it.each([
    [0.393469, 0.9999994389609806],
    [0.682689, 1.5151718803401812],
    [0.9, 2.145966026289347],
    [0.95, 2.447746830680816],
    [0.99, 3.0348542587702925],
    [0.9973, 3.4393323497364543],
    [0.5, 1.1774100225154747],
  ])('of %d is %d sigma', (share, radius) => {
    expect(rayleighRadius(share)).toBeCloseTo(radius, 9);
  });

  it('says what a quoted accuracy means: a mean of 24 arcsec is 19.15 in one dimension, 46.87 at 95 per cent', () => {
    // 24 arcsec: notes of the ALFALFA catalogue; reading it as the mean is an assumption
    const sigma = sigmaOfError(24, 'meanRadial');
    expect(sigma).toBeCloseTo(19.14922945926877, 6);
    expect(sigma * rayleighRadius(0.95)).toBeCloseTo(46.87246571890486, 6);
    expect(sigmaOfError(1.515172903884202, 'radial68')).toBeCloseTo(1, 6);
  });
});

describe('centroid error of an unresolved source', () => {
  // Condon (1997), PASP 109, 166 for noise correlated over the beam; 0.5 Reid et al. (1988); 0.6 Ivison et al. (2007)
  it.each([
    [210, 10, 8.9178789030242, 10.5, 12.6],
    [174, 10, 7.389099662505766, 8.7, 10.44],
    [930, 10, 39.493463713392885, 46.5, 55.8],
    [30, 10, 1.2739827004320285, 1.5, 1.8],
    [174, 6.5, 11.367845634624254, 13.384615384615385, 16.06153846153846],
  ])('in a beam of %d arcsec at S/N %d', (fwhm, ratio, condon, half, ivison) => {
    expect(off(centroidError(fwhm, ratio, CONDON_FACTOR), condon)).toBeLessThan(1e-9);
    expect(off(centroidError(fwhm, ratio, 0.5), half)).toBeLessThan(1e-9);
    expect(off(centroidError(fwhm, ratio), ivison)).toBeLessThan(1e-9);
  });

  // quadrature sum and Rayleigh quantiles, with the Condon value
  it.each([
    [174, 10, 10, 0.1, 12.434178453860262, 30.435720902556152, 37.73591943500763, 42.76527219875761],
    [210, 8, 15, 0.2, 18.689659746811042, 45.74755541175956, 56.7203934775772, 64.27995137277445],
    [30, 5, 2, 0.2, 3.245323972117473, 7.9437314672830235, 9.849085277870035, 11.161747722678832],
  ])('with its other terms at %d arcsec and S/N %d', (fwhm, ratio, system, optical, total, r95, r99, r9973) => {
    const sigma = Math.hypot(centroidError(fwhm, ratio, CONDON_FACTOR), system, optical);
    expect(off(sigma, total)).toBeLessThan(1e-9);
    expect(off(sigma * rayleighRadius(0.95), r95)).toBeLessThan(1e-9);
    expect(off(sigma * rayleighRadius(0.99), r99)).toBeLessThan(1e-9);
    expect(off(sigma * rayleighRadius(0.9973), r9973)).toBeLessThan(1e-9);
  });
});

describe('elliptical error', () => {
  // beam 45 x 15 arcsec at 30 degrees, S/N 8, 1 arcsec systematic, 0.1 arcsec optical: covariance algebra
  const beam = {
    majorArcsec: centroidError(45, 8, CONDON_FACTOR),
    minorArcsec: centroidError(15, 8, CONDON_FACTOR),
    angleRad: 30 * DEGREE,
  };
  const total = widened(widened(beam, 1), 0.1);
  const covariance = covarianceOf(total);

  it('has the axes and the covariance of its rotation', () => {
    expect(off(total.majorArcsec, 2.591519167836873)).toBeLessThan(1e-6);
    expect(off(total.minorArcsec, 1.2821844033292005)).toBeLessThan(1e-6);
    expect(off(Math.sqrt(covariance.ee), 1.7064555465707194)).toBeLessThan(1e-6);
    expect(off(Math.sqrt(covariance.nn), 2.334090381494385)).toBeLessThan(1e-6);
    expect(off(covariance.en, 2.1962294917798912)).toBeLessThan(1e-6);
  });

  it('judges an offset by its direction: (3, -4) against (4, 3) arcsec', () => {
    const across = mahalanobisSquared(covariance, 3, -4);
    expect(off(across, 13.434713554761196)).toBeLessThan(1e-6);
    expect(off(Math.exp(-across / 2), 0.0012097315815878843)).toBeLessThan(1e-6);
    expect(off(mahalanobisSquared(covariance, 4, 3), 5.494597873025314)).toBeLessThan(1e-6);
  });

  it('holds 95 per cent in 62.54 square arcsec', () => {
    const area = Math.PI * rayleighRadius(0.95) ** 2 * total.majorArcsec * total.minorArcsec;
    expect(off(area, 62.54430654605584)).toBeLessThan(1e-6);
  });
});
