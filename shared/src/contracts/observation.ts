import { z } from 'zod';
import { SKY_FRAMES } from '../science/sky/frames.ts';
import { LINE_SHAPES } from '../science/spectrum/fit-line.ts';
import { VELOCITY_CONVENTIONS } from '../science/velocity/conventions.ts';
import { VELOCITY_FRAMES } from '../science/velocity/frames.ts';

/** Largest file of one image or spectrum, bytes. */
export const OBSERVATION_BYTES = 256 * 1024 ** 2;
/** Most pixels along a side of a raster for the screen. */
export const MOST_RASTER_PIXELS = 1024;

const measured = z.object({ value: z.number(), error: z.number() });

/** What an image's header says; see the reader for the meaning of each. */
export const imageFacts = z.object({
  width: z.int(),
  height: z.int(),
  projection: z.string(),
  frame: z.enum(SKY_FRAMES),
  raDeg: z.number(),
  decDeg: z.number(),
  pixelArcsec: z.number(),
  /** From the middle of the image to its furthest corner. */
  reachArcsec: z.number(),
  unit: z.string().nullable(),
  object: z.string().nullable(),
  filter: z.string().nullable(),
  zeroPointMag: z.number().nullable(),
  beam: z.object({ majorArcsec: z.number(), minorArcsec: z.number(), angleDeg: z.number() }).nullable(),
  notes: z.array(z.string()),
});
export type ImageFacts = z.output<typeof imageFacts>;

/** A line as measured; widths and velocities in optical cz, barycentric, km/s. */
export const lineMeasurement = z.object({
  centreKms: measured,
  w50Kms: measured,
  w20Kms: measured,
  /** In the unit of the spectrum times km/s. */
  flux: measured,
  asymmetry: measured,
  peakSignalToNoise: z.number(),
  signalToNoise: z.number(),
  noise: z.number(),
  channelKms: z.number(),
  correlation: z.number(),
  lowKms: z.number(),
  highKms: z.number(),
  shape: z.enum(LINE_SHAPES),
  peaks: z.enum(['one', 'two', 'cannot tell']),
  lnBayesFactor: z.number(),
  troughDepth: z.number(),
});
export type LineMeasurement = z.output<typeof lineMeasurement>;

export const spectrumFacts = z.object({
  channels: z.int(),
  unit: z.enum(['mJy', 'K']),
  convention: z.enum(VELOCITY_CONVENTIONS),
  frame: z.enum(VELOCITY_FRAMES),
  lowKms: z.number(),
  highKms: z.number(),
  object: z.string().nullable(),
  /** Null where no line could be measured; the notes say why. */
  measurement: lineMeasurement.nullable(),
  notes: z.array(z.string()),
});
export type SpectrumFacts = z.output<typeof spectrumFacts>;

/** A file that shows a detection: exactly one of `image` and `spectrum` is there. */
export const observation = z.object({
  id: z.uuid(),
  detectionId: z.uuid(),
  detectionName: z.string(),
  /** As the uploader called it, or the filter of the header, or the file's name. */
  label: z.string(),
  fileName: z.string(),
  bytes: z.int(),
  sha256: z.string(),
  uploadedBy: z.string(),
  createdAt: z.iso.datetime(),
  mayDelete: z.boolean(),
  image: imageFacts.nullable(),
  spectrum: spectrumFacts.nullable(),
});
export type Observation = z.output<typeof observation>;

/** What may go with an uploaded file, as text fields of the form. */
export const observationFields = z.object({
  label: z.string().trim().max(60).default(''),
  convention: z.enum(VELOCITY_CONVENTIONS).optional(),
  frame: z.enum(VELOCITY_FRAMES).optional(),
  fluxUnit: z.enum(['Jy', 'mJy', 'uJy', 'K', 'mK']).optional(),
});
export type ObservationFields = z.output<typeof observationFields>;

/** A square about the detection; the answer is float32, little-endian, rows from the north, east left, NaN for nothing. */
export const rasterQuery = z.object({
  halfArcsec: z.coerce.number().positive().max(36_000),
  pixels: z.coerce.number().int().min(8).max(MOST_RASTER_PIXELS),
});
export type RasterQuery = z.output<typeof rasterQuery>;

/** Channels of a spectrum without their baseline, and the adopted fit; null where a channel has no value. */
export const spectrumChannels = z.object({
  czKms: z.array(z.number()),
  flux: z.array(z.number().nullable()),
  fit: z.array(z.number()).nullable(),
});
export type SpectrumChannels = z.output<typeof spectrumChannels>;
