import { expect, it } from 'vitest';
import { footprintPath } from './footprint-path.ts';
import { chooseProjection } from './project-sky.ts';

const same = (point: [number, number]): [number, number] => [point[0] * 1000, point[1] * 1000];
const field = chooseProjection([
  { raDeg: 44, decDeg: 9 },
  { raDeg: 46, decDeg: 11 },
]);

it('outlines the cells of a region', () => {
  // Cell 19 of order 2 lies about RA 45, Dec 30: all of it in view.
  const path = footprintPath('2/19', field, same);
  expect(path).toMatch(/^(M[-\d. L]+Z)+$/);
  const behind = { ...field, place: () => undefined };
  expect(footprintPath('2/19', behind, same)).toBe('');
});

it('leaves out what cannot be read', () => {
  expect(footprintPath('not a region', field, same)).toBe('');
});
