import * as Plot from '@observablehq/plot';
import type { Chart } from './chart.ts';
import { frame, pointMarks } from './point-marks.ts';
import { logit, ODDS_RANGE, probabilityAxis, probabilityOf, PROBABILITY_TICKS } from './probability-axis.ts';

const x = probabilityAxis('P(no starlight)', (point) => point.pNoStarlight);
const y = probabilityAxis('P(no neighbour)', (point) => point.pAlone);
/** Below the axis: what has no probability of being alone. */
const SHELF = ODDS_RANGE[0] - 1.1;

/** Starlight against surroundings: what the survey is about stands at the upper right. */
export const VERDICT_PLANE: Chart = {
  id: 'verdicts',
  title: 'Starlight and surroundings',
  caption:
    'Probability that no object of the catalogues is the counterpart, P(none) + P(missed) + P(spurious), against that of no neighbour, both on a scale of log odds. Dashed: least P(none) + P(missed) for dark and least P(no neighbour) for alone, of the criteria. On the shelf below: no P(no neighbour) can be given.',
  x,
  y,
  draw: (options) => {
    const { theme, darkFrom, aloneFrom } = options;
    const ticks = PROBABILITY_TICKS.map(logit);
    const axis = { ticks, tickFormat: (odds: number) => String(Number(probabilityOf(odds).toPrecision(3))) };
    return Plot.plot({
      ...frame(options),
      x: { ...axis, label: 'P(no starlight)', domain: [ODDS_RANGE[0] - 0.3, ODDS_RANGE[1] + 0.3], grid: true },
      y: { ...axis, label: 'P(no neighbour)', domain: [SHELF - 0.5, ODDS_RANGE[1] + 0.3], grid: true },
      marks: [
        Plot.ruleX([logit(darkFrom)], { stroke: theme.amber, strokeDasharray: '5 4' }),
        Plot.ruleY([logit(aloneFrom)], { stroke: theme.concordant, strokeDasharray: '5 4' }),
        Plot.text(['not told'], { frameAnchor: 'bottom-left', dx: 4, dy: -8, fill: theme.muted, fontStyle: 'italic' }),
        ...pointMarks(options, x.value, (point) => y.value(point) ?? SHELF),
      ],
    }) as ReturnType<Chart['draw']>;
  },
};
