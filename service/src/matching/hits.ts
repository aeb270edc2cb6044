import type { ZoneGrid } from './zone-grid.ts';

/** What a search has found so far, in the order found: query index, grid slot and separation of each hit. */
export class Hits {
  count = 0;
  query = new Uint32Array(1024);
  slot = new Uint32Array(1024);
  separationArcsec = new Float64Array(1024);

  add(query: number, slot: number, separationArcsec: number): void {
    if (this.count === this.query.length) this.grow();
    this.query[this.count] = query;
    this.slot[this.count] = slot;
    this.separationArcsec[this.count] = separationArcsec;
    this.count++;
  }

  private grow(): void {
    const enlarge = <T extends Uint32Array | Float64Array>(old: T): T => {
      const grown = new (old.constructor as new (length: number) => T)(2 * old.length);
      grown.set(old);
      return grown;
    };
    this.query = enlarge(this.query);
    this.slot = enlarge(this.slot);
    this.separationArcsec = enlarge(this.separationArcsec);
  }
}

/** Above this many hits of one query the order is found by a general sort instead of by insertion. */
const FEW = 24;

/**
 * Order of the hits by query, then separation, then row of the input.
 *
 * @param from queries are numbered from this
 * @param to up to, not including, this
 * @returns a permutation: place in the order -> index into the hits
 */
export function orderHits(hits: Hits, grid: ZoneGrid, from: number, to: number): Uint32Array {
  const { count, query, slot, separationArcsec } = hits;
  const { row } = grid;
  const ends = new Uint32Array(to - from + 1);
  for (let i = 0; i < count; i++) ends[query[i]! - from + 1]!++;
  for (let q = 1; q < ends.length; q++) ends[q]! += ends[q - 1]!;
  const order = new Uint32Array(count);
  const next = ends.slice();
  for (let i = 0; i < count; i++) order[next[query[i]! - from]!++] = i;
  const compare = (a: number, b: number): number =>
    separationArcsec[a]! - separationArcsec[b]! || row[slot[a]!]! - row[slot[b]!]!;
  for (let q = 0; q < to - from; q++) {
    const start = ends[q]!;
    const end = ends[q + 1]!;
    if (end - start > FEW) {
      order.subarray(start, end).sort(compare);
      continue;
    }
    for (let i = start + 1; i < end; i++) {
      const hit = order[i]!;
      let j = i;
      for (; j > start && compare(order[j - 1]!, hit) > 0; j--) order[j] = order[j - 1]!;
      order[j] = hit;
    }
  }
  return order;
}
