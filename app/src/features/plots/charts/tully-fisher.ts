import { TULLY_FISHER_FORMS, type TullyFisherForm } from '@eremite/shared/science/hydrogen/baryonic-tully-fisher';
import * as Plot from '@observablehq/plot';
import { type Chart, plainAxis } from './chart.ts';
import { errorMarks, frame, opacityIn, pointMarks } from './point-marks.ts';
import { extentOf } from './extent.ts';

const SOURCES: Record<TullyFisherForm, string> = {
  mcgaugh2012: 'McGaugh (2012)',
  lelli2019: 'Lelli et al. (2019)',
  bradford2016: 'Bradford et al. (2016)',
};
const FORMS = Object.keys(SOURCES) as TullyFisherForm[];
const DASHES: Record<TullyFisherForm, string> = { mcgaugh2012: '7 4', lelli2019: '2 3', bradford2016: '0' };
/** The dashes again, as they stand beside the names. */
const SAMPLES: Record<TullyFisherForm, string> = { mcgaugh2012: '– –', lelli2019: '···', bradford2016: '——' };
const x = plainAxis('log V_rot', (point) => point.logSpeed);
const y = plainAxis('log M_bar', (point) => point.logBaryonicMass);

/** Baryonic mass against rotation speed, with three published relations. */
export const TULLY_FISHER: Chart = {
  id: 'tully-fisher',
  title: 'Baryonic Tully-Fisher',
  caption:
    'Mass of gas (1.33 M_HI) and stars against rotation speed, W50 / (2 sin i) without correction for instrument or turbulence. Inclinations are unknown: points stand at the median of random ones, bars span 16 to 84 per cent. Arrows: the light is a limit; they begin at the gas alone and end at the gas with as many stars as the limit allows. Lines: McGaugh (2012), AJ 143, 40; Lelli et al. (2019), MNRAS 484, 3267; Bradford et al. (2016), ApJ 832, 11.',
  x,
  y,
  draw: (options) => {
    const { theme, points } = options;
    const [low, high] = extentOf(points.map(x.value), [1, 2.6]);
    const masses = extentOf([...points.map(y.value), ...points.map((point) => point.logBaryonicMassUpTo)], [7, 11]);
    const lines = FORMS.flatMap((form, i) => {
      const { slope, intercept } = TULLY_FISHER_FORMS[form];
      const ends = [low, high].map((speed) => ({ speed, mass: slope * speed + intercept }));
      const stroke = theme.serious;
      return [
        Plot.line(ends, { x: 'speed', y: 'mass', stroke, strokeWidth: 1.3, strokeDasharray: DASHES[form] }),
        Plot.text([SOURCES[form]], {
          frameAnchor: 'bottom-right',
          dx: -28,
          dy: -8 - 14 * i,
          fill: stroke,
          textAnchor: 'end',
        }),
        Plot.text([SAMPLES[form]], { frameAnchor: 'bottom-right', dx: -6, dy: -8 - 14 * i, fill: stroke }),
      ];
    });
    const limits = points.filter(
      (point) => point.lightIsLimit && point.logSpeed !== null && point.logBaryonicMassUpTo !== null,
    );
    return Plot.plot({
      ...frame(options),
      x: { label: 'log V_rot (km/s)', domain: [low, high], grid: true },
      y: { label: 'log M_bar (M☉)', domain: masses, grid: true },
      clip: true,
      marks: [
        ...lines,
        errorMarks(
          options,
          'x',
          y.value,
          (p) => p.logSpeedLow,
          (p) => p.logSpeedHigh,
        ),
        errorMarks(
          options,
          'y',
          x.value,
          (p) => (p.logBaryonicMass === null ? null : p.logBaryonicMass - (p.logHiMassError ?? 0)),
          (p) => (p.logBaryonicMass === null ? null : p.logBaryonicMass + (p.logHiMassError ?? 0)),
        ),
        Plot.arrow(limits, {
          x: (p) => x.value(p),
          y1: 'logBaryonicMass',
          y2: 'logBaryonicMassUpTo',
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
