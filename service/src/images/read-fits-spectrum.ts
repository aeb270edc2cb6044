import type { VelocityConvention } from '@eremite/shared/science/velocity/conventions';
import type { Content } from '../tables/bytes/content.ts';
import { type FitsHdu, listHdus } from '../tables/readers/fits-hdus.ts';
import { type ReaderLimits, TableError } from '../tables/table.ts';
import { readPixels } from './read-pixels.ts';
import { axisMeaning, fluxUnit, frameOfSpecsys } from './spectrum-columns.ts';
import { MOST_CHANNELS, type RawSpectrum } from './spectrum.ts';

const CONVENTIONS: Readonly<Record<string, VelocityConvention>> = {
  FREQ: 'frequency',
  VOPT: 'optical',
  FELO: 'optical',
  VRAD: 'radio',
  ZOPT: 'redshift',
};

/**
 * The first array of a FITS file with one axis longer than 1; undefined when there is none, as in files of tables.
 *
 * @throws TableError for an axis that is no velocity or frequency
 *
 * Source: Greisen et al. (2006), A&A 446, 747; `VELO` with the frame after a dash is the older AIPS way.
 */
export async function readFitsSpectrum(content: Content, limits: ReaderLimits): Promise<RawSpectrum | undefined> {
  const { hdus } = await listHdus(content, limits);
  for (const hdu of hdus) {
    const kind = hdu.header.text('XTENSION');
    if ((kind !== undefined && kind !== 'IMAGE') || hdu.dataBytes === 0) continue;
    const count = hdu.header.count('NAXIS', hdu.number, 0);
    const long = Array.from({ length: count }, (_, i) => i + 1).filter(
      (i) => hdu.header.count(`NAXIS${i}`, hdu.number) > 1,
    );
    if (long.length === 1) return readArray(content, hdu, long[0]!, limits);
  }
  return undefined;
}

async function readArray(content: Content, hdu: FitsHdu, axis: number, limits: ReaderLimits): Promise<RawSpectrum> {
  const { header, number } = hdu;
  const channels = header.count(`NAXIS${axis}`, number);
  if (channels > MOST_CHANNELS) {
    const message = `The spectrum has ${channels} channels, more than ${MOST_CHANNELS}.`;
    throw new TableError('too-large', message, 'Cut it about the line.', { byte: 0 });
  }
  const kind = header.text(`CTYPE${axis}`) ?? '';
  const step = header.number(`CDELT${axis}`) ?? header.number(`CD${axis}_${axis}`);
  const [value, pixel] = [header.number(`CRVAL${axis}`), header.number(`CRPIX${axis}`) ?? 1];
  const code = kind.slice(0, 4).trim();
  const isFrequency = code === 'FREQ';
  const meaning = axisMeaning({ name: kind, unit: header.text(`CUNIT${axis}`) || (isFrequency ? 'Hz' : 'm/s') });
  if (step === undefined || value === undefined || (!meaning && code !== 'ZOPT')) {
    const message = `The axis "${kind}" of HDU ${number} is no velocity or frequency with a value and a step.`;
    throw new TableError('bad-header', message, 'Export the spectrum with CTYPE, CRVAL, CDELT and CUNIT.', { byte: 0 });
  }
  const factor = meaning?.factor ?? 1;
  const flux = await readPixels(content, hdu, channels, limits);
  return {
    axis: Array.from({ length: channels }, (_, i) => (value + (i + 1 - pixel) * step) * factor),
    flux: [...flux],
    convention: CONVENTIONS[code] ?? meaning?.convention,
    frame: frameOfSpecsys(header.text('SPECSYS') ?? '') ?? meaning?.frame,
    unit: fluxUnit(header.text('BUNIT') ?? ''),
    object: header.text('OBJECT') || null,
  };
}
