import { execFileSync, spawnSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { erf, erfc, normalCdf } from '@eremite/shared/science/robustness/error-function';
import { incompleteGamma, logGamma, upperIncompleteGamma } from '@eremite/shared/science/robustness/gamma-function';
import { incompleteBeta } from '@eremite/shared/science/robustness/incomplete-beta';
import {
  clopperPearsonInterval,
  ONE_SIGMA,
  poissonInterval,
  wilsonInterval,
} from '@eremite/shared/science/robustness/intervals';
import { normalQuantile } from '@eremite/shared/science/robustness/normal-quantile';
import { Random } from '@eremite/shared/science/robustness/random';

const PYTHON = '/usr/bin/python3';
const present = spawnSync(PYTHON, ['-c', 'import astropy.stats, scipy.special']).status === 0;
if (!present) console.warn(`intervals are not compared with scipy and astropy: ${PYTHON} has not both`);

/** Runs a script that reads JSON as `given` and leaves its answer in `answer`. */
function python<T>(script: string, given: unknown): T {
  const wrapped = `import json, sys\ngiven = json.load(sys.stdin)\n${script}\njson.dump(answer, sys.stdout)`;
  const output = execFileSync(PYTHON, ['-c', wrapped], { input: JSON.stringify(given), encoding: 'utf8' });
  return JSON.parse(output) as T;
}

const random = new Random(20_260_101);
const uniform = (from: number, to: number) => from + (to - from) * random.uniform();
const many = <T>(make: () => T) => Array.from({ length: 400 }, make);
/** Largest difference, relative where the values are above `floor`. */
const worst = (actual: number[], expected: number[], floor = 0) =>
  Math.max(...actual.map((x, k) => Math.abs(x - expected[k]!) / Math.max(floor, Math.abs(expected[k]!), 1e-300)));

describe.skipIf(!present)('statistics against scipy and astropy', () => {
  it('Poisson intervals equal those of astropy (Garwood) and of the chi-square quantile of scipy', () => {
    const counts = [...Array.from({ length: 60 }, (_, k) => k), 100, 500, 2000];
    const levels = [ONE_SIGMA, 0.9, 0.95, 0.99];
    const answer = python<{ chi: [number[], number[]][]; garwood: [number[], number[]] }>(
      `from scipy.stats import chi2
from astropy.stats import poisson_conf_interval
import numpy as np
k = np.array(given['counts'])
def interval(level):
    low = np.where(k == 0, 0, chi2.ppf((1 - level) / 2, np.maximum(2 * k, 1)) / 2)
    return [low.tolist(), (chi2.ppf((1 + level) / 2, 2 * k + 2) / 2).tolist()]
answer = {'chi': [interval(level) for level in given['levels']],
  'garwood': poisson_conf_interval(k, 'frequentist-confidence', sigma=1).tolist()}`,
      { counts, levels },
    );
    levels.forEach((level, i) => {
      const [low, high] = answer.chi[i]!;
      expect(
        worst(
          counts.map((k) => poissonInterval(k, level).low),
          low,
          1e-9,
        ),
      ).toBeLessThan(1e-10);
      expect(
        worst(
          counts.map((k) => poissonInterval(k, level).high),
          high,
        ),
      ).toBeLessThan(1e-10);
    });
    expect(
      worst(
        counts.map((k) => poissonInterval(k).low),
        answer.garwood[0],
        1e-9,
      ),
    ).toBeLessThan(1e-10);
    expect(
      worst(
        counts.map((k) => poissonInterval(k).high),
        answer.garwood[1],
      ),
    ).toBeLessThan(1e-10);
  });

  it('Wilson intervals equal those of astropy, Clopper-Pearson those of the beta quantile of scipy', () => {
    const cases = many(() => {
      const trials = 1 + Math.floor(10 ** uniform(0, 4));
      return [Math.floor(random.uniform() * (trials + 1)), trials, uniform(0.5, 0.999)] as const;
    });
    const answer = python<{ wilson: [number, number][]; exact: [number, number][] }>(
      `from astropy.stats import binom_conf_interval
from scipy.stats import beta
wilson, exact = [], []
for k, n, level in given:
    wilson.append([float(x) for x in binom_conf_interval(k, n, level, 'wilson')])
    tail = (1 - level) / 2
    exact.append([0 if k == 0 else beta.ppf(tail, k, n - k + 1), 1 if k == n else beta.ppf(1 - tail, k + 1, n - k)])
answer = {'wilson': wilson, 'exact': exact}`,
      cases,
    );
    cases.forEach(([k, n, level], i) => {
      const wilson = wilsonInterval(k, n, level);
      const exact = clopperPearsonInterval(k, n, level);
      expect(Math.abs(wilson.low - answer.wilson[i]![0])).toBeLessThan(1e-12);
      expect(Math.abs(wilson.high - answer.wilson[i]![1])).toBeLessThan(1e-12);
      expect(Math.abs(exact.low - answer.exact[i]![0])).toBeLessThan(1e-10);
      expect(Math.abs(exact.high - answer.exact[i]![1])).toBeLessThan(1e-10);
    });
  });

  it('error function and normal quantile equal those of scipy', () => {
    const x = many(() => uniform(-6, 26));
    const p = many(() => 10 ** uniform(-12, -1e-6));
    const answer = python<Record<'erf' | 'erfc' | 'cdf' | 'quantile', number[]>>(
      `from scipy.special import erf, erfc, ndtr, ndtri
import numpy as np
x, p = np.array(given['x']), np.array(given['p'])
answer = {'erf': erf(x).tolist(), 'erfc': erfc(x).tolist(), 'cdf': ndtr(x).tolist(), 'quantile': ndtri(p).tolist()}`,
      { x, p },
    );
    expect(worst(x.map(erf), answer.erf)).toBeLessThan(1e-14);
    expect(worst(x.map(erfc), answer.erfc, 1e-290)).toBeLessThan(1e-13);
    expect(worst(x.map(normalCdf), answer.cdf)).toBeLessThan(1e-12);
    expect(worst(p.map(normalQuantile), answer.quantile, 1e-3)).toBeLessThan(1e-12);
  });

  it('incomplete gamma and beta functions equal those of scipy', () => {
    const gamma = many(() => [10 ** uniform(-2, 3), 10 ** uniform(-3, 3)] as const);
    const negative = many(() => [uniform(-2.5, -0.02), 10 ** uniform(-3, 1.5)] as const);
    const beta = many(() => [10 ** uniform(-1, 3), 10 ** uniform(-1, 3), random.uniform()] as const);
    const answer = python<Record<'lower' | 'upper' | 'negative' | 'beta' | 'log', number[]>>(
      `from scipy.special import gammainc, gammaincc, betainc, gammaln
from scipy.integrate import quad
import numpy as np
# scipy has no shape below zero: integrate t^(a-1) e^-t in ln t instead
def upper(a, x):
    return quad(lambda s: np.exp(a * s - np.exp(s)), np.log(x), np.log(x + 60), epsabs=0, epsrel=1e-12, limit=500)[0]
g = np.array(given['gamma'])
answer = {'lower': gammainc(g[:, 0], g[:, 1]).tolist(), 'upper': gammaincc(g[:, 0], g[:, 1]).tolist(),
  'log': gammaln(g[:, 0]).tolist(), 'negative': [upper(*r) for r in given['negative']], 'beta': [betainc(*r) for r in given['beta']]}`,
      { gamma, negative, beta },
    );
    expect(
      worst(
        gamma.map(([a, x]) => incompleteGamma(a, x).lower),
        answer.lower,
        1e-10,
      ),
    ).toBeLessThan(1e-11);
    expect(
      worst(
        gamma.map(([a, x]) => incompleteGamma(a, x).upper),
        answer.upper,
        1e-10,
      ),
    ).toBeLessThan(1e-11);
    expect(
      worst(
        gamma.map(([a]) => logGamma(a)),
        answer.log,
        1e-2,
      ),
    ).toBeLessThan(1e-12);
    const near = negative.map(([a]) => Math.abs(a - Math.round(a)));
    // The recurrence loses digits within a thousandth of a pole; leave those out.
    const kept = negative.map((_, k) => k).filter((k) => near[k]! > 1e-3);
    expect(kept.length).toBeGreaterThan(300);
    const ours = kept.map((k) => upperIncompleteGamma(...negative[k]!));
    expect(
      worst(
        ours,
        kept.map((k) => answer.negative[k]!),
      ),
    ).toBeLessThan(1e-9);
    expect(
      worst(
        beta.map(([a, b, x]) => incompleteBeta(a, b, x)),
        answer.beta,
        1e-8,
      ),
    ).toBeLessThan(1e-10);
  });
});
