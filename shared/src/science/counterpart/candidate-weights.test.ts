import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { logBayesFactor, logBayesFactorOfTwo, pairPosterior, pairPrior, SKY_SQUARE_ARCSEC } from './bayes-factor.ts';
import { chanceProbability } from './chance.ts';
import { effectiveCompleteness, exclusiveProbabilities, missedProbability } from './exclusive.ts';
import { expectedFluxShares } from './expected-flux.ts';
import { foundFractionFromBlanks, likelihoodRatio, reliabilities } from './likelihood-ratio.ts';
import { offsetDensity } from './offset-density.ts';
import { isAbsurdRedshift, plainVelocityFactor, velocityFactor, velocityScatter } from './velocity-term.ts';

const PER_DEGREE = 3600 ** 2;
const SIGMA = 12.434178453860262;

describe('the likelihood ratio', () => {
  it.each([
    // Sutherland & Saunders (1992) MNRAS 259, 413; records 6.lr.A and 6.lr.B
    [10, 0.2, 300, 0.0007449660194548181, 6.436506408089628],
    [25, 0.05, 1500, 0.00013638817365695406, 0.058919691019804155],
  ])('at %f arcsec with q %f and n %f', (r, q, n, f, ratio) => {
    const density = offsetDensity({ ee: SIGMA ** 2, nn: SIGMA ** 2, en: 0 }, 0, 0, r);
    expect(density / f).toBeCloseTo(1, 6);
    expect(likelihoodRatio(density, q, n / PER_DEGREE) / ratio).toBeCloseTo(1, 6);
  });
  it.each([
    // Sutherland & Saunders (1992) eq. 5; records 6.rel.*
    [0.85, 0.9685618818260875, 0.008866202127761243, 0.022571916046151174],
    [0.98, 0.9878872555962852, 0.009043106333115749, 0.003069638070598903],
  ])('gives reliabilities for Q0 %f', (q0, a, b, none) => {
    const result = reliabilities([6.436506408089628, 0.058919691019804155], q0);
    expect(result.each[0]).toBeCloseTo(a, 9);
    expect(result.each[1]).toBeCloseTo(b, 9);
    expect(result.none).toBeCloseTo(none, 9);
  });
  it('finds Q0 from blank fields', () => {
    // Fleuren et al. (2012) MNRAS 423, 2407 (from memory); record 6.q0.blank
    const inside = 1 - Math.exp(-(20 ** 2) / (2 * 8 ** 2));
    expect(inside).toBeCloseTo(0.9560630663765926, 9);
    expect(foundFractionFromBlanks(62 / 400, 300 / 400, inside)).toBeCloseTo(0.8297918424356745, 6);
  });
});

describe('the chance probability', () => {
  it.each([
    // Downes et al. (1986) MNRAS 218, 31; records 6.downes.*
    [10, 50, 0.009144246445768833],
    [25, 3499.9999999999995, 0.5481610419671388],
    [5, 1, 7.80372227664472e-5],
  ])('at %f arcsec with %f brighter objects a square degree', (r, brighter, p) => {
    expect(chanceProbability(r, brighter / PER_DEGREE, 30, 4000 / PER_DEGREE) / p).toBeCloseTo(1, 6);
  });
  it('is zero at no separation', () => {
    expect(chanceProbability(0, 1e-4, 30, 1e-3)).toBe(0);
  });
});

describe('the Bayes factor', () => {
  it.each([
    // Budavari & Szalay (2008) ApJ 679, 301, eq. 16; records 6.bs08.hi-opt near, far and opt-opt
    [10, 12.43, 0.2, 398398818.42006844],
    [40, 12.43, 0.2, 3109602.7032050802],
    [0.3, 0.2, 0.1, 691903016436.4978],
  ])('of two positions %f arcsec apart', (apart, s1, s2, factor) => {
    expect(Math.exp(logBayesFactorOfTwo(apart, s1, s2)) / factor).toBeCloseTo(1, 6);
  });
  it('of three catalogues', () => {
    // Budavari & Szalay (2008) eq. 18; record 6.bs08.three
    const at = (eastArcsec: number, northArcsec: number, sigmaArcsec: number) => ({
      eastArcsec,
      northArcsec,
      sigmaArcsec,
    });
    expect(logBayesFactor([at(0, 0, 12.43), at(8, 6, 0.2), at(8.3, 6.2, 0.3)])).toBeCloseTo(46.50301034020423, 6);
  });
  it('of n catalogues is that of two for two', () => {
    // identity; record 6.bs08.check2
    const pair = logBayesFactor([
      { eastArcsec: 0, northArcsec: 0, sigmaArcsec: 12.43 },
      { eastArcsec: 6, northArcsec: 8, sigmaArcsec: 0.2 },
    ]);
    expect(pair).toBeCloseTo(logBayesFactorOfTwo(10, 12.43, 0.2), 9);
    expect(pair).toBeCloseTo(19.80296411785724, 6);
  });
  it.each([
    // Budavari & Szalay (2008) eqs. 20-25; records 6.bs08.post.*
    [14438.536437296745, 1.6968478838833755e-8, 0.8711377077156041],
    [20626.48062470964, 2.4240684055476794e-8, 0.9061690131806982],
  ])('turns into a posterior with %f true matches', (matches, prior, posterior) => {
    const sky = SKY_SQUARE_ARCSEC / PER_DEGREE;
    const p = pairPrior(matches, 0.5 * sky, 1000 * sky);
    expect(p / prior).toBeCloseTo(1, 6);
    expect(pairPosterior(Math.log(398398818.42006844), p)).toBeCloseTo(posterior, 6);
  });
});

describe('exclusive probabilities', () => {
  it('agree with B over the full-sky number of objects', () => {
    // identity B = 4 pi f; Sutherland & Saunders (1992) normalisation; record 6.unify
    const weight = 398398818.42006844 / ((1000 / PER_DEGREE) * SKY_SQUARE_ARCSEC);
    expect(weight).toBeCloseTo(9.657459885396149, 6);
    const { objects, none } = exclusiveProbabilities([weight], 0.97, 1);
    expect(objects[0]).toBeCloseTo(0.9968077418096851, 6);
    expect(none).toBeCloseTo(0.0031922581903149967, 8);
  });
  it('say little by position alone in a deep catalogue', () => {
    // arithmetic; record 6.deep.catalogue
    const f = offsetDensity({ ee: 12.43 ** 2, nn: 12.43 ** 2, en: 0 }, 0, 0, 0);
    expect(f / (1e5 / PER_DEGREE)).toBeCloseTo(0.13350049496624145, 6);
  });
  it.each([
    // Bayes' theorem; records 7.missed.*
    [0.9, 0.97, 0.7637795275590549],
    [0.9, 0.99, 0.9082568807339448],
    [0.95, 0.97, 0.617834394904459],
    [0.95, 0.99, 0.831932773109243],
    [0.99, 0.97, 0.24433249370277058],
    [0.99, 0.99, 0.4974874371859294],
    [0.999, 0.97, 0.03132063287051994],
    [0.999, 0.99, 0.09008189262966296],
  ])('miss a counterpart at completeness %f and prior %f', (c, q, missed) => {
    expect(missedProbability(q, c)).toBeCloseTo(missed, 9);
  });
  it('put an unlikely line where it belongs', () => {
    // lists of dark detections concentrate false ones: c 0.996, Q 0.986, R 0.98
    const { none, missed, spurious } = exclusiveProbabilities([], 0.986, 0.996, 0.98);
    expect([none, missed, spurious].map((p) => p.toFixed(2))).toEqual(['0.37', '0.10', '0.53']);
  });
  it('need a completeness of 0.9923 for P(none) of 0.8 at a prior of 0.97', () => {
    expect(exclusiveProbabilities([], 0.97, 0.9922).none).toBeLessThan(0.8);
    expect(exclusiveProbabilities([], 0.97, 0.9923).none).toBeGreaterThan(0.8);
  });
  it('multiply the parts of a completeness', () => {
    // product; record 7.completeness.product
    expect(effectiveCompleteness(0.99, 0.98, 0.9, 0.95)).toBeCloseTo(0.829521, 9);
  });
  const weights = fc.array(fc.double({ min: 0, max: 1e6, noNaN: true }), { maxLength: 8 });
  const share = fc.double({ min: 0, max: 1, noNaN: true });
  const prior = fc.double({ min: 0.01, max: 0.999, noNaN: true });
  it('add to one', () => {
    fc.assert(
      fc.property(weights, prior, share, share, (w, q, c, r) => {
        const { none, missed, spurious, objects } = exclusiveProbabilities(w, q, c, r);
        expect(objects.reduce((sum, p) => sum + p, none + missed + spurious)).toBeCloseTo(1, 9);
      }),
    );
  });
  it('never make P(none) larger for one more object', () => {
    fc.assert(
      fc.property(weights, fc.double({ min: 0, max: 1e3, noNaN: true }), prior, share, (w, extra, q, c) => {
        expect(exclusiveProbabilities([...w, extra], q, c).none).toBeLessThanOrEqual(
          exclusiveProbabilities(w, q, c).none,
        );
      }),
    );
  });
  it('do not depend on the order of the objects', () => {
    fc.assert(
      fc.property(weights, prior, share, (w, q, c) => {
        const forward = exclusiveProbabilities(w, q, c).objects;
        const backward = exclusiveProbabilities([...w].reverse(), q, c).objects.reverse();
        forward.forEach((p, j) => expect(p).toBeCloseTo(backward[j]!, 12));
      }),
    );
  });
  it('refuse a prior of one', () => {
    expect(() => exclusiveProbabilities([], 1, 0.5)).toThrow(DomainError);
  });
});

describe('the velocity term', () => {
  it.each([
    // Bayes factor with a uniform background of 18,000 km/s; records 6.vel.*
    [20, 150.64586682226462],
    [100, 10.856835083621851],
    [400, 1.5416465186204708e-17],
  ])('against a uniform background at %f km/s', (dv, factor) => {
    const scatter = velocityScatter(5, 30, 30);
    expect(scatter).toBeCloseTo(42.720018726587654, 9);
    expect(plainVelocityFactor(dv, scatter, 1 / 18000) / factor).toBeCloseTo(1, 6);
  });
  it('is far smaller when clustering is allowed for', () => {
    expect(velocityFactor(20, 42.72)).toBeGreaterThan(5);
    expect(velocityFactor(20, 42.72)).toBeLessThan(20);
  });
  it('leaves the floor to a discordant redshift and never less to any', () => {
    expect(velocityFactor(501, 42.72)).toBe(0.005);
    expect(velocityFactor(450, 42.72)).toBeGreaterThanOrEqual(0.005);
  });
  it('ignores redshifts that no nearby galaxy has', () => {
    expect([0.31, -0.011, 0.29, -0.009].map((z) => isAbsurdRedshift(z, 0.01))).toEqual([true, true, false, false]);
    expect(isAbsurdRedshift(0.31, 0.2)).toBe(false);
  });
});

describe('expected shares of the flux in a beam', () => {
  it('go by gas and by the response of the beam', () => {
    const shares = expectedFluxShares([
      { logHiMass: 9, beamOffset: 0 },
      { logHiMass: 9, beamOffset: 0.5 },
    ]);
    expect(shares[0]).toBeCloseTo(2 / 3, 9);
    expect(shares[1]).toBeCloseTo(1 / 3, 9);
  });
  it('take a galaxy without a magnitude for a middling one', () => {
    const shares = expectedFluxShares([
      { logHiMass: 9, beamOffset: 0 },
      { logHiMass: NaN, beamOffset: 0 },
    ]);
    expect(shares).toEqual([0.5, 0.5]);
  });
});
