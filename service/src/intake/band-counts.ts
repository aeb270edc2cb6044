import type { BandCounts } from '@eremite/shared/contracts/band-counts';
import type { CatalogueFacts } from './catalogue-facts.ts';
import type { ResolvedBand } from './resolved.ts';
import { turnoverDepth } from './turnover-depth.ts';

/** Counts of magnitudes by band, with what they suggest as its depth; bands without a magnitude are left out. */
export function bandCountsOf(bands: readonly ResolvedBand[], { magnitudes }: Pick<CatalogueFacts, 'magnitudes'>) {
  return bands.flatMap(({ name, system, depth5Sigma }): BandCounts[] => {
    const found = magnitudes[name];
    if (!found || found.count === 0) return [];
    const { count, limits, min: brightest, max: faintest, histogram } = found;
    const suggestedDepth = turnoverDepth(histogram) ?? null;
    return [{ band: name, system, depth5Sigma, suggestedDepth, count, limits, brightest, faintest, ...histogram }];
  });
}
