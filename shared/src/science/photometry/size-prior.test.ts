import { describe, expect, it } from 'vitest';
import { DomainError } from '../domain-error.ts';
import { sizePriorArcsec, sizePriorKpc } from './size-prior.ts';

describe('size prior', () => {
  // Shen et al. (2003), late types, from memory: 0.1 M^0.14 (1 + M / 3.98e10)^0.25 kpc
  it.each([
    [6, 0.6918],
    [8, 1.318],
    [10, 0.1 * 10 ** 1.4 * (1 + 1 / 3.98) ** 0.25],
  ])('of log stellar mass %d has a median of %d kpc', (logMass, kpc) => {
    expect(Math.abs(sizePriorKpc(logMass)[0]!.median / kpc - 1)).toBeLessThan(1e-3);
  });

  it('has weights that add to one and a diffuse tail of larger galaxies', () => {
    const [main, tail] = sizePriorKpc(8);
    expect(main!.weight + tail!.weight).toBeCloseTo(1, 14);
    expect(tail!.median).toBeCloseTo(2.5 * main!.median, 12);
  });

  it('is 1.318 kpc = 4.85 arcsec at 56 Mpc, and broader where the distance is', () => {
    const sky = sizePriorArcsec(sizePriorKpc(8), 56, 0.3);
    expect(sky[0]!.median).toBeCloseTo(4.855, 2);
    expect(sky[0]!.scatterDex).toBeGreaterThan(0.3);
    expect(() => sizePriorArcsec(sizePriorKpc(8), 0)).toThrow(DomainError);
    expect(() => sizePriorKpc(NaN)).toThrow(DomainError);
  });
});
