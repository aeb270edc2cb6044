import type { ImageFacts, SpectrumFacts, SpectrumChannels } from '@eremite/shared/contracts/observation';
import type { ImageLimits } from '../../images/image.ts';
import type { PlaneSquare } from '../../images/resample.ts';
import type { SpectrumSettings } from '../../images/spectrum.ts';

/** The detection a file is held against. */
export interface ObservedPlace {
  raDeg: number;
  decDeg: number;
  velocityKms: number | null;
  width50Kms: number | null;
}

/** What the thread is asked. */
export type ObservationTask =
  | { what: 'recognise'; path: string; limits: ImageLimits }
  | { what: 'image'; path: string; limits: ImageLimits; places: { raDeg: number; decDeg: number }[] }
  | { what: 'raster'; path: string; limits: ImageLimits; square: PlaneSquare }
  | { what: 'spectrum'; path: string; limits: ImageLimits; place: ObservedPlace; settings: SpectrumSettings };

export interface ObservationAnswers {
  recognise: 'image' | 'spectrum';
  /** `inside` tells of each place whether the image shows it. */
  image: { facts: ImageFacts; inside: boolean[] };
  raster: Float32Array;
  spectrum: { facts: SpectrumFacts; channels: SpectrumChannels };
}

/** What the thread answers: `told` failures are said to the person as they are. */
export type ObservationMessage = { kind: 'done'; answer: unknown } | { kind: 'failed'; message: string; told: boolean };
