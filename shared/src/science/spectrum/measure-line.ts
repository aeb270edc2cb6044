import { DomainError } from '../domain-error.ts';
import { randomStream, type Random } from '../robustness/random.ts';
import { takeOffBaseline } from './baseline.ts';
import { fitLine, type LineFit, type LineShape } from './fit-line.ts';
import { firstGuess, lineWindow } from './line-window.ts';
import { lineWidth, peaksOf } from './line-widths.ts';
import { onePeakOrTwo, type PeakJudgement } from './one-peak-or-two.ts';
import { correlationOf, correlatedNoise } from './channel-noise.ts';

export interface Measured {
  readonly value: number;
  /** Standard deviation over noise realisations. */
  readonly error: number;
}

export interface LineMeasurement extends Omit<PeakJudgement, 'adopted'> {
  readonly shape: LineShape;
  readonly centreKms: Measured;
  readonly w50Kms: Measured;
  readonly w20Kms: Measured;
  /** Flux density × km/s in the unit of the spectrum. */
  readonly flux: Measured;
  /** (upper - lower) / (upper + lower) half of the flux about the middle of W20: -1 to 1, 0 is symmetric. */
  readonly asymmetry: Measured;
  /** Highest channel over the noise of a channel. */
  readonly peakSignalToNoise: number;
  /** Flux over its error from the noise of the channels alone. */
  readonly signalToNoise: number;
  readonly noise: number;
  readonly channelKms: number;
  /** Correlation of neighbouring channels outside the line; 0 where it is not significant. */
  readonly correlation: number;
  /** The window the flux was summed in, km/s. */
  readonly lowKms: number;
  readonly highKms: number;
  /** Flux less the baseline, and the adopted fit, channel for channel. */
  readonly flat: Float64Array;
  readonly fit: Float64Array;
}

export interface LineSettings {
  /** Middle and W50 where a catalogue gives them, km/s. */
  readonly centreKms?: number | undefined;
  readonly widthKms?: number | undefined;
  /** Order of the baseline, 0 to 5. */
  readonly order?: number | undefined;
  readonly draws?: number | undefined;
  readonly seed?: number | undefined;
}

/**
 * Measures an HI line.
 *
 * @param v velocities (optical cz), km/s, ascending
 * @param flux flux densities in any unit; NaN is a channel without a value
 * @throws {DomainError} for fewer than 16 usable channels, a line that fills the spectrum, or no line above the noise
 *
 * Widths and middle are those of the adopted fit, so that single noisy channels do not move them; the flux is the sum of
 * the channels. Errors come from realisations of the fit with noise like that outside the line, measured the same way,
 * baseline included (parametric bootstrap: Efron & Tibshirani 1993, chapter 6).
 */
export function measureLine(v: Float64Array, flux: Float64Array, settings: LineSettings = {}): LineMeasurement {
  const { order = 1, draws = 100, seed = 1 } = settings;
  const usable = flux.reduce((count, value) => count + (Number.isFinite(value) ? 1 : 0), 0);
  if (usable < 16) throw new DomainError(`measureLine: ${usable} channels with a value are too few`);
  const channelKms = (v[v.length - 1]! - v[0]!) / (v.length - 1);
  const guess = firstGuess(v, flux, channelKms, settings);
  const window = lineWindow(guess.centreKms, guess.widthKms, channelKms);
  const base = takeOffBaseline(v, flux, window, order);
  const correlation = correlationOf(v, base.flux, window);
  const weight = (1 - correlation) / (1 + correlation);
  const about = lineWindow(guess.centreKms, guess.widthKms * 1.5, channelKms);
  const inside = [...v.keys()].filter(
    (i) => v[i]! >= about.lowKms && v[i]! <= about.highKms && Number.isFinite(flux[i]!),
  );
  const at = inside.map((i) => v[i]!);
  const pick = (values: ArrayLike<number>) => inside.map((i) => values[i]!);
  const fits = fitLine({ v: at, flux: pick(base.flux), noise: base.noise, ...guess });
  const { adopted, ...judgement } = onePeakOrTwo(fits, at, weight);
  const found = numbersOf(adopted, v, base.flux, channelKms, about);
  if (!found) throw new DomainError('measureLine: the fit has no flanks within the spectrum; no line stands out');
  const fit = Float64Array.from(v, adopted.valueAt);
  const random = randomStream(seed, 'line');
  const drawn = Array.from({ length: draws }, () => {
    const noisy = realisation(fit, base.noise, correlation, random);
    const { flux: flat } = takeOffBaseline(v, noisy, window, order);
    return numbersOf(adopted.refit(pick(flat)), v, flat, channelKms, about);
  }).filter((one) => one !== undefined);
  const measured = (of: (numbers: LineNumbers) => number): Measured => ({
    value: of(found),
    error: deviation(drawn.map(of)),
  });
  const peak = pick(base.flux).reduce((a, b) => Math.max(a, b), -Infinity);
  return {
    ...judgement,
    shape: adopted.shape,
    centreKms: measured(({ centre }) => centre),
    w50Kms: measured(({ w50 }) => w50),
    w20Kms: measured(({ w20 }) => w20),
    flux: measured((numbers) => numbers.flux),
    asymmetry: measured(({ asymmetry }) => asymmetry),
    peakSignalToNoise: peak / base.noise,
    signalToNoise: found.flux / (base.noise * channelKms * Math.sqrt(found.channels / weight)),
    noise: base.noise,
    channelKms,
    correlation,
    lowKms: found.low,
    highKms: found.high,
    flat: base.flux,
    fit,
  };
}

interface LineNumbers {
  centre: number;
  w50: number;
  w20: number;
  flux: number;
  asymmetry: number;
  low: number;
  high: number;
  channels: number;
}

/** Points a channel at which the fit is evaluated for its widths. */
const FINE = 8;

function numbersOf(
  fit: LineFit,
  v: Float64Array,
  flat: Float64Array,
  channelKms: number,
  about: { lowKms: number; highKms: number },
): LineNumbers | undefined {
  const step = channelKms / FINE;
  const margin = about.highKms - about.lowKms;
  const count = Math.min(20_000, Math.ceil((3 * margin) / step));
  const grid = Float64Array.from({ length: count }, (_, i) => about.lowKms - margin + i * step);
  const values = grid.map((at) => fit.valueAt(at));
  const peaks = peaksOf(values);
  const half = lineWidth(grid, values, 0.5, peaks);
  const fifth = lineWidth(grid, values, 0.2, peaks);
  if (!half || !fifth) return undefined;
  const w20 = fifth.highKms - fifth.lowKms;
  const middle = (fifth.lowKms + fifth.highKms) / 2;
  const reach = 0.75 * w20 + 1.5 * channelKms;
  let [lower, upper, channels] = [0, 0, 0];
  for (let i = 0; i < v.length; i++) {
    if (Math.abs(v[i]! - middle) > reach || !Number.isFinite(flat[i]!)) continue;
    channels++;
    // The channel in the middle is shared between the halves.
    const share = Math.max(0, Math.min(1, (v[i]! - middle) / channelKms + 0.5));
    upper += share * flat[i]! * channelKms;
    lower += (1 - share) * flat[i]! * channelKms;
  }
  return {
    centre: (half.lowKms + half.highKms) / 2,
    w50: half.highKms - half.lowKms,
    w20,
    flux: lower + upper,
    asymmetry: (upper - lower) / (upper + lower),
    low: middle - reach,
    high: middle + reach,
    channels,
  };
}

function realisation(fit: Float64Array, noise: number, correlation: number, random: Random): Float64Array {
  const drawn = correlatedNoise(fit.length, noise, correlation, random);
  return fit.map((value, i) => value + drawn[i]!);
}

function deviation(values: readonly number[]): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / Math.max(1, values.length - 1));
}
