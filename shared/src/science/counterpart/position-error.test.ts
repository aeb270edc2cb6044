import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import {
  centroidError,
  CONDON_FACTOR,
  covarianceOf,
  mahalanobisSquared,
  rayleighRadius,
  sigmaOfError,
  systematicError,
  widened,
} from './position-error.ts';
import { radiusHolding, shareInside } from './search-radius.ts';

describe('the position error of an HI centroid', () => {
  it.each([
    // Rayleigh distribution; r_p = sigma sqrt(-2 ln(1 - p)); records 2.rayleigh.*
    [0.393469, 0.9999994389609806],
    [0.682689, 1.5151718803401812],
    [0.9, 2.145966026289347],
    [0.95, 2.447746830680816],
    [0.99, 3.0348542587702925],
    [0.9973, 3.4393323497364543],
  ])('holds a share of %f inside %f sigma', (share, radius) => {
    expect(rayleighRadius(share)).toBeCloseTo(radius, 9);
  });

  it.each([
    // Condon (1997) PASP 109, 166; Reid et al. (1988); Ivison et al. (2007); records 2.centroid.*
    [210, 10, 8.9178789030242, 10.5, 12.6],
    [174, 10, 7.389099662505766, 8.7, 10.44],
    [930, 10, 39.493463713392885, 46.5, 55.8],
    [30, 10, 1.2739827004320285, 1.5, 1.8],
    [174, 6.5, 11.367845634624254, 13.384615384615385, 16.06153846153846],
  ])('follows the beam of %f arcsec and S/N %f', (fwhm, snr, condon, half, ivison) => {
    expect(centroidError(fwhm, snr, CONDON_FACTOR) / condon).toBeCloseTo(1, 9);
    expect(centroidError(fwhm, snr, 0.5) / half).toBeCloseTo(1, 9);
    expect(centroidError(fwhm, snr) / ivison).toBeCloseTo(1, 9);
  });

  it.each([
    // quadrature sum; Rayleigh quantiles; records 2.combine.*
    [174, 10, 10, 0.1, 12.434178453860262, 30.435720902556152, 37.73591943500763, 42.76527219875761],
    [210, 8, 15, 0.2, 18.689659746811042, 45.74755541175956, 56.7203934775772, 64.27995137277445],
    [30, 5, 2, 0.2, 3.245323972117473, 7.9437314672830235, 9.849085277870035, 11.161747722678832],
  ])('adds beam %f, S/N %f, systematic %f and optical %f', (fwhm, snr, systematic, optical, total, r95, r99, r9973) => {
    const sigma = centroidError(fwhm, snr, CONDON_FACTOR);
    const circle = widened(widened({ majorArcsec: sigma, minorArcsec: sigma, angleRad: 0 }, systematic), optical);
    expect(circle.majorArcsec / total).toBeCloseTo(1, 9);
    expect(radiusHolding(0.95, circle) / r95).toBeCloseTo(1, 8);
    expect(radiusHolding(0.99, circle) / r99).toBeCloseTo(1, 8);
    expect(radiusHolding(0.9973, circle) / r9973).toBeCloseTo(1, 8);
  });

  it('keeps the ellipse of an elongated beam', () => {
    // covariance algebra; circle by numerical integration; records 2.ellipse and 2.ellipse.naive
    const ellipse = widened(
      widened(
        {
          majorArcsec: centroidError(45, 8, CONDON_FACTOR),
          minorArcsec: centroidError(15, 8, CONDON_FACTOR),
          angleRad: 30 * DEGREE,
        },
        1,
      ),
      0.1,
    );
    const covariance = covarianceOf(ellipse);
    expect(ellipse.majorArcsec).toBeCloseTo(2.591519167836873, 6);
    expect(ellipse.minorArcsec).toBeCloseTo(1.2821844033292005, 6);
    expect(Math.sqrt(covariance.ee)).toBeCloseTo(1.7064555465707194, 6);
    expect(Math.sqrt(covariance.nn)).toBeCloseTo(2.334090381494385, 6);
    expect(covariance.en).toBeCloseTo(2.1962294917798912, 6);
    const d2 = mahalanobisSquared(covariance, 3, -4);
    expect(d2).toBeCloseTo(13.434713554761196, 5);
    expect(Math.exp(-d2 / 2)).toBeCloseTo(0.0012097315815878843, 8);
    expect(mahalanobisSquared(covariance, 4, 3)).toBeCloseTo(5.494597873025314, 5);
    expect(radiusHolding(0.95, ellipse) / 5.27098065031635).toBeCloseTo(1, 5);
  });

  it('reads a mean radial error of 24 arcsec as 19.1 arcsec along an axis', () => {
    // ALFALFA catalogue notes; that the mean is meant is an assumption; record 2.radial.24arcsec
    expect(sigmaOfError(24, 'meanRadial')).toBeCloseTo(19.14922945926877, 6);
    expect(
      radiusHolding(0.95, { majorArcsec: 19.14922945926877, minorArcsec: 19.14922945926877, angleRad: 0 }),
    ).toBeCloseTo(46.87246571890486, 6);
  });

  it('takes each meaning of an error for what it is', () => {
    expect(sigmaOfError(5, 'sigma1d')).toBe(5);
    expect(sigmaOfError(rayleighRadius(0.9) * 3, 'radial90')).toBeCloseTo(3, 12);
    expect(sigmaOfError(rayleighRadius(0.95) * 3, 'radial95')).toBeCloseTo(3, 12);
    expect(sigmaOfError(1.5151718803401812 * 3, 'radial68')).toBeCloseTo(3, 5);
  });

  it('goes by the beam where no systematic error is stated', () => {
    expect([30, 60, 210, 240, 900, 1000].map(systematicError)).toEqual([2, 2, 10, 10, 60, 60]);
    expect(systematicError(570)).toBeCloseTo(35, 9);
  });

  it('refuses a signal-to-noise ratio of zero', () => {
    expect(() => centroidError(210, 0)).toThrow(DomainError);
  });
});

describe('the search radius', () => {
  const core = { majorArcsec: 15, minorArcsec: 15, angleRad: 0 };
  it('holds the asked share of the mixture', () => {
    const tail = { fraction: 0.12, widthArcsec: 28 };
    const radius = radiusHolding(0.997, core, tail);
    expect(shareInside(radius, core, tail)).toBeCloseTo(0.997, 9);
    expect(radius).toBeGreaterThan(radiusHolding(0.997, core));
    expect(radius).toBeCloseTo(86.4, 0); // solves 0.88 exp(-r^2/450) + 0.12 exp(-r^2/2018) = 0.003
  });
  it('is the same for a circle whether treated as an ellipse or not', () => {
    const almost = { majorArcsec: 15, minorArcsec: 15 * (1 - 1e-9), angleRad: 1 };
    expect(shareInside(30, almost)).toBeCloseTo(shareInside(30, core), 8);
  });
  it('refuses a share of one', () => {
    expect(() => radiusHolding(1, core)).toThrow(DomainError);
  });
});
