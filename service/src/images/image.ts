import type { CelestialWcs } from '@eremite/shared/science/sky/celestial-wcs';
import type { SkyFrame } from '@eremite/shared/science/sky/frames';
import type { ReaderLimits } from '../tables/table.ts';

/** Bounds of an image besides those of any file: checked against the header, before memory is asked for. */
export interface ImageLimits extends ReaderLimits {
  maxPixels: number;
}

/** What a header says of an image besides its pixels; null where it says nothing. */
export interface ImageFacts {
  width: number;
  height: number;
  projection: string;
  frame: SkyFrame;
  /** ICRS position of the middle of the image. */
  raDeg: number;
  decDeg: number;
  /** Side of a pixel as the root of its area in the middle, arcsec. */
  pixelArcsec: number;
  /** From the middle to the furthest corner, arcsec. */
  reachArcsec: number;
  /** BUNIT. */
  unit: string | null;
  object: string | null;
  filter: string | null;
  /** AB or Vega as the header means it: magnitude of a value of 1. */
  zeroPointMag: number | null;
  beam: { majorArcsec: number; minorArcsec: number; angleDeg: number } | null;
  /** What the reader had to assume, one sentence each. */
  notes: string[];
}

/** An image with its values in rows from the bottom (FITS order); a value that is not known is NaN. */
export interface SkyImage {
  facts: ImageFacts;
  wcs: CelestialWcs;
  values: Float32Array | Float64Array;
}
