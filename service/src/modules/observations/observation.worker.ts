import { parentPort } from 'node:worker_threads';
import type { SpectrumChannels, SpectrumFacts } from '@eremite/shared/contracts/observation';
import { DEGREE } from '@eremite/shared/science/constants';
import { DomainError } from '@eremite/shared/science/domain-error';
import { fromIcrs } from '@eremite/shared/science/sky/from-icrs';
import { type LineMeasurement, measureLine } from '@eremite/shared/science/spectrum/measure-line';
import type { SkyImage } from '../../images/image.ts';
import { observationKind } from '../../images/observation-kind.ts';
import { readFitsImage } from '../../images/read-fits-image.ts';
import { readSpectrum } from '../../images/read-spectrum.ts';
import { resample } from '../../images/resample.ts';
import { fileSource } from '../../tables/bytes/byte-source.ts';
import { openContent } from '../../tables/bytes/content.ts';
import { TableError } from '../../tables/table.ts';
import type { ObservationAnswers, ObservationMessage, ObservationTask } from './observation-task.ts';

type Task<W extends ObservationTask['what']> = Extract<ObservationTask, { what: W }>;

/** The image last decoded: zooming asks for the same one again. Files are never written anew under their name. */
let last: { path: string; image: SkyImage } | undefined;

const port = parentPort!;
port.on('message', (task: ObservationTask) => {
  void answer(task).then(
    (done) => {
      const message: ObservationMessage = { kind: 'done', answer: done };
      port.postMessage(message, done instanceof Float32Array ? [done.buffer as ArrayBuffer] : []);
    },
    (error: unknown) => {
      const told = error instanceof TableError;
      const message = told ? `${error.message} ${error.mend}` : error instanceof Error ? error.message : String(error);
      port.postMessage({ kind: 'failed', message, told } satisfies ObservationMessage);
    },
  );
});

async function answer(task: ObservationTask): Promise<ObservationAnswers[keyof ObservationAnswers]> {
  switch (task.what) {
    case 'recognise':
      return observationKind(await openContent(await fileSource(task.path), task.limits), task.limits);
    case 'image':
      return describe(task);
    case 'raster':
      return resample(await decoded(task.path, task.limits), task.square);
    case 'spectrum':
      return measure(task);
  }
}

async function decoded(path: string, limits: Task<'raster'>['limits']): Promise<SkyImage> {
  if (last?.path !== path) {
    // The one before is let go first: two large images at once are not needed.
    last = undefined;
    last = { path, image: await readFitsImage(await fileSource(path), limits) };
  }
  return last.image;
}

async function describe({ path, limits, places }: Task<'image'>): Promise<ObservationAnswers['image']> {
  const { facts, wcs } = await decoded(path, limits);
  const inside = places.map(({ raDeg, decDeg }) => {
    const { lon, lat } = fromIcrs(facts.frame, raDeg * DEGREE, decDeg * DEGREE);
    const at = wcs.toPixel(lon, lat);
    return at !== undefined && at.x >= 0.5 && at.y >= 0.5 && at.x <= facts.width + 0.5 && at.y <= facts.height + 0.5;
  });
  return { facts, inside };
}

async function measure({ path, limits, place, settings }: Task<'spectrum'>): Promise<ObservationAnswers['spectrum']> {
  const { czKms, flux, ...said } = await readSpectrum(await fileSource(path), place, settings, limits);
  const notes = [...said.notes];
  let line: LineMeasurement | undefined;
  try {
    line = measureLine(czKms, flux, {
      centreKms: place.velocityKms ?? undefined,
      widthKms: place.width50Kms ?? undefined,
    });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    notes.push(`No line was measured: ${error.message.replace(/^\w+: /, '')}.`);
  }
  const { flat, fit, ...measurement } = line ?? {};
  const facts: SpectrumFacts = {
    channels: czKms.length,
    unit: said.unit,
    convention: said.convention,
    frame: said.frame,
    object: said.object,
    lowKms: czKms[0]!,
    highKms: czKms[czKms.length - 1]!,
    measurement: line ? (measurement as Omit<LineMeasurement, 'flat' | 'fit'>) : null,
    notes,
  };
  const channels: SpectrumChannels = {
    czKms: [...czKms],
    flux: Array.from(flat ?? flux, (value) => (Number.isFinite(value) ? value : null)),
    fit: fit ? [...fit] : null,
  };
  return { facts, channels };
}
