import { describe, expect, it } from 'vitest';
import { footprintCells } from './footprint-cells.ts';

describe('the cells a footprint is drawn in', () => {
  it('are small enough for their edges to be straight, also of the whole sky', () => {
    const { cells, sideDeg } = footprintCells('0/0-11');
    // Source: 12 base cells, four times as many an order (Gorski et al. 2005); 41,253 square degrees in all.
    expect(cells).toHaveLength(12 * 4 ** 4);
    expect(sideDeg).toBeCloseTo(Math.sqrt(41_252.96 / (12 * 4 ** 4)), 3);
  });

  it('are coarsened where there are very many', () => {
    const { cells } = footprintCells('9/0-262143');
    expect(cells.length).toBeLessThanOrEqual(4000);
    expect(footprintCells('12/5').cells).toHaveLength(1);
  });
});
