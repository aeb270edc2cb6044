import { describe, expect, it } from 'vitest';
import { DEGREE } from '../constants.ts';
import { DomainError } from '../domain-error.ts';
import { cellSide } from './healpix.ts';
import { Moc } from './moc.ts';
import { distanceToRegion } from './moc-distance.ts';
import { offsetBy } from './offset.ts';

// Source: IVOA MOC 2.0, example of the ASCII and JSON serialisations; 12.moc.ascii.
const EXAMPLE = '1/1 2 4 2/12-14 21 23 25 8/';

describe('Moc', () => {
  it('reads the example of the standard', () => {
    const moc = Moc.parseAscii(EXAMPLE);
    expect(moc.order).toBe(8);
    expect(moc.skyFraction).toBe(0.09375);
    expect(moc.area / DEGREE ** 2).toBeCloseTo(3867.465117133057, 8);
    expect(moc.cellsByOrder()).toEqual([
      [1, [1, 2, 4]],
      [2, [12, 13, 14, 21, 23, 25]],
      [8, []],
    ]);
    // The record gives the range of its two first cells; here the order-2 cells 12 to 14 touch it and join.
    const toOrder29 = 4n ** BigInt(29 - 8);
    expect([0, 1].map((i) => BigInt(moc.ranges[i]!) * toOrder29)).toEqual([72057594037927936n, 15n * 4n ** 27n]);
    const first = Moc.fromRanges29(1, [72057594037927936n, 216172782113783808n]);
    expect(first.toAscii()).toBe('1/1 2');
  });

  it('writes what it read, in every form', () => {
    const moc = Moc.parse(EXAMPLE);
    expect(moc.toAscii()).toBe(EXAMPLE);
    expect(moc.toJson()).toBe('{"1":[1,2,4],"2":[12,13,14,21,23,25],"8":[]}');
    expect(Moc.parse(moc.toJson()).toAscii()).toBe(EXAMPLE);
    expect(Moc.fromUniq(moc.toUniq(), 8).toAscii()).toBe(EXAMPLE);
  });

  it.each(['s1/1 2 4\r\n2/12-14,21 23 25\n8/', 's 1/ 1 2 4 2/ 12 - 14 21 23 25 8/'])('reads the variant %j', (text) => {
    expect(Moc.parse(text).toAscii()).toBe(EXAMPLE);
  });

  it.each([
    ['', /empty/],
    ['1 2 3', /begin with an order/],
    ['30/1', /0 to 29/],
    ['1/48', /cells 0 to 47/],
    ['1/5-3', /backwards/],
    ['1/a', /cell number/],
    ['{"1":[1', /not valid JSON/],
    ['{"1":4}', /list of cells/],
    ['{"1":[1.5]}', /cell number/],
    ['[1]', /JSON object/],
  ])('refuses %j and names the fault', (text, message) => {
    expect(() => Moc.parse(text)).toThrow(message);
    expect(() => Moc.parse(text)).toThrow(DomainError);
  });

  it('rounds orders beyond 24 outward and remembers them', () => {
    const moc = Moc.parseJson('{"29":[174350948570655285]}');
    expect([moc.order, moc.declaredOrder, moc.size]).toEqual([24, 29, 1]);
    expect(moc.contains(24.875 * DEGREE, 43.475 * DEGREE)).toBe(true);
    const range = [174350948570655285n, 174350948570655286n];
    expect(Moc.fromRanges29(29, range).toAscii()).toBe(moc.toAscii());
  });

  it('unites, intersects and complements at the finer order', () => {
    const a = Moc.fromCells(1, [0, 1, 2, 3]);
    const b = Moc.fromCells(2, [12, 13, 16]);
    expect(a.union(b).cellsByOrder()).toEqual([
      [0, [0]],
      [2, [16]],
    ]);
    expect(a.intersection(b).cellsByOrder()).toEqual([[2, [12, 13]]]);
    expect(a.union(a.complement()).skyFraction).toBe(1);
    expect(a.intersection(a.complement()).isEmpty).toBe(true);
    expect(b.degraded(1).cellsByOrder()).toEqual([[1, [3, 4]]]);
  });

  it('covers all of a cone inside, none of one outside, about half of one on the rim', () => {
    const half = Moc.fromCells(0, [0, 1, 2, 3]).union(Moc.fromCells(0, [4, 5, 6, 7]));
    const edge = Moc.fromCone(11, 1, 0.2, 20 * DEGREE);
    expect(half.coveredFraction(0, 1.2, 0.05)).toBe(1);
    expect(half.coveredFraction(0.8, -1.2, 0.05)).toBe(0);
    const rim = offsetBy(1, 0.2, 0.7, 20 * DEGREE);
    expect(Math.abs(edge.coveredFraction(rim.lon, rim.lat, 1 * DEGREE) - 0.5)).toBeLessThan(0.04);
    expect(Moc.allSky().coveredFraction(0, 0, Math.PI)).toBe(1);
  });

  it.each([0.5, 3, 9, 9.8])('knows how far the rim is from %d degrees off the centre of a cone', (offDeg) => {
    const moc = Moc.fromCone(10, 1, -0.4, 10 * DEGREE);
    const place = offsetBy(1, -0.4, 2, offDeg * DEGREE);
    const toRim = (10 - offDeg) * DEGREE;
    expect(Math.abs(distanceToRegion(moc, place.lon, place.lat, false) - toRim)).toBeLessThan(
      0.06 * toRim + 2 * cellSide(10),
    );
    expect(distanceToRegion(moc, place.lon, place.lat, true)).toBe(0);
    const outside = offsetBy(1, -0.4, 2, (20 - offDeg) * DEGREE);
    expect(Math.abs(distanceToRegion(moc, outside.lon, outside.lat, true) - toRim)).toBeLessThan(
      0.06 * toRim + 2 * cellSide(10),
    );
  });

  it('has no edge where it is the whole sky', () => {
    expect(distanceToRegion(Moc.allSky(), 1, 1, false)).toBe(Infinity);
  });
});
