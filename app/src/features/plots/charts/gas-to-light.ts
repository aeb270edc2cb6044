import { meanHiMass } from '@eremite/shared/science/hydrogen/gas-relation';
import * as Plot from '@observablehq/plot';
import { type Chart, plainAxis } from './chart.ts';
import { extentOf } from './extent.ts';
import { errorMarks, frame, opacityIn, pointMarks } from './point-marks.ts';

const x = plainAxis('log L_r', (point) => point.logLight);
const y = plainAxis('log M_HI/L_r', (point) => point.logGasToLight);
/** Length of a limit's arrow, dex on both axes: the gas mass is known, so that less light is a higher ratio. */
const ARROW_DEX = 0.35;

/** Gas per light against light, with the mean relation of galaxies rich in gas. */
export const GAS_TO_LIGHT: Chart = {
  id: 'gas-to-light',
  title: 'Gas to light',
  caption:
    'HI mass over r luminosity against r luminosity, solar units. Arrows: the light is an upper limit, the ratio a lower one; at fixed gas mass both move together. Bars: error of the flux (up) and of flux and distance (across). Line: mean M_HI at a stellar mass, Huang et al. (2012), ApJ 756, 113 (from memory), with the M/L_r of the criteria.',
  x,
  y,
  draw: (options) => {
    const { theme, points, massToLightR } = options;
    const lights = extentOf(points.map(x.value), [6, 11]);
    const ratios = extentOf(points.map(y.value), [-2, 2]);
    const line = Array.from({ length: 41 }, (_, i) => {
      const logLight = lights[0] + ((lights[1] - lights[0]) * i) / 40;
      return { logLight, ratio: meanHiMass(logLight + Math.log10(massToLightR)) - logLight };
    });
    const limits = points.filter((point) => point.lightIsLimit && point.logLight !== null);
    return Plot.plot({
      ...frame(options),
      x: { label: 'log L_r (L☉)', domain: lights, grid: true },
      y: { label: 'log M_HI/L_r', domain: ratios, grid: true },
      clip: true,
      marks: [
        Plot.line(line, { x: 'logLight', y: 'ratio', stroke: theme.serious, strokeWidth: 1.3 }),
        Plot.text(['Huang et al. (2012) ——'], {
          frameAnchor: 'bottom-left',
          dx: 6,
          dy: -8,
          fill: theme.serious,
        }),
        errorMarks(
          options,
          'y',
          x.value,
          (p) => (p.logGasToLight === null ? null : p.logGasToLight - (p.logGasToLightError ?? 0)),
          (p) => (p.logGasToLight === null ? null : p.logGasToLight + (p.logGasToLightError ?? 0)),
        ),
        errorMarks(
          options,
          'x',
          y.value,
          (p) => (p.logLight === null ? null : p.logLight - (p.logHiMassError ?? 0)),
          (p) => (p.logLight === null ? null : p.logLight + (p.logHiMassError ?? 0)),
        ),
        Plot.arrow(limits, {
          x1: 'logLight',
          y1: 'logGasToLight',
          x2: (p) => p.logLight! - ARROW_DEX,
          y2: (p) => p.logGasToLight! + ARROW_DEX,
          stroke: theme.amber,
          strokeOpacity: opacityIn(options),
          strokeWidth: 1,
          headLength: 5,
        }),
        ...pointMarks(options, x.value, y.value),
      ],
    }) as ReturnType<Chart['draw']>;
  },
};
