import { assertOrder, cellCentre, cellRadius } from './healpix.ts';

/** What is known of a cell and a region: wholly inside, wholly outside, or not decided at this order. */
export type Placement = 'inside' | 'outside' | 'undecided';

/**
 * Cells of a region, found by descending from the twelve base cells.
 *
 * @param order order of the cells returned, 0..24
 * @param place placement of a cell given its centre (radians) and a radius (radians) that holds the whole cell
 * @param keep whether a cell of the final order that stays undecided belongs to the result
 * @returns sorted, disjoint, non-touching ranges [start, end) of nested indices at `order`, flat in pairs
 * @throws {DomainError} for an order out of range
 */
export function descend(
  order: number,
  place: (lon: number, lat: number, radius: number) => Placement,
  keep: (lon: number, lat: number) => boolean,
): number[] {
  assertOrder('descend', order);
  const ranges: number[] = [];
  const push = (start: number, end: number): void => {
    if (ranges.length > 0 && ranges.at(-1) === start) ranges[ranges.length - 1] = end;
    else ranges.push(start, end);
  };
  const radii = Array.from({ length: order + 1 }, (_, o) => cellRadius(o));
  const visit = (at: number, cell: number): void => {
    const { lon, lat } = cellCentre(at, cell);
    const placement = place(lon, lat, radii[at]!);
    if (placement === 'outside') return;
    if (placement === 'inside' || at === order) {
      const width = 4 ** (order - at);
      if (placement === 'inside' || keep(lon, lat)) push(cell * width, (cell + 1) * width);
      return;
    }
    for (let child = 0; child < 4; child++) visit(at + 1, 4 * cell + child);
  };
  for (let base = 0; base < 12; base++) visit(0, base);
  return ranges;
}
