import { describe, expect, it } from 'vitest';
import { evidenceMoved } from './evidence-moved.ts';

type Item = Parameters<typeof evidenceMoved>[0];
const item = (given: Partial<Item> = {}): Item => ({
  starlight: 'dark',
  surroundings: 'alone',
  pNone: 0.9,
  pMissed: 0.05,
  pAlone: 0.8,
  power: 0.995,
  distanceMpc: 33.1,
  fluxJyKms: 1.2,
  velocityKms: 2310,
  raDeg: 0.0001,
  decDeg: 10,
  counterpart: { catalogueId: 'a', rowId: 1, name: 'faint one', probability: 0.02, separationArcsec: 30 },
  nearest: { catalogueId: 'b', rowId: 9, name: 'giant', separationKpc: 410, velocityDifferenceKms: 100 },
  doubts: [{ name: 'debris', grade: 'watch' }],
  ...given,
});

describe('the evidence a word was given on', () => {
  it('stands where nothing moved, and where numbers moved by less than a reader would see', () => {
    expect(evidenceMoved(item(), item())).toEqual([]);
    const near = { pNone: 0.885, power: 0.99, distanceMpc: 33.3, raDeg: 359.9999, velocityKms: 2310.5 };
    expect(evidenceMoved(item(), item(near))).toEqual([]);
  });

  it('moved by the difference of a distance, in its unit, with what hangs on it', () => {
    const nearest = { ...item().nearest!, separationKpc: 300 };
    expect(evidenceMoved(item(), item({ distanceMpc: 24.2, nearest }))).toEqual([
      { what: 'distance', from: '33.1', to: '24.2', by: expect.closeTo(-8.9, 9), unit: 'Mpc' },
      { what: 'separation of the nearest neighbour', from: '410', to: '300', by: -110, unit: 'kpc' },
    ]);
    expect(evidenceMoved(item(), item({ distanceMpc: null }))).toMatchObject([{ to: 'none', by: null }]);
  });

  it.each([
    ['starlight', { starlight: 'contested' as const }],
    ['surroundings', { surroundings: 'accompanied' as const }],
    ['P(none)', { pNone: 0.87 }],
    ['P(missed)', { pMissed: 0.08 }],
    ['P(no neighbour)', { pAlone: 0.77 }],
    ['power', { power: 0.98 }],
    ['position', { raDeg: 0.0001 + 1.2 / 3600 }],
    ['velocity', { velocityKms: 2312 }],
    ['HI flux', { fluxJyKms: 1.3 }],
    ['doubts', { doubts: [{ name: 'debris', grade: 'serious' as const }] }],
    ['nearest neighbour', { nearest: null }],
  ])('moved in %s', (what, change) => {
    expect(evidenceMoved(item(), item(change)).map((entry) => entry.what)).toEqual([what]);
  });

  it('does not hang on which of the unlikely objects leads, but on a likely one', () => {
    const other = (probability: number, separationArcsec = 12) => ({
      ...item().counterpart!,
      name: 'another',
      probability,
      separationArcsec,
    });
    expect(evidenceMoved(item(), item({ counterpart: other(0.03) }))).toEqual([]);
    expect(evidenceMoved(item(), item({ counterpart: other(0.4) }))).toMatchObject([
      { what: 'best object', from: 'faint one', to: 'another' },
    ]);
    // The same place under another name: a new version of the table renamed it.
    expect(evidenceMoved(item(), item({ counterpart: other(0.4, 30.1) }))).toEqual([]);
    expect(evidenceMoved(item(), item({ nearest: { ...item().nearest!, name: 'renamed giant' } }))).toEqual([]);
  });
});
