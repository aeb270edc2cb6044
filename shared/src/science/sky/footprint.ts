import { DomainError } from '../domain-error.ts';
import { assertDirection, type Direction } from './direction.ts';
import { cellSide } from './healpix.ts';
import { descend } from './healpix-descent.ts';
import { Moc } from './moc.ts';
import { distanceToRegion } from './moc-distance.ts';
import { SphericalPolygon } from './polygon.ts';
import { separation } from './separation.ts';

/** Where a footprint came from. `rows` is estimated from the rows themselves, the others are stated. */
export type FootprintKind = 'rows' | 'moc' | 'circles' | 'polygons' | 'all-sky';

/** Sample points for a covered fraction: standard error below 0.016. */
const SAMPLES = 1024;
/** Cells along the radius of the smallest shape, and the most cells along all edges together. */
const CELLS_PER_RADIUS = 400;
const MOST_EDGE_CELLS = 60_000;
/** However many the shapes are, the smallest keeps this many cells along its radius: else it might have none at all. */
const LEAST_PER_RADIUS = 4;
const FINEST_SHAPE_ORDER = 18;

/** The part of the sky that a catalogue covers. Outside it, "nothing in the catalogue" is no evidence. */
export class Footprint {
  readonly kind: FootprintKind;
  readonly region: Moc;
  /** How well the edges are known, radians: nothing nearer to an edge than this should be decided by it. */
  readonly edgeUncertainty: number;
  /** Plain sentences on how the footprint was made. */
  readonly notes: readonly string[];

  constructor(
    kind: FootprintKind,
    region: Moc,
    edgeUncertainty = cellSide(region.order),
    notes: readonly string[] = [],
  ) {
    if (region.isEmpty) throw new DomainError('footprint: the region is empty; a catalogue must cover something');
    this.kind = kind;
    this.region = region;
    this.edgeUncertainty = region.skyFraction === 1 ? 0 : edgeUncertainty;
    this.notes = notes;
  }

  /** Whether a direction (radians, ICRS) is covered. @throws {DomainError} for a direction out of range */
  covers(lon: number, lat: number): boolean {
    return this.region.contains(lon, lat);
  }

  /**
   * Fraction of a cone that is covered, from 1024 evenly spread points, the same each time.
   *
   * @param lon longitude of the axis, radians
   * @param lat latitude of the axis, radians
   * @param radius half angle, radians, in [0, π]
   * @returns fraction, 0..1, standard error below 0.016; exact at 0 and 1 where cells prove it
   */
  coveredFraction(lon: number, lat: number, radius: number): number {
    return this.region.coveredFraction(lon, lat, radius, SAMPLES);
  }

  /**
   * Distance from a direction to the nearest edge of the footprint, holes included.
   *
   * @param lon longitude, radians
   * @param lat latitude, radians
   * @returns radians, good to 5 per cent or one cell; 0 for a direction outside; Infinity without an edge
   */
  distanceToEdge(lon: number, lat: number): number {
    return distanceToRegion(this.region, lon, lat, false);
  }
}

/** Footprint of the whole sky. */
export function allSkyFootprint(): Footprint {
  return new Footprint('all-sky', Moc.allSky());
}

/** Footprint stated as a MOC. @throws {DomainError} for an empty one */
export function mocFootprint(region: Moc): Footprint {
  return new Footprint('moc', region);
}

/** A circle on the sky, radians. */
export interface Circle extends Direction {
  readonly radius: number;
}

/** Order at which the cells are fine against the shapes, yet not too many along their edges. */
function shapeOrder(smallestRadius: number, perimeter: number): number {
  const wished = Math.max(smallestRadius / CELLS_PER_RADIUS, perimeter / MOST_EDGE_CELLS);
  const side = Math.min(wished, smallestRadius / LEAST_PER_RADIUS);
  return Math.min(FINEST_SHAPE_ORDER, Math.max(3, Math.ceil(Math.log2(cellSide(0) / side))));
}

/**
 * Footprint of circles. A cell belongs to it if its centre lies in a circle.
 *
 * @param circles centres and radii, radians; radius in (0, π]
 * @throws {DomainError} for an empty list or a circle out of range
 */
export function circlesFootprint(circles: readonly Circle[]): Footprint {
  if (circles.length === 0) throw new DomainError('footprint: the list of circles is empty');
  for (const { lon, lat, radius } of circles) {
    assertDirection('footprint', lon, lat);
    if (!(radius > 0 && radius <= Math.PI)) {
      throw new DomainError(`footprint: a circle needs a radius above 0 and at most 180 degrees, got ${radius} rad`);
    }
  }
  const radii = circles.map((circle) => circle.radius);
  const perimeter = radii.reduce((sum, radius) => sum + 2 * Math.PI * Math.sin(Math.min(radius, Math.PI / 2)), 0);
  const order = shapeOrder(
    radii.reduce((a, b) => Math.min(a, b)),
    perimeter,
  );
  const flat: number[] = [];
  for (const { lon, lat, radius } of circles) {
    const away = (cellLon: number, cellLat: number) => separation(lon, lat, cellLon, cellLat);
    const ranges = descend(
      order,
      (cellLon, cellLat, reach) => {
        const distance = away(cellLon, cellLat);
        return distance > radius + reach ? 'outside' : distance + reach <= radius ? 'inside' : 'undecided';
      },
      (cellLon, cellLat) => away(cellLon, cellLat) <= radius,
    );
    for (const edge of ranges) flat.push(edge);
  }
  return new Footprint('circles', Moc.fromRanges(order, flat));
}

/**
 * Footprint of polygons with great-circle edges. A cell belongs to it if its centre lies in a polygon.
 *
 * @param polygons corners of each, radians
 * @throws {DomainError} for an empty list, fewer than three corners, or a polygon larger than a hemisphere
 */
export function polygonsFootprint(polygons: readonly (readonly Direction[])[]): Footprint {
  if (polygons.length === 0) throw new DomainError('footprint: the list of polygons is empty');
  const shapes = polygons.map((corners) => new SphericalPolygon(corners));
  const smallest = shapes.map((shape) => shape.radius).reduce((a, b) => Math.min(a, b));
  const order = shapeOrder(
    smallest,
    shapes.reduce((sum, shape) => sum + shape.perimeter, 0),
  );
  const flat: number[] = [];
  for (const shape of shapes) {
    const ranges = descend(
      order,
      (lon, lat, radius) => shape.place(lon, lat, radius),
      (lon, lat) => shape.contains(lon, lat),
    );
    for (const edge of ranges) flat.push(edge);
  }
  return new Footprint('polygons', Moc.fromRanges(order, flat));
}
