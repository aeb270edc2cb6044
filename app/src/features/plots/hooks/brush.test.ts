import type { PlotPoint } from '@eremite/shared/contracts/plot';
import { describe, expect, it } from 'vitest';
import { CHARTS } from '../charts/charts.ts';
import { logit, probabilityOf } from '../charts/probability-axis.ts';
import { brushed, brushFromText, brushToText } from './brush.ts';

const point = (name: string, logLight: number | null, logGasToLight: number | null): PlotPoint =>
  ({ name, logLight, logGasToLight }) as PlotPoint;
const gasToLight = CHARTS.find(({ id }) => id === 'gas-to-light')!;

describe('the brush', () => {
  it('is kept in the address and read back, however it was drawn', () => {
    const text = brushToText({ chart: 'gas-to-light', x: [9, 7.12345], y: [0.5, 2] });
    expect(text).toBe('gas-to-light:7.123,9,0.5,2');
    expect(brushFromText(text, CHARTS)).toEqual({ chart: 'gas-to-light', x: [7.123, 9], y: [0.5, 2] });
  });

  it.each([null, '', 'unknown:1,2,3,4', 'gas-to-light:1,2,3', 'gas-to-light:1,2,3,x'])('is none from %j', (text) => {
    expect(brushFromText(text, CHARTS)).toBeNull();
  });

  it('holds what lies inside, edges included, and nothing without a value', () => {
    const points = [point('in', 8, 1), point('edge', 9, 2), point('out', 9.1, 1), point('none', null, 1)];
    const brush = { chart: 'gas-to-light' as const, x: [7, 9] as [number, number], y: [0, 2] as [number, number] };
    expect(brushed(points, brush, gasToLight).map(({ name }) => name)).toEqual(['in', 'edge']);
  });
});

it('draws probabilities on log odds and reads them back', () => {
  expect(logit(0.5)).toBe(0);
  expect(logit(0.9)).toBeCloseTo(Math.log(9), 12);
  expect(probabilityOf(logit(0.123))).toBeCloseTo(0.123, 12);
  expect(Number.isFinite(logit(0)) && Number.isFinite(logit(1))).toBe(true);
});
