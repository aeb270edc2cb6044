import { describe, expect, it } from 'vitest';
import { spectrumLayout } from './spectrum-layout.ts';

const FRAME = { width: 220, height: 120, left: 10, right: 10, top: 10, bottom: 10 };

describe('spectrumLayout', () => {
  const layout = spectrumLayout({ czKms: [0, 10, 20, 30], flux: [1, null, 3, -1], fit: [0, 1, 3, 0] }, FRAME);

  it('has the first and the last channel at the sides and ticks at round numbers', () => {
    expect([layout.x(0), layout.x(30)]).toEqual([10, 210]);
    expect(layout.xTicks).toEqual([0, 5, 10, 15, 20, 25, 30]);
    expect(layout.yTicks).toContain(0);
  });

  it('has higher flux higher up, within the frame', () => {
    expect(layout.y(3)).toBeLessThan(layout.y(0));
    expect(layout.y(3)).toBeGreaterThan(10);
    expect(layout.y(-1)).toBeLessThan(110);
  });

  it('breaks where a channel has no value', () => expect(layout.steps.match(/M/g)).toHaveLength(2));
});
