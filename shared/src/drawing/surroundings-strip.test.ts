import { describe, expect, it } from 'vitest';
import { marksOf } from './drawn-evidence.ts';
import { stripLayout } from './strip-layout.ts';
import { edgeBand, stripZones } from './strip-zones.ts';
import { surroundingsStripSvg } from './surroundings-strip.ts';
import { stripSummary } from './strip-summary.ts';
import { someCandidate, someEvidence, someNeighbour } from './testing/some-evidence.ts';

const evidence = someEvidence({
  candidates: [someCandidate(1), someCandidate(2, { velocityDifferenceKms: 40_000 })],
  neighbours: [someNeighbour(3), someNeighbour(4, { separationArcsec: 9000, velocityDifferenceKms: -450 })],
});
const layoutAt = (atMpc?: number) =>
  stripLayout(marksOf(evidence), stripZones(evidence.detail, evidence.settings, atMpc)!);

describe('the surroundings strip', () => {
  it('takes projected separations from angles at the distance it is drawn for', () => {
    const kpc = (atMpc?: number) => layoutAt(atMpc).placed.find(({ mark }) => mark.name === 'Z3')!.kpc;
    // 1800 arcsec at 20 Mpc: 20 000 kpc x 1800 / 206 264.8 = 174.5 kpc.
    expect(kpc()).toBeCloseTo(174.53, 2);
    expect(kpc(10)).toBeCloseTo(87.27, 2);
  });

  it('moves the counterpart zone with the distance and leaves zones fixed in kpc where they are', () => {
    const [near, far] = [layoutAt(10), layoutAt(20)];
    expect(near.zones.counterpartKpc * 2).toBeCloseTo(far.zones.counterpartKpc, 9);
    expect(near.x(near.zones.neighbourKpc)).toBe(far.x(far.zones.neighbourKpc));
  });

  it('puts what has no velocity on the shelf and what is too fast at the edge', () => {
    const where = Object.fromEntries(layoutAt().placed.map(({ mark, where: place }) => [mark.name, place]));
    expect(where).toEqual({ D1: 'shelf', D2: 'above', Z3: 'inside', Z4: 'inside' });
  });

  it('draws the distance error as the separations that go in or out of a zone', () => {
    // 20 +- 4 Mpc: an object at 833.3 kpc is at 1000 kpc if it is all 20 per cent further; one at 1250 if it is nearer.
    const [from, to] = edgeBand(1000, 4 / 20);
    expect(from * 1.2).toBeCloseTo(1000, 9);
    expect(to * 0.8).toBeCloseTo(1000, 9);
    expect(edgeBand(1000, 0)).toEqual([1000, 1000]);
    expect(edgeBand(1000, 5)[1]).toBe(2500);
  });

  it('says in words what it shows', () => {
    expect(stripSummary(layoutAt())).toBe(
      'With a velocity: 1 object in the debris zone, 2 in the neighbour zone, 1 beyond the velocities shown, ' +
        'without one: 1, the nearest neighbour is Z3 at 175 kpc',
    );
  });

  it('says so where no distance is usable', () => {
    const without = someEvidence({
      distance: { kind: 'none', luminosityMpc: null, angularMpc: null, errorMpc: null, note: '', branches: [] },
    });
    expect(surroundingsStripSvg(without)).toContain('Without a usable distance');
  });

  it('is a whole document without NaN or undefined', () => {
    const svg = surroundingsStripSvg(evidence);
    expect(svg).toMatch(/^<svg xmlns="http:\/\/www.w3.org\/2000\/svg".*<\/svg>$/s);
    expect(svg).not.toMatch(/NaN|undefined|Infinity/);
  });
});
