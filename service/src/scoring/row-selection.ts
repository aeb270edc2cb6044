import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import type { CatalogueKind } from '@eremite/shared/contracts/words';
import { FAINTEST_MASKED_G } from '@eremite/shared/science/photometry/star-mask';
import { wrapRaDeg } from '../matching/sky-position.ts';
import { sharedMemory } from '../matching/memory.ts';
import { halfWidthDeg } from '../matching/sky-box.ts';
import { cellOf, layoutZones, type ZoneLayout, zoneOf } from '../matching/zone-layout.ts';
import { numberRole, type RoleTable } from '../tiles/role-table.ts';
import { controlCandidates } from './control-run.ts';
import { Detections } from './detections.ts';
import type { EngineInput } from './engine-input.ts';

/** Parts of the sky in which a row can matter to a detection of a run, as cells of a layout; shared between threads. */
export interface RowSelection {
  layout: ZoneLayout;
  /** A bit a cell. */
  marked: Uint8Array;
}

/** Rows are looked at up to so many search radii or beams from a detection: as far as any step of the scoring looks. */
const REACH_RADII = 3;
const REACH_BEAMS = 2;
/** Beam taken where none is known, arcsec. */
const USUAL_BEAM_ARCSEC = 60;
/** Galaxies at least so large are looked at wherever they are: they hide others, or spoil an isolation; half-light arcsec. */
const LARGE_ARCSEC = 2.5;
/** Least width of a cell, degrees: finer ones cost memory and save few rows. */
const LEAST_CELL_DEG = 0.05;
const MOST_CELL_DEG = 2;

/**
 * Marks the cells about all detections and about all places to which the control may move them.
 *
 * @param input tables of detections; others are not looked at
 */
export function selectionOf(input: EngineInput): RowSelection {
  const detections = new Detections(input);
  const all = detections.range(0, detections.length);
  const { offsetsPerSource } = input.criteria.control;
  const circles = [
    ...all.map(({ raDeg, decDeg, searchArcsec, beam }) => ({
      raDeg,
      decDeg,
      radiusDeg: Math.min(
        180,
        Math.max(REACH_RADII * searchArcsec, REACH_BEAMS * (beam?.major ?? USUAL_BEAM_ARCSEC)) / 3600,
      ),
    })),
    ...controlCandidates(detections, offsetsPerSource, input.criteria.robustness.seed).map(
      ({ source, raDeg, decDeg }) => ({ raDeg, decDeg, radiusDeg: Math.min(180, source.searchArcsec / 3600) }),
    ),
  ];
  const low = circles.reduce((least, { decDeg, radiusDeg }) => Math.min(least, decDeg - radiusDeg), 90);
  const high = circles.reduce((most, { decDeg, radiusDeg }) => Math.max(most, decDeg + radiusDeg), -90);
  const [decMin, decMax] = [Math.max(-90, low), Math.min(90, Math.max(low, high))];
  const radii = Float64Array.from(all, ({ searchArcsec }) => searchArcsec * ARCSECOND).sort();
  const side = Math.min(MOST_CELL_DEG, Math.max(LEAST_CELL_DEG, (radii[radii.length >> 1] ?? 0) / DEGREE));
  const area = (360 * (Math.sin(decMax * DEGREE) - Math.sin(decMin * DEGREE))) / DEGREE;
  const layout = layoutZones(Math.ceil((4 * area) / side ** 2) + 1, decMin, decMax);
  const marked = new Uint8Array(sharedMemory((layout.cellsBefore[layout.zones]! >> 3) + 1));
  for (const { raDeg, decDeg, radiusDeg } of circles) mark(layout, marked, wrapRaDeg(raDeg), decDeg, radiusDeg);
  return { layout, marked };
}

function mark(layout: ZoneLayout, marked: Uint8Array, raDeg: number, decDeg: number, radiusDeg: number): void {
  const width = halfWidthDeg(decDeg, radiusDeg);
  const set = (from: number, to: number) => {
    for (let cell = from; cell <= to; cell++) marked[cell >> 3]! |= 1 << (cell & 7);
  };
  // A little wider than the circle, against rounding.
  const reach = radiusDeg * (1 + 1e-9) + 1e-9;
  const lastZone = zoneOf(layout, decDeg + reach);
  for (let zone = zoneOf(layout, decDeg - reach); zone <= lastZone; zone++) {
    const first = layout.cellsBefore[zone]!;
    const last = layout.cellsBefore[zone + 1]! - 1;
    if (width >= 180) set(first, last);
    else {
      const from = cellOf(layout, zone, wrapRaDeg(raDeg - width));
      const to = cellOf(layout, zone, wrapRaDeg(raDeg + width));
      if (from <= to && raDeg - width >= 0 && raDeg + width < 360) set(from, to);
      else {
        set(first, to);
        set(from, last);
      }
    }
  }
}

/**
 * Rows of a table, or of a part of one, that any step of a run can look at: those near a detection, those with a velocity
 * wherever they are (neighbours lie degrees away), and what hides others, the bright stars and the large galaxies.
 *
 * @returns ascending indices; undefined for all
 */
export function keptRows(
  kind: CatalogueKind,
  roles: RoleTable,
  { layout, marked }: RowSelection,
): Uint32Array | undefined {
  if (kind === 'hi' || kind === 'groups') return undefined;
  const { raDeg, decDeg } = roles.columns;
  const kept = new Uint32Array(roles.rows);
  let count = 0;
  if (kind === 'stars') {
    const magnitudes = Object.keys(roles.columns).flatMap((name) =>
      name.startsWith('mag:') ? [roles.columns[name] as Float64Array] : [],
    );
    for (let i = 0; i < roles.rows; i++) {
      if (magnitudes.some((magnitude) => magnitude[i]! < FAINTEST_MASKED_G)) kept[count++] = i;
    }
    return kept.subarray(0, count);
  }
  const czKms = numberRole(roles, 'czKms');
  const radius = numberRole(roles, 'effectiveRadiusArcsec');
  for (let i = 0; i < roles.rows; i++) {
    const dec = decDeg[i]!;
    const cell = cellOf(layout, zoneOf(layout, dec), wrapRaDeg(raDeg[i]!));
    const near = (marked[cell >> 3]! >> (cell & 7)) & 1;
    if (near === 1 || (czKms && Number.isFinite(czKms[i]!)) || (radius && radius[i]! >= LARGE_ARCSEC))
      kept[count++] = i;
  }
  return kept.subarray(0, count);
}
