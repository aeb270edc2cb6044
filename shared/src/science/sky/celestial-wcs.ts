import { DomainError } from '../domain-error.ts';
import type { Direction } from './direction.ts';
import { nativePole, nativeToSky, skyToNative } from './native-rotation.ts';
import { distort, type PixelDistortion, undistort } from './pixel-distortion.ts';
import { type ProjectionCode, skyProjection } from './sky-projections.ts';

/** What a header says about the two celestial axes of an image; angles in radians. */
export interface CelestialKeywords {
  readonly projection: ProjectionCode;
  /** PV2_1, PV2_2, ... */
  readonly parameters?: readonly number[] | undefined;
  /** CRPIX: pixel of the reference point; the first pixel of an axis has its centre at 1. */
  readonly pixel: readonly [number, number];
  /** CRVAL: longitude and latitude of the reference point. */
  readonly value: readonly [lon: number, lat: number];
  /** Radians a pixel: rows longitude and latitude, columns first and second pixel axis. */
  readonly matrix: readonly [readonly [number, number], readonly [number, number]];
  readonly lonPole?: number | undefined;
  readonly latPole?: number | undefined;
  readonly distortion?: PixelDistortion | undefined;
}

/** Pixels of an image and directions in its own frame, both ways; pixels count from 1 as in FITS. */
export interface CelestialWcs {
  /** Undefined where no direction belongs to the pixel, as outside an all-sky ellipse. */
  toSky(x: number, y: number): Direction | undefined;
  /** Undefined for directions the projection cannot show. */
  toPixel(lon: number, lat: number): { x: number; y: number } | undefined;
}

/**
 * World coordinates of an image.
 *
 * @throws {DomainError} for a singular matrix, values that are not finite, or a pole that cannot be
 *
 * Source: Greisen & Calabretta (2002), A&A 395, 1061; Calabretta & Greisen (2002), A&A 395, 1077.
 */
export function celestialWcs(keywords: CelestialKeywords): CelestialWcs {
  const { projection: code, parameters, pixel, value, matrix, distortion } = keywords;
  const projection = skyProjection(code, parameters);
  const [[a, b], [c, d]] = matrix;
  const determinant = a * d - b * c;
  const given = [...pixel, ...value, a, b, c, d, ...(parameters ?? [])];
  if (!given.every(Number.isFinite))
    throw new DomainError(`celestialWcs: expected finite keywords, got ${given.join(', ')}`);
  if (!(Math.abs(determinant) > 1e-12 * (Math.abs(a * d) + Math.abs(b * c)))) {
    throw new DomainError('celestialWcs: the matrix of pixel steps is singular');
  }
  if (Math.abs(value[1]) > Math.PI / 2 + 1e-12) {
    throw new DomainError(`celestialWcs: the reference latitude is ${value[1]} rad, beyond a pole`);
  }
  const { lonPole, latPole } = keywords;
  const pole = nativePole({ lon: value[0], lat: value[1], theta0: projection.theta0, lonPole, latPole });
  return {
    toSky(x, y) {
      let [u, v]: readonly [number, number] = [x - pixel[0], y - pixel[1]];
      if (distortion) [u, v] = distort(distortion, u, v);
      const native = projection.unproject(a * u + b * v, c * u + d * v);
      return native && nativeToSky(pole, native);
    },
    toPixel(lon, lat) {
      const { phi, theta } = skyToNative(pole, lon, lat);
      const plane = projection.project(phi, theta);
      if (!plane) return undefined;
      let at: readonly [number, number] | undefined = [
        (d * plane.x - b * plane.y) / determinant,
        (a * plane.y - c * plane.x) / determinant,
      ];
      if (distortion) at = undistort(distortion, ...at);
      return at && { x: at[0] + pixel[0], y: at[1] + pixel[1] };
    },
  };
}
