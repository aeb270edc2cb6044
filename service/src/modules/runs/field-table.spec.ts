import type { FieldTable } from '@eremite/shared/contracts/field';
import { describe, expect, it } from 'vitest';
import { cutField } from './field-table.ts';

const table = (
  kind: FieldTable['kind'],
  rows: [magnitude: number | null, differenceKms: number | null][],
): FieldTable => ({
  catalogueId: kind,
  name: kind,
  kind,
  beamArcsec: null,
  inside: rows.length,
  rowId: rows.map((_, i) => i + 1),
  objectName: rows.map((_, i) => `${kind}${i + 1}`),
  raDeg: rows.map(() => 40),
  decDeg: rows.map(() => 10),
  separationArcsec: rows.map((_, i) => i),
  magnitude: rows.map(([magnitude]) => magnitude),
  band: rows.map(([magnitude]) => (magnitude === null ? null : 'r')),
  velocityDifferenceKms: rows.map(([, difference]) => difference),
  isStar: rows.map(() => false),
});
const names = (tables: readonly FieldTable[]) => tables.flatMap(({ objectName }) => objectName);

describe('a field that is too large', () => {
  const gas = table('hi', [[null, null]]);
  const optical = table('optical', [
    [22, null],
    [18, null],
    [null, null],
    [24, 300],
    [20, null],
  ]);

  it('loses its faintest objects without a velocity, those without a magnitude first of all', () => {
    expect(names(cutField([gas, optical], 5).tables)).toEqual(['hi1', 'optical1', 'optical2', 'optical4', 'optical5']);
    expect(names(cutField([gas, optical], 3).tables)).toEqual(['hi1', 'optical2', 'optical4']);
  });

  it('says that it was cut, and still how many there are', () => {
    const { tables, isCut } = cutField([gas, optical], 3);
    expect(isCut).toBe(true);
    expect(tables.map(({ inside }) => inside)).toEqual([1, 5]);
    expect(cutField([gas, optical], 6)).toEqual({ tables: [gas, optical], isCut: false });
  });

  it('keeps exactly as many as may be kept where many are equally faint', () => {
    const equal = table(
      'optical',
      Array.from({ length: 10 }, () => [20, null]),
    );
    expect(names(cutField([equal], 4).tables)).toHaveLength(4);
  });

  it('keeps every column of an object together', () => {
    const [, cut] = cutField([gas, optical], 3).tables;
    expect(cut).toMatchObject({ rowId: [2, 4], magnitude: [18, 24], velocityDifferenceKms: [null, 300] });
  });
});
