import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { polygonsFootprint } from '@eremite/shared/science/sky/footprint';
import { describe, expect, it } from 'vitest';
import { shiftedPlaces } from './control-run.ts';
import { coveredCircle } from './covered-share.ts';
import type { Detections } from './detections.ts';

/** A field of one square degree. */
const field = polygonsFootprint([
  [
    { lon: 149.5 * DEGREE, lat: -0.5 * DEGREE },
    { lon: 150.5 * DEGREE, lat: -0.5 * DEGREE },
    { lon: 150.5 * DEGREE, lat: 0.5 * DEGREE },
    { lon: 149.5 * DEGREE, lat: 0.5 * DEGREE },
  ],
]).region;

/** Detections 60 arcsec wide, at some offsets of the middle, degrees. */
function detectionsAt(offsets: readonly number[]): Detections {
  const all = offsets.map((offset, position) => ({
    position,
    name: `n${position}`,
    row: position,
    raDeg: 150 + offset,
    decDeg: 0,
    searchArcsec: 60,
    beam: null,
  }));
  return {
    length: all.length,
    pick: (positions: readonly number[]) => positions.map((at) => all[at]!),
    places: () => ({
      raDeg: Float64Array.from(all, ({ raDeg }) => raDeg),
      decDeg: Float64Array.from(all, ({ decDeg }) => decDeg),
    }),
  } as unknown as Detections;
}

describe('the places of the control', () => {
  it('are covered as far as the search reaches, not by their middle alone', () => {
    // From the middle of the field to near its edge: the ring of most reaches out of it.
    const { raDeg, decDeg } = shiftedPlaces(detectionsAt([-0.45, -0.2, 0, 0.2, 0.45]), [{ moc: field }], 40, 7);
    expect(raDeg.length).toBeGreaterThan(100);
    const shares = Array.from(raDeg, (ra, i) => coveredCircle(field, ra, decDeg[i]!, 60 * ARCSECOND));
    expect(Math.min(...shares)).toBeGreaterThan(0.94);
  });

  it('may lie anywhere about a source that a table does not cover', () => {
    const { raDeg } = shiftedPlaces(detectionsAt([5]), [{ moc: field }], 20, 7);
    expect(raDeg.length).toBe(20);
  });
});
