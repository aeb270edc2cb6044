import { expect, it } from 'vitest';
import { verdictSpans } from './verdict-spans.ts';

const at = (angularMpc: number, verdict: string) => ({ angularMpc, verdict });

it('puts a change half way between the distances that differ, on the scale of their logarithm', () => {
  const points = [at(10, 'accompanied'), at(16, 'accompanied'), at(25, 'alone'), at(40, 'alone')];
  expect(verdictSpans(points, ({ verdict }) => verdict)).toEqual([
    { verdict: 'accompanied', fromMpc: 10, toMpc: 20 },
    { verdict: 'alone', fromMpc: 20, toMpc: 40 },
  ]);
});

it('keeps a verdict that comes back apart from where it was first', () => {
  const points = [at(1, 'a'), at(4, 'b'), at(16, 'a')];
  expect(verdictSpans(points, ({ verdict }) => verdict)).toEqual([
    { verdict: 'a', fromMpc: 1, toMpc: 2 },
    { verdict: 'b', fromMpc: 2, toMpc: 8 },
    { verdict: 'a', fromMpc: 8, toMpc: 16 },
  ]);
  expect(verdictSpans([], () => 'a')).toEqual([]);
});
