import type { PackedColumns } from '../tiles/column-pack.ts';

/** Counts and spans of a catalogue, gathered chunk by chunk. */
export interface CatalogueFacts {
  rows: number;
  withVelocity: number;
  withDistance: number;
  magnitudes: Record<string, { count: number; limits: number; min: number; max: number; histogram: Histogram }>;
}
/** Counts in half-magnitude bins from `start`; bins without end are cut at the span seen. */
export interface Histogram {
  start: number;
  step: number;
  counts: number[];
}

const FIRST_MAG = -3;
const STEP_MAG = 0.25;
const BINS = 172;

/** Gathers the facts. Magnitudes that are limits count apart and stay out of the histogram. */
export class FactsGatherer {
  private rows = 0;
  private withVelocity = 0;
  private withDistance = 0;
  private readonly bands = new Map<
    string,
    { count: number; limits: number; min: number; max: number; bins: Float64Array }
  >();

  add({ rows, columns }: PackedColumns): void {
    this.rows += rows;
    this.withVelocity += known(columns['czKms'] as Float64Array | undefined);
    this.withDistance += known(columns['distanceMpc'] as Float64Array | undefined);
    for (const [name, column] of Object.entries(columns)) {
      if (name.startsWith('mag:'))
        this.addBand(
          name.slice(4),
          column as Float64Array,
          columns[`magLimit:${name.slice(4)}`] as Uint8Array | undefined,
        );
    }
  }

  private addBand(band: string, values: Float64Array, limits: Uint8Array | undefined): void {
    let seen = this.bands.get(band);
    if (!seen)
      this.bands.set(
        band,
        (seen = { count: 0, limits: 0, min: Infinity, max: -Infinity, bins: new Float64Array(BINS) }),
      );
    for (let i = 0; i < values.length; i++) {
      const value = values[i]!;
      if (Number.isNaN(value)) continue;
      if (limits && limits[i] !== 0) {
        seen.limits++;
        continue;
      }
      seen.count++;
      if (value < seen.min) seen.min = value;
      if (value > seen.max) seen.max = value;
      const bin = Math.min(BINS - 1, Math.max(0, Math.floor((value - FIRST_MAG) / STEP_MAG)));
      seen.bins[bin] = seen.bins[bin]! + 1;
    }
  }

  facts(): CatalogueFacts {
    const magnitudes: CatalogueFacts['magnitudes'] = {};
    for (const [band, { count, limits, min, max, bins }] of this.bands) {
      const from = bins.findIndex((n) => n > 0);
      const to = bins.findLastIndex((n) => n > 0);
      const histogram =
        from < 0
          ? { start: 0, step: STEP_MAG, counts: [] }
          : { start: FIRST_MAG + from * STEP_MAG, step: STEP_MAG, counts: Array.from(bins.subarray(from, to + 1)) };
      magnitudes[band] = { count, limits, min, max, histogram };
    }
    return { rows: this.rows, withVelocity: this.withVelocity, withDistance: this.withDistance, magnitudes };
  }
}

function known(values: Float64Array | undefined): number {
  let count = 0;
  if (values) for (let i = 0; i < values.length; i++) if (!Number.isNaN(values[i]!)) count++;
  return count;
}
