/**
 * Sets of integers held as sorted, disjoint, non-touching ranges [start, end), flat in pairs. Exact below 2^53.
 */
export type Ranges = Float64Array;

/** Ranges in normal form from any list of ranges; empty ones vanish, touching and overlapping ones join. */
export function normalRanges(flat: ArrayLike<number>): Ranges {
  const order = Array.from({ length: flat.length / 2 }, (_, i) => i).sort((a, b) => flat[2 * a]! - flat[2 * b]!);
  const joined: number[] = [];
  for (const i of order) {
    const start = flat[2 * i]!;
    const end = flat[2 * i + 1]!;
    if (end <= start) continue;
    if (joined.length > 0 && start <= joined.at(-1)!) joined[joined.length - 1] = Math.max(joined.at(-1)!, end);
    else joined.push(start, end);
  }
  return Float64Array.from(joined);
}

/** Numbers in either set. */
export function uniteRanges(a: Ranges, b: Ranges): Ranges {
  const both = new Float64Array(a.length + b.length);
  both.set(a);
  both.set(b, a.length);
  return normalRanges(both);
}

/** Numbers in both sets. */
export function intersectRanges(a: Ranges, b: Ranges): Ranges {
  const common: number[] = [];
  for (let i = 0, j = 0; i < a.length && j < b.length;) {
    const start = Math.max(a[i]!, b[j]!);
    const end = Math.min(a[i + 1]!, b[j + 1]!);
    if (start < end) common.push(start, end);
    if (a[i + 1]! < b[j + 1]!) i += 2;
    else j += 2;
  }
  return Float64Array.from(common);
}

/** Count of numbers in the set. */
export function rangesSize(ranges: Ranges): number {
  let size = 0;
  for (let i = 0; i < ranges.length; i += 2) size += ranges[i + 1]! - ranges[i]!;
  return size;
}

/** Whether [start, end) lies wholly in the set, partly, or not at all. */
export function rangesHold(ranges: Ranges, start: number, end: number): 'all' | 'some' | 'none' {
  let low = 0;
  let high = ranges.length / 2;
  // The first range that ends after `start`.
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (ranges[2 * middle + 1]! <= start) low = middle + 1;
    else high = middle;
  }
  if (2 * low >= ranges.length || ranges[2 * low]! >= end) return 'none';
  return ranges[2 * low]! <= start && ranges[2 * low + 1]! >= end ? 'all' : 'some';
}
