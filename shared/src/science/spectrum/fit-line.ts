import { leastSquares } from './least-squares.ts';
import { busyLine, gaussianLine } from './line-shapes.ts';

/** Shapes a line is fitted with: one round peak, one flat peak, two peaks. */
export const LINE_SHAPES = ['gaussian', 'flat', 'busy'] as const;
export type LineShape = (typeof LINE_SHAPES)[number];

export interface LineFit {
  readonly shape: LineShape;
  readonly valueAt: (v: number) => number;
  readonly chiSquared: number;
  readonly parameterCount: number;
  /** The same shape fitted to other values of the same channels, from these parameters on. */
  readonly refit: (flux: readonly number[]) => LineFit;
}

export interface LineData {
  readonly v: readonly number[];
  readonly flux: readonly number[];
  /** Standard deviation of a channel. */
  readonly noise: number;
  /** First guess of the middle and of W50, km/s. */
  readonly centreKms: number;
  readonly widthKms: number;
}

/** Best fit of each shape to the channels of a line. @throws {DomainError} for fewer than 7 channels */
export function fitLine(data: LineData): Record<LineShape, LineFit> {
  return { gaussian: fitGaussian(data), flat: fitBusy(data, false), busy: fitBusy(data, true) };
}

/** How a shape is fitted: what its parameters mean, and where to start from. */
interface Recipe {
  readonly shape: LineShape;
  readonly model: (v: number, parameters: readonly number[]) => number;
  readonly starts: readonly (readonly number[])[];
  readonly steps: readonly number[];
}

function fitShape({ v, noise }: LineData, flux: readonly number[], recipe: Recipe): LineFit {
  const { shape, model, starts, steps } = recipe;
  const fits = starts.map((start) => leastSquares({ x: v, y: flux, sigma: noise, model, start, steps }));
  const { parameters, chiSquared } = fits.reduce((a, b) => (b.chiSquared < a.chiSquared ? b : a));
  return {
    shape,
    chiSquared,
    parameterCount: parameters.length,
    valueAt: (at) => model(at, parameters),
    refit: (other) => fitShape({ v, noise } as LineData, other, { ...recipe, starts: [parameters] }),
  };
}

/** Peak and width are fitted as logarithms, so that neither turns negative. */
function fitGaussian(data: LineData): LineFit {
  const { flux, noise, centreKms, widthKms } = data;
  const model: Recipe['model'] = (v, [peak, centre, sigma]) =>
    gaussianLine(v, { peak: Math.exp(peak!), centreKms: centre!, sigmaKms: Math.exp(sigma!) });
  const top = Math.log(highest(flux, noise));
  const starts = [0.5, 1, 2].map((factor) => [top, centreKms, Math.log((factor * widthKms) / 2.355)]);
  return fitShape(data, flux, { shape: 'gaussian', model, starts, steps: [1e-4, widthKms * 1e-4, 1e-4] });
}

/** Level, steepness, width and curvature as logarithms likewise. */
function fitBusy(data: LineData, hasTrough: boolean): LineFit {
  const { flux, noise, centreKms, widthKms } = data;
  const model: Recipe['model'] = (v, [level, steepness, centre, halfWidth, curvature, trough]) =>
    busyLine(v, {
      level: Math.exp(level!),
      steepness: Math.exp(steepness!),
      centreKms: centre!,
      halfWidthKms: Math.exp(halfWidth!),
      curvature: hasTrough ? Math.exp(curvature!) : 0,
      troughKms: hasTrough ? trough! : 0,
    });
  const top = Math.log(highest(flux, noise));
  const half = widthKms / 2;
  const base = (level: number, flank: number) => [level, Math.log(flank / widthKms), centreKms, Math.log(half)];
  const starts = hasTrough
    ? [0.3, 2].flatMap((depth) =>
        [3, 8].map((flank) => [...base(top - Math.log(1 + depth), flank), Math.log(depth / half ** 2), centreKms]),
      )
    : [2, 6, 15].map((flank) => base(top, flank));
  const small = widthKms * 1e-4;
  const steps = [1e-4, 1e-4, small, 1e-4, ...(hasTrough ? [1e-4, small] : [])];
  return fitShape(data, flux, { shape: hasTrough ? 'busy' : 'flat', model, starts, steps });
}

/** A robust first guess of the height: the mean of the three highest channels, and at least the noise. */
function highest(flux: readonly number[], noise: number): number {
  const top = [...flux].sort((a, b) => b - a).slice(0, 3);
  return Math.max(noise, top.reduce((sum, value) => sum + value, 0) / top.length);
}
