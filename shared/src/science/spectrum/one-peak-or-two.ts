import type { LineFit, LineShape } from './fit-line.ts';
import { peaksOf } from './line-widths.ts';

export type PeakCount = 'one' | 'two' | 'cannot tell';

export interface PeakJudgement {
  readonly peaks: PeakCount;
  /** Natural logarithm of the Bayes factor of two peaks over one. */
  readonly lnBayesFactor: number;
  /** Depth of the trough of the two-peaked fit below its lower peak, as a part of that peak; 0 is none. */
  readonly troughDepth: number;
  /** The two-peaked fit where the evidence for it is strong, else the better of the others. */
  readonly adopted: LineFit;
}

/** ln of a Bayes factor from which evidence is called strong. Source: Kass & Raftery (1995), JASA 90, 773. */
const STRONG = 3;
const LEAST_DEPTH = 0.1;

/**
 * Whether a line has one peak or two: the best of the one-peaked fits against the two-peaked one.
 *
 * @param channels how many independent channels were fitted
 * @param weight independent channels over channels, so that correlated noise does not count twice
 *
 * The Bayes factor is approximated by the difference of the Bayesian information criteria (Schwarz 1978, Ann. Stat. 6,
 * 461; Kass & Raftery 1995): ln B = (BIC_one - BIC_two)/2. Two peaks are said only where the fit shows a trough as well.
 */
export function onePeakOrTwo(
  fits: Readonly<Record<LineShape, LineFit>>,
  v: readonly number[],
  weight: number,
): PeakJudgement {
  const bic = (fit: LineFit) => fit.chiSquared * weight + fit.parameterCount * Math.log(Math.max(2, v.length * weight));
  const one = bic(fits.flat) < bic(fits.gaussian) ? fits.flat : fits.gaussian;
  const lnBayesFactor = (bic(one) - bic(fits.busy)) / 2;
  const troughDepth = depthOf(v.map((at) => fits.busy.valueAt(at)));
  const isTwo = lnBayesFactor > STRONG && troughDepth > LEAST_DEPTH;
  const isOne = lnBayesFactor < -STRONG || (lnBayesFactor <= STRONG && troughDepth <= LEAST_DEPTH);
  return {
    peaks: isTwo ? 'two' : isOne ? 'one' : 'cannot tell',
    lnBayesFactor,
    troughDepth,
    adopted: lnBayesFactor > STRONG ? fits.busy : one,
  };
}

function depthOf(values: readonly number[]): number {
  const { low, high } = peaksOf(values);
  if (low === high) return 0;
  const lower = Math.min(values[low]!, values[high]!);
  return 1 - Math.min(...values.slice(low, high + 1)) / lower;
}
