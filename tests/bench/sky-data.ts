import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { cellOf } from '@eremite/shared/science/sky/healpix';
import { seeded } from '@eremite/service/matching/testing/brute-force.ts';

const DEGREE = Math.PI / 180;
export type Shared = Float64Array<SharedArrayBuffer>;

/** So many numbers in memory that threads share. */
export const shared = (count: number): Shared => new Float64Array(new SharedArrayBuffer(8 * count));

/** Points spread evenly north of a declination, in no order. */
export function sky(count: number, seed: number, decLowDeg = -90): { raDeg: Shared; decDeg: Shared } {
  const random = seeded(seed);
  const raDeg = shared(count);
  const decDeg = shared(count);
  const low = Math.sin(decLowDeg * DEGREE);
  for (let i = 0; i < count; i++) {
    raDeg[i] = 360 * random();
    decDeg[i] = Math.asin(low + (1 - low) * random()) / DEGREE;
  }
  return { raDeg, decDeg };
}

/** The same points in the order in which tiles hold them: by HEALPix cell of order 6. */
export function inTileOrder({ raDeg, decDeg }: { raDeg: Shared; decDeg: Shared }): { raDeg: Shared; decDeg: Shared } {
  const count = raDeg.length;
  const keys = Float64Array.from(raDeg, (ra, i) => cellOf(6, ra * DEGREE, decDeg[i]! * DEGREE) * count + i).sort();
  const sorted = { raDeg: shared(count), decDeg: shared(count) };
  for (let i = 0; i < count; i++) {
    sorted.raDeg[i] = raDeg[keys[i]! % count]!;
    sorted.decDeg[i] = decDeg[keys[i]! % count]!;
  }
  return sorted;
}

/** Writes columns for the other program, one file each. */
export function writeColumns(folder: string, columns: Record<string, Shared>): void {
  for (const [name, values] of Object.entries(columns)) {
    writeFileSync(join(folder, `${name}.f64`), new Uint8Array(values.buffer));
  }
}
