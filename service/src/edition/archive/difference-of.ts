import { canonicalJson } from '../canonical-json.ts';
import type { ResultLine } from './manifest.ts';

/** What differs between a frozen verdict and the one that came out now, in words; null where nothing does. */
export function differenceOf(before: ResultLine | null, now: ResultLine): string | null {
  if (!before) return 'is a new detection';
  if (before.catalogueId !== now.catalogueId || before.row !== now.row) {
    return `row ${now.row} stands where row ${before.row} stood`;
  }
  const keys = new Set([...Object.keys(before.item), ...Object.keys(now.item)]);
  const parts = [...keys]
    .filter((key) => canonicalJson(before.item[key]) !== canonicalJson(now.item[key]))
    .map((key) => `${key} ${shown(before.item[key])} → ${shown(now.item[key])}`);
  if (before.candidatesSha256 !== now.candidatesSha256) parts.push('its candidates');
  if (before.neighboursSha256 !== now.neighboursSha256) parts.push('its neighbours');
  if (before.detailSha256 !== now.detailSha256) parts.push('what stands behind it');
  return parts.length === 0 ? null : parts.join('; ');
}

function shown(value: unknown): string {
  const text = canonicalJson(value);
  return text.length > 80 ? `${text.slice(0, 77)}…` : text;
}
