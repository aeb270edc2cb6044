import { describe, expect, it } from 'vitest';
import { footprintText } from './footprint-text.ts';
import { parseFootprint } from './parse-footprint.ts';

describe('a region written as text', () => {
  it.each([
    [
      'circles',
      [
        [150, 2, 0.5],
        [160.25, -3, 1],
      ],
      '150 2 0.5\n160.25 -3 1',
    ],
    [
      'polygons',
      [
        [
          [10, 0],
          [11, 0],
          [11, 1],
        ],
        [
          [20, 0],
          [21, 0],
          [21, 1],
        ],
      ],
      '10 0\n11 0\n11 1\n\n20 0\n21 0\n21 1',
    ],
    ['moc', '6/24185 24190', '6/24185 24190'],
  ] as const)('reads back what it writes: %s', (type, value, text) => {
    expect(footprintText(value)).toBe(text);
    expect(parseFootprint(type, text)).toEqual({ value });
  });

  it('is empty for what cannot be written', () => {
    expect(footprintText(undefined)).toBe('');
    expect(footprintText({ fits: 'U0lNUExF' })).toBe('');
  });
});
