import { canonicalJson } from '../canonical-json.ts';
import type { ResultLine } from './manifest.ts';

/** What differs between a frozen verdict and the one that came out now, in words; null where nothing does. */
export function differenceOf(before: ResultLine | null, now: ResultLine): string | null {
  if (!before) return 'is a new detection';
  if (before.catalogueId !== now.catalogueId || before.row !== now.row) {
    return `row ${now.row} stands where row ${before.row} stood`;
  }
  const parts = changedKeys(before.item, now.item).map(
    (key) => `${key} ${shown(before.item[key])} → ${shown(now.item[key])}`,
  );
  if (before.candidatesSha256 !== now.candidatesSha256) parts.push('its candidates');
  if (before.neighboursSha256 !== now.neighboursSha256) parts.push('its neighbours');
  const behind = changedKeys(before.detail, now.detail);
  if (behind.length > 0) parts.push(`what stands behind it (${behind.join(', ')})`);
  return parts.length === 0 ? null : parts.join('; ');
}

function shown(value: unknown): string {
  const text = canonicalJson(value);
  return text.length > 80 ? `${text.slice(0, 77)}…` : text;
}

function changedKeys(before: Record<string, unknown>, now: Record<string, unknown>): string[] {
  const keys = new Set([...Object.keys(before), ...Object.keys(now)]);
  return [...keys].filter((key) => canonicalJson(before[key]) !== canonicalJson(now[key]));
}
