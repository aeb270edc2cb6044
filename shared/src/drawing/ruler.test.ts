import { describe, expect, it } from 'vitest';
import { roundStep, rulerTicks } from './ruler.ts';

describe('the frame as a ruler', () => {
  it('steps by 1, 2 or 5 times a power of ten', () => {
    expect([0.9, 7, 12, 55, 340].map((span) => roundStep(span, 5))).toEqual([0.2, 1, 2, 10, 50]);
  });

  it('puts zero at the detection and the same number on either side of it', () => {
    expect(rulerTicks(0, 10, 500, '′').map(({ at, text }) => ({ at: Math.round(at), text }))).toEqual([
      { at: 50, text: '4′' },
      { at: 150, text: '2′' },
      { at: 250, text: '0' },
      { at: 350, text: '2′' },
      { at: 450, text: '4′' },
    ]);
  });

  it('moves with the view', () => {
    expect(rulerTicks(2, 10, 500, '′').find(({ text }) => text === '0')?.at).toBeCloseTo(150, 9);
  });
});
