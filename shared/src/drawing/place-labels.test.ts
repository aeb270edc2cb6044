import { expect, it } from 'vitest';
import { placeLabels } from './place-labels.ts';

const label = (x: number, y: number, text = 'D000001') => ({ x, y, text, clear: 6 });

it('moves a label that would cover another by whole lines, and leaves a free one where it is', () => {
  const [first, second, far] = placeLabels([label(100, 100), label(102, 101), label(400, 100)], 600);
  expect(first!.y).toBe(104);
  expect(Math.abs(second!.y - first!.y)).toBeGreaterThanOrEqual(13);
  expect(far!.y).toBe(104);
});

it('puts a label to the left of a mark at the right edge', () => {
  const [inside, edge] = placeLabels([label(100, 100), label(580, 100)], 600);
  expect(inside).toMatchObject({ x: 106, anchor: 'start' });
  expect(edge).toMatchObject({ x: 574, anchor: 'end' });
});
