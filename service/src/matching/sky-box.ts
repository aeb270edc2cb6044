import { DEGREE } from '@eremite/shared/science/constants';
import { HEAVY_CELL, slotAt } from './heavy-cells.ts';
import type { ZoneGrid } from './zone-grid.ts';
import { cellOf, zoneOf } from './zone-layout.ts';

/** Widening of every box, degrees: far above rounding (1e-13), far below any separation that costs time. */
const PAD_DEG = 1e-9;

/** The box of right ascension and declination round a circle, and the slots of a grid that may lie in it. */
export interface SkyBox {
  raDeg: number;
  decLowDeg: number;
  decHighDeg: number;
  /** half width in right ascension, degrees; Infinity for the whole circle */
  halfWidthDeg: number;
  /** pairs [from, to) of slots, `ranges` of them in use */
  slots: Uint32Array;
  ranges: number;
}

/** An empty box, made once and filled anew for each position by `findBox`. */
export const makeSkyBox = (): SkyBox => ({
  raDeg: 0,
  decLowDeg: 0,
  decHighDeg: 0,
  halfWidthDeg: 0,
  slots: new Uint32Array(64),
  ranges: 0,
});

/**
 * Half width in right ascension of a circle on the sky, degrees: asin(sin r / cos dec), or Infinity where the circle
 * reaches a pole. Padded by more than its rounding.
 */
export function halfWidthDeg(decDeg: number, radiusDeg: number): number {
  const reach = Math.abs(decDeg) + radiusDeg;
  // Close to the pole the arc sine grows without bound: there the whole circle is looked at.
  if (reach >= 90 - 1e-6) return Infinity;
  const sine = Math.sin(radiusDeg * DEGREE) / Math.cos(decDeg * DEGREE);
  if (!(sine < 1)) return Infinity;
  const width = Math.asin(sine) / DEGREE;
  return width * (1 + 1e-6) + PAD_DEG;
}

function addRange(box: SkyBox, from: number, to: number): void {
  if (from >= to) return;
  if (2 * box.ranges === box.slots.length) {
    const grown = new Uint32Array(2 * box.slots.length);
    grown.set(box.slots);
    box.slots = grown;
  }
  box.slots[2 * box.ranges] = from;
  box.slots[2 * box.ranges + 1] = to;
  box.ranges++;
}

/** Adds the slots of neighbouring cells: one range, but for heavy cells only the part between the declinations. */
function addCells(grid: ZoneGrid, box: SkyBox, first: number, last: number): void {
  const { starts } = grid;
  let from = starts[first]!;
  const end = starts[last + 1]!;
  if (end - from > HEAVY_CELL) {
    for (let cell = first; cell <= last; cell++) {
      const start = starts[cell]!;
      const stop = starts[cell + 1]!;
      if (stop - start <= HEAVY_CELL) continue;
      addRange(box, from, start);
      const low = slotAt(grid, start, stop, box.decLowDeg, false);
      addRange(box, low, slotAt(grid, low, stop, box.decHighDeg, true));
      from = stop;
    }
  }
  addRange(box, from, end);
}

/**
 * Fills a box with the slots that may lie within a radius of a position: no such row is left out, more may be in it.
 *
 * @param raDeg in [0, 360)
 * @param decDeg in [-90, 90]
 * @param radiusDeg in [0, 180]
 */
export function findBox(grid: ZoneGrid, box: SkyBox, raDeg: number, decDeg: number, radiusDeg: number): void {
  const { layout } = grid;
  const width = halfWidthDeg(decDeg, radiusDeg);
  box.raDeg = raDeg;
  box.halfWidthDeg = width;
  box.decLowDeg = decDeg - radiusDeg * (1 + 1e-12) - PAD_DEG;
  box.decHighDeg = decDeg + radiusDeg * (1 + 1e-12) + PAD_DEG;
  box.ranges = 0;
  if (grid.rows === 0) return;
  const lastZone = zoneOf(layout, box.decHighDeg);
  for (let zone = zoneOf(layout, box.decLowDeg); zone <= lastZone; zone++) {
    const first = layout.cellsBefore[zone]!;
    const last = layout.cellsBefore[zone + 1]! - 1;
    const low = raDeg - width;
    const high = raDeg + width;
    if (width >= 180) {
      addCells(grid, box, first, last);
      continue;
    }
    // A box across right ascension 0 has two pieces, which must not overlap or rows would be found twice.
    const from = cellOf(layout, zone, low < 0 ? low + 360 : low);
    const to = cellOf(layout, zone, high >= 360 ? high - 360 : high);
    if (low >= 0 && high < 360) addCells(grid, box, from, to);
    else if (from <= to) addCells(grid, box, first, last);
    else {
      addCells(grid, box, first, to);
      addCells(grid, box, from, last);
    }
  }
}
