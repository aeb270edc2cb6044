import { describe, expect, it } from 'vitest';
import { inOrder } from './in-order.ts';

const later = <T>(value: T, ticks: number): Promise<T> =>
  ticks === 0 ? Promise.resolve(value) : Promise.resolve().then(() => later(value, ticks - 1));

describe('work in units side by side', () => {
  it('hands results over in order, whichever is ready first', async () => {
    const taken: number[] = [];
    await inOrder(
      10,
      3,
      4,
      ({ from, to }) => later([from, to], 20 - from),
      ([from, to], end) => {
        expect(end).toBe(to);
        taken.push(from!);
      },
    );
    expect(taken).toEqual([0, 3, 6, 9]);
  });

  it('never runs further ahead of the taker than it is told', async () => {
    let begun = 0;
    let most = 0;
    let taken = 0;
    await inOrder(
      100,
      1,
      4,
      () => later(++begun, 1),
      async () => {
        await later(0, 5);
        most = Math.max(most, begun - taken);
        taken++;
      },
    );
    expect([begun, taken, most]).toEqual([100, 100, 4]);
  });

  it('throws the first failure, takes nothing after it, and leaves no failure unheard', async () => {
    const taken: number[] = [];
    const work = inOrder(
      9,
      1,
      4,
      ({ from }) => (from >= 2 ? later(0, 3).then(() => Promise.reject(new Error(`unit ${from}`))) : later(from, 1)),
      (from) => void taken.push(from),
    );
    await expect(work).rejects.toThrow('unit 2');
    expect(taken).toEqual([0, 1]);
  });

  it('does nothing for nothing', () => inOrder(0, 5, 2, () => Promise.reject(new Error('begun')), () => undefined)); // prettier-ignore
});
