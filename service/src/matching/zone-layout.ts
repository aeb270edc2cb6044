import { DEGREE } from '@eremite/shared/science/constants';

/** How the sky is cut: zones of equal height in declination, each into equal cells of right ascension from 0 to 360. */
export interface ZoneLayout {
  /** lowest declination, degrees */
  decFloorDeg: number;
  /** zones a degree of declination; 0 if there is one zone only */
  zonesPerDeg: number;
  zones: number;
  /** cells of all zones before a zone; zones + 1 entries, the last being the number of cells */
  cellsBefore: Uint32Array;
}

/** Rows a cell should hold: fewer cost memory for empty cells, more cost distances. Flat between 2 and 8. */
const ROWS_PER_CELL = 4;

/**
 * Chooses nearly square cells for so many rows between two declinations.
 *
 * The number of cells is bounded by the rows, not by the density, so a catalogue crowded into a small field gets fuller
 * cells rather than a larger grid.
 */
export function layoutZones(rows: number, decMinDeg: number, decMaxDeg: number): ZoneLayout {
  const target = Math.max(1, Math.ceil(rows / ROWS_PER_CELL));
  const height = Math.max(0, decMaxDeg - decMinDeg);
  if (rows === 0) return { decFloorDeg: 0, zonesPerDeg: 0, zones: 1, cellsBefore: Uint32Array.of(0, 1) };
  const area = (360 * (Math.sin(decMaxDeg * DEGREE) - Math.sin(decMinDeg * DEGREE))) / DEGREE;
  const side = Math.max(Math.sqrt(Math.max(0, area) / target), 360 / target, 1e-9);
  const zones = Math.max(1, Math.min(Math.ceil(height / side), target));
  const cellsBefore = new Uint32Array(zones + 1);
  for (let zone = 0; zone < zones; zone++) {
    const low = decMinDeg + (height * zone) / zones;
    const high = decMinDeg + (height * (zone + 1)) / zones;
    const widest = low <= 0 && high >= 0 ? 1 : Math.cos(Math.min(Math.abs(low), Math.abs(high)) * DEGREE);
    cellsBefore[zone + 1] = cellsBefore[zone]! + Math.max(1, Math.floor((360 * widest) / side));
  }
  return { decFloorDeg: decMinDeg, zonesPerDeg: height > 0 ? zones / height : 0, zones, cellsBefore };
}

/** Zone of a declination, clamped to the layout. Never decreases with declination, whatever the rounding. */
export function zoneOf(layout: ZoneLayout, decDeg: number): number {
  const zone = Math.floor((decDeg - layout.decFloorDeg) * layout.zonesPerDeg);
  return zone < 0 ? 0 : zone < layout.zones ? zone : layout.zones - 1;
}

/** Cell of a right ascension in [0, 360) within a zone. Never decreases with right ascension. */
export function cellOf(layout: ZoneLayout, zone: number, raDeg: number): number {
  const first = layout.cellsBefore[zone]!;
  const cells = layout.cellsBefore[zone + 1]! - first;
  const cell = Math.floor(raDeg * (cells / 360));
  return first + (cell < cells ? cell : cells - 1);
}
