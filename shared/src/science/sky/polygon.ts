import { DomainError } from '../domain-error.ts';
import { assertDirection, type Direction, toVector, type UnitVector } from './direction.ts';
import type { Placement } from './healpix-descent.ts';

const dot = (a: UnitVector, b: UnitVector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross = (a: UnitVector, b: UnitVector): UnitVector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
const between = (a: UnitVector, b: UnitVector): number => Math.atan2(Math.hypot(...cross(a, b)), dot(a, b));

/** Angle from a point to the great-circle arc from a to b, radians. */
function toArc(p: UnitVector, a: UnitVector, b: UnitVector): number {
  const pole = cross(a, b);
  if (dot(cross(pole, a), p) >= 0 && dot(cross(b, pole), p) >= 0) {
    const size = Math.hypot(...pole);
    if (size > 0) return Math.abs(Math.asin(Math.min(1, Math.max(-1, dot(p, pole) / size))));
  }
  return Math.min(between(p, a), between(p, b));
}

/**
 * A region bounded by great-circle arcs, smaller than a hemisphere. Simple (its edges do not cross); either sense.
 *
 * Edges along a parallel of declination are not great circles: give such an edge more corners (an arc of 10° at
 * declination 45° bows by 6.5′).
 */
export class SphericalPolygon {
  readonly corners: readonly UnitVector[];
  /** Axis of the hemisphere that holds the polygon. */
  private readonly middle: UnitVector;

  /** @throws {DomainError} for fewer than three corners, or corners that do not fit in one hemisphere */
  constructor(corners: readonly Direction[]) {
    if (corners.length < 3) throw new DomainError(`polygon: expected three corners or more, got ${corners.length}`);
    for (const { lon, lat } of corners) assertDirection('polygon', lon, lat);
    this.corners = corners.map(({ lon, lat }) => toVector(lon, lat));
    const sum = [0, 1, 2].map((k) => this.corners.reduce((s, corner) => s + corner[k as 0 | 1 | 2], 0));
    const size = Math.hypot(...sum);
    this.middle = [sum[0]! / size, sum[1]! / size, sum[2]! / size];
    if (!(size > 0) || this.corners.some((corner) => dot(corner, this.middle) <= 0.01)) {
      throw new DomainError('polygon: the corners must fit well within one hemisphere; split a larger region');
    }
  }

  private edges(): [UnitVector, UnitVector][] {
    return this.corners.map((corner, i) => [corner, this.corners[(i + 1) % this.corners.length]!]);
  }

  /** Sum of the lengths of the edges, radians. */
  get perimeter(): number {
    return this.edges().reduce((sum, [a, b]) => sum + between(a, b), 0);
  }

  /** Largest distance from the middle to a corner, radians. */
  get radius(): number {
    return Math.max(...this.corners.map((corner) => between(this.middle, corner)));
  }

  /** Whether a direction (radians) lies inside, by the winding of the edges about it. */
  contains(lon: number, lat: number): boolean {
    const p = toVector(lon, lat);
    // Seen from the antipode the winding is the same, so the far hemisphere is ruled out first.
    if (dot(p, this.middle) <= 0) return false;
    const winding = this.edges().reduce(
      (sum, [a, b]) => sum + Math.atan2(dot(p, cross(a, b)), dot(a, b) - dot(a, p) * dot(b, p)),
      0,
    );
    return Math.abs(winding) > Math.PI;
  }

  /** Placement of a disc about a direction, all in radians: see the descent through cells. */
  place(lon: number, lat: number, radius: number): Placement {
    const p = toVector(lon, lat);
    if (this.edges().some(([a, b]) => toArc(p, a, b) <= radius)) return 'undecided';
    return this.contains(lon, lat) ? 'inside' : 'outside';
  }
}
