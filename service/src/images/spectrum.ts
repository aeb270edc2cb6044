import type { VelocityConvention } from '@eremite/shared/science/velocity/conventions';
import type { VelocityFrame } from '@eremite/shared/science/velocity/frames';

/** What a person says of a spectrum where its file does not; what they say goes before what the file says. */
export interface SpectrumSettings {
  convention?: VelocityConvention | undefined;
  frame?: VelocityFrame | undefined;
  /** Unit of the flux densities, as `mJy`. */
  fluxUnit?: string | undefined;
}

/** Units the flux densities are kept in: brightness temperatures cannot become flux densities without the beam. */
export type FluxUnit = 'mJy' | 'K';

/** A spectrum on one axis: optical cz, barycentric, km/s, ascending; a channel without a value is NaN. */
export interface HiSpectrum {
  czKms: Float64Array;
  flux: Float64Array;
  unit: FluxUnit;
  /** What the file's axis was, and what had to be assumed. */
  convention: VelocityConvention;
  frame: VelocityFrame;
  object: string | null;
  notes: string[];
}

/** A spectrum as its file has it. */
export interface RawSpectrum {
  /** km/s, or MHz. */
  axis: number[];
  /** In the unit of the file times `factor`. */
  flux: number[];
  convention: VelocityConvention | undefined;
  frame: VelocityFrame | 'topocentric' | undefined;
  unit: { unit: FluxUnit; factor: number } | undefined;
  object: string | null;
}

/** Fewest channels that can be measured, and most that are kept. */
export const LEAST_CHANNELS = 16;
export const MOST_CHANNELS = 32_768;
