import { describe, expect, it } from 'vitest';
import { finderChartSvg, usualRadius } from './finder-chart.ts';
import { someCandidate, someEvidence } from './testing/some-evidence.ts';

/** Where marks stand: the shifts of all paths that are placed. */
const shifts = (svg: string) =>
  [...svg.matchAll(/transform="translate\(([-\d.]+) ([-\d.]+)\)"/g)].map(([, x, y]) => [Number(x), Number(y)]);

describe('the finder chart', () => {
  it('draws an object to the east left of the middle and one to the north above it', () => {
    const candidates = [
      someCandidate(1, { raDeg: 40 + 50 / 3600 / Math.cos((10 * Math.PI) / 180), decDeg: 10, separationArcsec: 50 }),
      someCandidate(2, { separationArcsec: 50 }),
    ];
    const options = { size: 600, radiusArcsec: 100 };
    const [east, north] = shifts(finderChartSvg(someEvidence({ candidates }), options));
    // 50 arcsec of 100 to the edge are half of 300 pixels; the field begins at (12, 60).
    expect(east![0]).toBeCloseTo(12 + 300 - 150, 0);
    expect(east![1]).toBeCloseTo(60 + 300, 0);
    expect(north![0]).toBeCloseTo(12 + 300, 0);
    expect(north![1]).toBeCloseTo(60 + 300 - 150, 0);
  });

  it('has a scale bar of a round angle with its length at the distance of the gas', () => {
    // 1 arcmin at 20 Mpc: 20 000 kpc x 60 / 206 264.8 = 5.8 kpc.
    expect(finderChartSvg(someEvidence(), { radiusArcsec: 120 })).toContain('1′ = 5.8 kpc');
    const without = someEvidence({
      distance: { kind: 'none', luminosityMpc: null, angularMpc: null, errorMpc: null, note: '', branches: [] },
    });
    expect(finderChartSvg(without, { radiusArcsec: 120 })).not.toContain('kpc');
  });

  it('shows search circle and beam unless told otherwise', () => {
    expect(usualRadius(someEvidence())).toBeCloseTo(1.45 * 90, 9);
    expect(usualRadius(someEvidence({ searchRadiusArcsec: 200 }))).toBeCloseTo(1.45 * 200, 9);
  });

  it('names the likely candidates only, and escapes their names', () => {
    const candidates = [
      someCandidate(1, { name: 'A<&>', probability: 0.7 }),
      someCandidate(2, { name: 'unlikely', probability: 0.001 }),
    ];
    const svg = finderChartSvg(someEvidence({ candidates }));
    expect(svg).toContain('A&lt;&amp;&gt;');
    expect(svg).not.toContain('unlikely');
  });

  it('hatches a mask and what a catalogue did not observe', () => {
    const plain = finderChartSvg(someEvidence());
    const masks = [{ raDeg: 40, decDeg: 10.01, radiusArcsec: 20, label: 'G 7.1' }];
    expect(finderChartSvg(someEvidence({ masks }))).toContain('G 7.1');
    // A region far away: all of the field is unobserved.
    const coverages = [{ id: 'n', name: 'NUV', kind: 'ultraviolet', moc: '5/0' }];
    const hatched = finderChartSvg(someEvidence({}, { coverages }));
    expect(plain).not.toContain('finder-hatch-ultraviolet');
    expect(hatched).toContain('fill="url(#finder-hatch-ultraviolet)"');
  });

  it('says that a verdict is a screening result, and gives its ids the prefix asked for', () => {
    const svg = finderChartSvg(someEvidence(), { idPrefix: 'p7' });
    expect(svg).toContain('screening result, not a discovery');
    expect([...svg.matchAll(/ id="([^"]+)"/g)].every(([, id]) => id!.startsWith('p7-'))).toBe(true);
  });
});
