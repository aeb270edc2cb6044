import { DEGREE } from '@eremite/shared/science/constants';
import { separation } from '@eremite/shared/science/sky/separation';
import type { PackedColumns } from '../tiles/column-pack.ts';

/** Within this an object of two parts is one, arcsec: below what any optical survey tells apart. Common practice. */
export const DEFAULT_OVERLAP_ARCSEC = 0.5;

const NONE = -1;

/**
 * Finds the rows of later parts of a catalogue that an earlier part has too. Rows are taken in file order, once; of each
 * object the first part's rows stay. Two rows of one part are never the same object.
 *
 * Positions hang in lists by cells of the radius's size, in arrays that grow: 28 bytes a row.
 */
export class PartOverlaps {
  private count = 0;
  private ra = new Float64Array(1024);
  private dec = new Float64Array(1024);
  private row = new Uint32Array(1024);
  private part = new Uint16Array(1024);
  private next = new Int32Array(1024);
  private heads = new Int32Array(2048).fill(NONE);
  private readonly radius: number;

  /** @param radiusArcsec rows of different parts nearer than this are one object; above 0 */
  constructor(radiusArcsec: number) {
    this.radius = radiusArcsec / 3600;
  }

  /**
   * Rows of a chunk of one part that an earlier part has: place in the chunk and row number of the row that stays.
   *
   * @param roles columns `row`, `raDeg` and `decDeg`
   * @param part number of the part; parts come in order
   */
  take({ rows, columns }: PackedColumns, part: number): Map<number, number> {
    const [ra, dec] = [columns['raDeg'] as Float64Array, columns['decDeg'] as Float64Array];
    const numbers = columns['row'] as Uint32Array;
    const found = new Map<number, number>();
    for (let i = 0; i < rows; i++) {
      const same = part === 0 ? NONE : this.earlier(ra[i]!, dec[i]!, part);
      if (same !== NONE) found.set(i, this.row[same]!);
      else this.add(ra[i]!, dec[i]!, numbers[i]!, part);
    }
    return found;
  }

  private earlier(ra: number, dec: number, part: number): number {
    let best = NONE;
    let least = this.radius * DEGREE;
    for (let zone = this.zone(dec - this.radius); zone <= this.zone(dec + this.radius); zone++) {
      const cells = this.cellsIn(zone);
      // The reach in right ascension, at the end of the zone nearer to the pole.
      const cosine = this.leastCosine(zone);
      const reach = cosine * 180 > this.radius ? this.radius / cosine : 180;
      const from = Math.floor(((ra - reach) / 360) * cells);
      const to = Math.min(Math.floor(((ra + reach) / 360) * cells), from + cells - 1);
      for (let cell = from; cell <= to; cell++) {
        const wrapped = ((cell % cells) + cells) % cells;
        for (let at = this.heads[this.bucket(zone, wrapped)]!; at !== NONE; at = this.next[at]!) {
          if (this.part[at] === part || Math.abs(this.dec[at]! - dec) > this.radius) continue;
          const apart = separation(ra * DEGREE, dec * DEGREE, this.ra[at]! * DEGREE, this.dec[at]! * DEGREE);
          // Of several as near the first in the file stays.
          if (apart < least || (apart === least && (best === NONE || at < best))) [best, least] = [at, apart];
        }
      }
    }
    return best;
  }

  private add(ra: number, dec: number, row: number, part: number): void {
    if (this.count === this.ra.length) this.grow();
    const at = this.count++;
    this.ra[at] = ra;
    this.dec[at] = dec;
    this.row[at] = row;
    this.part[at] = part;
    this.hang(at);
  }

  private hang(at: number): void {
    const zone = this.zone(this.dec[at]!);
    const cells = this.cellsIn(zone);
    const cell = Math.min(cells - 1, Math.floor((this.ra[at]! / 360) * cells));
    const bucket = this.bucket(zone, cell);
    this.next[at] = this.heads[bucket]!;
    this.heads[bucket] = at;
  }

  private grow(): void {
    const room = this.count * 2;
    const wider = <T extends Float64Array | Uint32Array | Uint16Array>(old: T, to: T): T => (to.set(old), to);
    this.ra = wider(this.ra, new Float64Array(room));
    this.dec = wider(this.dec, new Float64Array(room));
    this.row = wider(this.row, new Uint32Array(room));
    this.part = wider(this.part, new Uint16Array(room));
    this.next = new Int32Array(room);
    this.heads = new Int32Array(room * 2).fill(NONE);
    for (let at = 0; at < this.count; at++) this.hang(at);
  }

  private zone = (dec: number): number => Math.floor((Math.max(-90, Math.min(90, dec)) + 90) / this.radius);

  /** Cells of a zone: none narrower than the radius. */
  private cellsIn(zone: number): number {
    return Math.max(1, Math.floor((360 * this.leastCosine(zone)) / this.radius));
  }

  private leastCosine(zone: number): number {
    const low = zone * this.radius - 90;
    return Math.max(0, Math.cos(Math.min(90, Math.max(Math.abs(low), Math.abs(low + this.radius))) * DEGREE));
  }

  private bucket(zone: number, cell: number): number {
    const mixed = Math.imul(zone, 0x9e3779b1) ^ Math.imul(cell, 0x85ebca6b);
    return (mixed >>> 0) % this.heads.length;
  }
}
