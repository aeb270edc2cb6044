import { describe, expect, it } from 'vitest';
import { limitsChartSvg, limitsSummary } from './limits-chart.ts';
import { someEvidence, someLimit } from './testing/some-evidence.ts';

describe('the limits chart', () => {
  it('puts a fainter depth further right than the brighter counterpart that is expected', () => {
    const svg = limitsChartSvg(someEvidence({ limits: [someLimit()] }));
    const expected = Number(/<circle cx="([\d.]+)"/.exec(svg)![1]);
    const depth = Number(/M([\d.]+) [\d.]+v24/.exec(svg)![1]);
    expect(depth).toBeGreaterThan(expected + 50);
  });

  it('says per band what is expected, how deep it is and whether it would be seen', () => {
    const limits = [
      someLimit(),
      someLimit({ band: 'W1', completeness: null, testable: false, depthPoint: null, reason: 'no depth is stated' }),
      someLimit({ band: 'FUV', expectedMagnitude: null, completeness: 0 }),
    ];
    expect(limitsSummary(limits)).toBe(
      'r: 18.0 mag expected, depth 25.0, seen with a chance of 0.996; ' +
        'W1: 18.0 mag expected, no depth stated, no depth is stated; ' +
        'FUV: nothing can be expected, depth 25.0, seen with a chance of 0',
    );
  });

  it('has a row for every band and no number that is not one', () => {
    const limits = [someLimit(), someLimit({ band: 'g', expectedMagnitude: null, expectedScatterMag: null })];
    const svg = limitsChartSvg(someEvidence({ limits }));
    expect(svg).toContain('>r AB</text>');
    expect(svg).toContain('>g AB</text>');
    expect(svg).not.toMatch(/NaN|undefined|Infinity/);
    expect(limitsChartSvg(someEvidence())).toContain('No catalogue with a band was searched.');
  });
});
