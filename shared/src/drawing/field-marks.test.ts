import { expect, it } from 'vitest';
import type { Field } from '../contracts/field.ts';
import { fieldMarks } from './field-marks.ts';
import { marksOf } from './drawn-evidence.ts';
import { someCandidate, someEvidence } from './testing/some-evidence.ts';

const tables: Field['tables'] = [
  {
    catalogueId: 'deep',
    name: 'Deep r',
    kind: 'optical',
    beamArcsec: null,
    inside: 2,
    rowId: [1, 7],
    objectName: ['D1', 'D7'],
    raDeg: [40, 40],
    decDeg: [10, 10.01],
    separationArcsec: [10, 36],
    magnitude: [19, null],
    band: ['r', null],
    velocityDifferenceKms: [null, -300],
    isStar: [false, false],
  },
];
const known = marksOf(someEvidence({ candidates: [someCandidate(1)] }));

it('adds what the verdict does not hold already: a row that it holds stands once, as the verdict has it', () => {
  const marks = fieldMarks({ tables }, known, 500, 0.1);
  expect(marks.map(({ name }) => name)).toEqual(['D7']);
  expect(marks[0]).toMatchObject({ role: 'field', key: 'deep:7', separationKpc: 3.6, agreement: 'concordant' });
});

it('knows no kpc without a distance, and no agreement beyond the window', () => {
  expect(fieldMarks({ tables }, known, 299, null)[0]).toMatchObject({ separationKpc: null, agreement: 'other' });
});
