/** Where a line crosses a fraction of its peaks, km/s; the middle and the width follow. */
export interface LineWidth {
  readonly lowKms: number;
  readonly highKms: number;
}

/** Highest points of the lower and the upper half of a line; one and the same where there is a single peak. */
export interface Peaks {
  readonly low: number;
  readonly high: number;
}

/**
 * Width of a line at a fraction of its peaks, the flank on each side measured against the peak on its own side.
 *
 * @param v velocities, km/s, ascending
 * @param flux values in any unit
 * @param fraction 0.5 for W50, 0.2 for W20
 * @param peaks indices of the peak of the lower and of the upper side
 * @returns the crossings, interpolated linearly and sought from the peaks outwards; undefined where the values end
 * before the flank does, or a peak is not positive
 *
 * Source: common practice for single-dish HI lines (Springob et al. 2005, ApJS 160, 149, section 3).
 */
export function lineWidth(
  v: ArrayLike<number>,
  flux: ArrayLike<number>,
  fraction: number,
  peaks: Peaks,
): LineWidth | undefined {
  const crossing = (from: number, by: 1 | -1): number | undefined => {
    const level = fraction * flux[from]!;
    if (!(level > 0)) return undefined;
    for (let i = from; i + by >= 0 && i + by < v.length; i += by) {
      const [here, next] = [flux[i]!, flux[i + by]!];
      if (next <= level) return v[i]! + ((here - level) / (here - next)) * (v[i + by]! - v[i]!);
    }
    return undefined;
  };
  const low = crossing(peaks.low, -1);
  const high = crossing(peaks.high, 1);
  return low === undefined || high === undefined ? undefined : { lowKms: low, highKms: high };
}

/** A lower maximum than this part of the highest is a ripple of the fit, not a peak. Choice. */
const LEAST_PEAK = 0.25;

/**
 * The peaks of a smooth line: its two highest maxima, or its only one.
 *
 * @param flux values without noise, such as those of a fit
 */
export function peaksOf(flux: ArrayLike<number>): Peaks {
  const maxima: number[] = [];
  for (let i = 0; i < flux.length; i++) {
    const before = i === 0 ? -Infinity : flux[i - 1]!;
    const after = i === flux.length - 1 ? -Infinity : flux[i + 1]!;
    if (flux[i]! > before && flux[i]! >= after && flux[i]! > 0) maxima.push(i);
  }
  const [first = 0, ...others] = maxima.sort((a, b) => flux[b]! - flux[a]!);
  const second = others[0] !== undefined && flux[others[0]]! > LEAST_PEAK * flux[first]! ? others[0] : first;
  return { low: Math.min(first, second), high: Math.max(first, second) };
}
