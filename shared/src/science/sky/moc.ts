import { DomainError } from '../domain-error.ts';
import { capPoints } from './cap-points.ts';
import { assertOrder, cellCount, cellOf, cellSide, FINEST_NUMBER_ORDER, FINEST_ORDER } from './healpix.ts';
import { coneRanges } from './healpix-cone.ts';
import { type ListedOrder, readMocAscii, readMocJson, writeMocAscii } from './moc-text.ts';
import { intersectRanges, normalRanges, type Ranges, rangesHold, rangesSize, uniteRanges } from './ranges.ts';
import { fromUniq, toUniq } from './uniq.ts';

/**
 * A region of the sky as a set of nested HEALPix cells in ICRS (an IVOA MOC of the space kind).
 *
 * Cells are kept as ranges at the region's own order, at most 24 (cells of 12.6 mas), where indices are exact
 * numbers. A finer MOC is rounded outward to order 24 when read; {@link declaredOrder} remembers its order.
 * Source: IVOA MOC 2.0.
 */
export class Moc {
  /** Order of {@link ranges}: the finest cells the region is made of. */
  readonly order: number;
  /** Sorted, disjoint ranges [start, end) of nested indices at {@link order}. Do not write to it. */
  readonly ranges: Ranges;
  /** Order the region was declared with; above {@link order} only where it exceeded 24. */
  readonly declaredOrder: number;

  private constructor(order: number, ranges: Ranges, declaredOrder = order) {
    this.order = order;
    this.ranges = ranges;
    this.declaredOrder = declaredOrder;
  }

  /**
   * Region of ranges [start, end) of nested indices at one order, in any sequence, flat in pairs.
   * @throws {DomainError} for an order or an index out of range
   */
  static fromRanges(order: number, flat: ArrayLike<number>): Moc {
    assertOrder('Moc', order);
    for (let i = 0; i < flat.length; i++) {
      const edge = flat[i]!;
      if (!Number.isInteger(edge) || edge < 0 || edge > cellCount(order)) {
        throw new DomainError(`Moc: order ${order} has cells 0 to ${cellCount(order) - 1}, got ${edge}`);
      }
    }
    return new Moc(order, normalRanges(flat));
  }

  /** Region of single cells of one order, in any sequence. @throws {DomainError} for a cell out of range */
  static fromCells(order: number, cells: Iterable<number>): Moc {
    return Moc.fromRanges(
      order,
      [...cells].flatMap((cell) => [cell, cell + 1]),
    );
  }

  /** The whole sky. */
  static allSky(): Moc {
    return new Moc(0, Float64Array.of(0, 12));
  }

  /** Region covering a cone: its cells hold every point of it. Radians. */
  static fromCone(order: number, lon: number, lat: number, radius: number): Moc {
    return Moc.fromRanges(order, coneRanges(order, lon, lat, radius));
  }

  /** Region from NUNIQ numbers, uniq = 4 · 4^order + index. @throws {DomainError} for a number below 4 or too large */
  static fromUniq(uniq: Iterable<bigint>, order?: number): Moc {
    const listed = [...uniq].map((u): ListedOrder => {
      const { order: at, cell } = fromUniq(u);
      return { order: at, ranges: [[cell, cell]] };
    });
    return Moc.fromListed(order === undefined ? listed : [...listed, { order, ranges: [] }]);
  }

  /** Region from ranges [start, end) at order 29 (FITS `RANGE`), flat in pairs; `order` is the declared order. */
  static fromRanges29(order: number, flat: ArrayLike<bigint>): Moc {
    assertOrder('Moc', order, FINEST_ORDER);
    const ranges: [bigint, bigint][] = [];
    for (let i = 0; i + 1 < flat.length; i += 2) {
      if (flat[i]! < 0n || flat[i + 1]! > 12n << 58n || flat[i + 1]! <= flat[i]!) {
        throw new DomainError(`Moc: the range ${flat[i]} to ${flat[i + 1]} is not one of order ${FINEST_ORDER}`);
      }
      ranges.push([flat[i]!, flat[i + 1]! - 1n]);
    }
    return Moc.fromListed([{ order: FINEST_ORDER, ranges }], order);
  }

  /** Reads the ASCII form. @throws {DomainError} that names the faulty piece */
  static parseAscii(text: string): Moc {
    return Moc.fromListed(readMocAscii(text));
  }

  /** Reads the JSON form. @throws {DomainError} that names the faulty piece */
  static parseJson(text: string): Moc {
    return Moc.fromListed(readMocJson(text));
  }

  /** Reads either text form, told apart by the opening bracket. @throws {DomainError} that names the faulty piece */
  static parse(text: string): Moc {
    return /^\s*[{[]/.test(text) ? Moc.parseJson(text) : Moc.parseAscii(text);
  }

  private static fromListed(listed: readonly ListedOrder[], declared?: number): Moc {
    const declaredOrder = declared ?? listed.reduce((most, { order }) => Math.max(most, order), 0);
    const order = Math.min(declaredOrder, FINEST_NUMBER_ORDER);
    const flat: number[] = [];
    for (const { order: at, ranges } of listed) {
      for (const [first, last] of ranges) {
        if (at <= order) {
          const width = 4 ** (order - at);
          flat.push(Number(first) * width, (Number(last) + 1) * width);
        } else {
          const shift = BigInt(2 * (at - order));
          flat.push(Number(first >> shift), Number(last >> shift) + 1);
        }
      }
    }
    return new Moc(order, normalRanges(flat), declaredOrder);
  }

  /** Number of cells at {@link order}. */
  get size(): number {
    return rangesSize(this.ranges);
  }

  /** Fraction of the whole sky, 0..1. */
  get skyFraction(): number {
    return this.size / cellCount(this.order);
  }

  /** Solid angle, steradians. */
  get area(): number {
    return this.skyFraction * 4 * Math.PI;
  }

  get isEmpty(): boolean {
    return this.ranges.length === 0;
  }

  /** Whether a direction (radians, ICRS) lies in the region. @throws {DomainError} for a direction out of range */
  contains(lon: number, lat: number): boolean {
    const cell = cellOf(this.order, lon, lat);
    return rangesHold(this.ranges, cell, cell + 1) === 'all';
  }

  /**
   * Fraction of a cone inside the region.
   *
   * @param lon longitude of the axis, radians
   * @param lat latitude of the axis, radians
   * @param radius half angle of the cone, radians, in [0, π]
   * @param samples equal-area sample points, at least 1000 for a published figure; the same points each time
   * @returns fraction, 0..1; exactly 0 or 1 where cells prove it, else with a standard error below 0.5/√samples
   */
  coveredFraction(lon: number, lat: number, radius: number, samples = 1024): number {
    const outline = this.holdsCone(lon, lat, radius);
    if (outline !== 'some') return outline === 'all' ? 1 : 0;
    let inside = 0;
    const points = capPoints(lon, lat, radius, samples);
    for (let i = 0; i < samples; i++) if (this.contains(points[2 * i]!, points[2 * i + 1]!)) inside++;
    return inside / samples;
  }

  /**
   * Whether a cone lies wholly in the region or wholly outside; `some` where coarse cells cannot prove either. Radians.
   * @throws {DomainError} for arguments out of range
   */
  holdsCone(lon: number, lat: number, radius: number): 'all' | 'some' | 'none' {
    const wanted = Math.floor(Math.log2(1.02 / Math.max(radius / 3, cellSide(this.order))));
    const order = Math.min(this.order, Math.max(0, wanted));
    const width = 4 ** (this.order - order);
    const cone = coneRanges(order, lon, lat, radius);
    const holds = new Set<'all' | 'some' | 'none'>();
    for (let i = 0; i < cone.length; i += 2) holds.add(rangesHold(this.ranges, cone[i]! * width, cone[i + 1]! * width));
    const [only] = holds;
    return holds.size === 1 ? only! : 'some';
  }

  /** The region at a coarser order, rounded outward: a cell stays if any of it was in the region. */
  degraded(order: number): Moc {
    assertOrder('Moc', order);
    if (order >= this.order) return this;
    const width = 4 ** (this.order - order);
    const flat = this.ranges.map((edge, i) => (i % 2 === 0 ? Math.floor(edge / width) : Math.ceil(edge / width)));
    return new Moc(order, normalRanges(flat));
  }

  private refined(order: number): Ranges {
    const width = 4 ** (order - this.order);
    return this.ranges.map((edge) => edge * width);
  }

  /** Places in either region; exact, at the finer of the two orders. */
  union(other: Moc): Moc {
    const order = Math.max(this.order, other.order);
    return new Moc(order, uniteRanges(this.refined(order), other.refined(order)));
  }

  /** Places in both regions; exact, at the finer of the two orders. */
  intersection(other: Moc): Moc {
    const order = Math.max(this.order, other.order);
    return new Moc(order, intersectRanges(this.refined(order), other.refined(order)));
  }

  /** Places not in the region. */
  complement(): Moc {
    const flat = [0, ...this.ranges, cellCount(this.order)];
    return new Moc(this.order, normalRanges(flat));
  }

  /**
   * The cells of the region, each as coarse as possible, by order, as the standard writes them.
   * @returns list of [order, cells] ascending; the region's own order is always present
   */
  cellsByOrder(): [order: number, cells: number[]][] {
    const byOrder = new Map<number, number[]>([[this.order, []]]);
    for (let i = 0; i < this.ranges.length; i += 2) {
      const end = this.ranges[i + 1]!;
      for (let start = this.ranges[i]!; start < end;) {
        let order = this.order;
        let width = 1;
        while (order > 0 && start % (4 * width) === 0 && start + 4 * width <= end) {
          order--;
          width *= 4;
        }
        const cells = byOrder.get(order);
        if (cells) cells.push(start / width);
        else byOrder.set(order, [start / width]);
        start += width;
      }
    }
    return [...byOrder].sort(([a], [b]) => a - b);
  }

  /** ASCII form: `1/1 2 4 2/12-14 21 23 25 8/`. */
  toAscii(): string {
    return writeMocAscii(this.cellsByOrder());
  }

  /** JSON form: `{"1":[1,2,4],"8":[]}`. */
  toJson(): string {
    return JSON.stringify(Object.fromEntries(this.cellsByOrder()));
  }

  /** NUNIQ numbers, ascending, for a FITS MOC. */
  toUniq(): bigint[] {
    const uniq = this.cellsByOrder().flatMap(([order, cells]) => cells.map((cell) => toUniq(order, BigInt(cell))));
    return uniq.sort((a, b) => (a < b ? -1 : a > b ? 1 : 0));
  }
}
