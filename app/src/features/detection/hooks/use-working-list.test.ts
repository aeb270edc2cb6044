import { describe, expect, it } from 'vitest';
import { mergeWorkingList } from './use-working-list.ts';

const item = (detectionId: string, reviews = 0) => ({ detectionId, reviews });

describe('the list one works through', () => {
  it('keeps what was decided in its place, though the service has it no more', () => {
    expect(mergeWorkingList([item('a'), item('b'), item('c')], [item('a'), item('c')])).toEqual([
      item('a'),
      item('b'),
      item('c'),
    ]);
  });

  it('shows the fresh state of each and adds what is new at the end', () => {
    expect(mergeWorkingList([item('a'), item('b')], [item('new'), item('b', 2)])).toEqual([
      item('a'),
      item('b', 2),
      item('new'),
    ]);
  });
});
