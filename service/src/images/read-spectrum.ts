import { DEGREE } from '@eremite/shared/science/constants';
import { DomainError } from '@eremite/shared/science/domain-error';
import { toOpticalCz, type VelocityConvention } from '@eremite/shared/science/velocity/conventions';
import { toBarycentric, type VelocityFrame } from '@eremite/shared/science/velocity/frames';
import { openContent } from '../tables/bytes/content.ts';
import { openTable } from '../tables/open-table.ts';
import { isFits } from '../tables/readers/fits.ts';
import { type ByteSource, type ReaderLimits, TableError } from '../tables/table.ts';
import { readFitsSpectrum } from './read-fits-spectrum.ts';
import { axisMeaning, fluxMeaning, fluxUnit } from './spectrum-columns.ts';
import { type HiSpectrum, LEAST_CHANNELS, MOST_CHANNELS, type RawSpectrum, type SpectrumSettings } from './spectrum.ts';

/**
 * Reads an HI spectrum from a table (CSV, VOTable, FITS and the others) or a one-dimensional FITS array.
 *
 * @param place ICRS position in degrees, needed to bring velocities to the barycentre
 * @throws TableError when axis or flux cannot be told, a unit is missing, or there are too few channels
 */
export async function readSpectrum(
  source: ByteSource,
  place: { raDeg: number; decDeg: number },
  settings: SpectrumSettings,
  limits: ReaderLimits,
): Promise<HiSpectrum> {
  const content = await openContent(source, limits);
  const raw =
    (isFits(content.head) ? await readFitsSpectrum(content, limits) : undefined) ?? (await readTable(source, limits));
  return settle(raw, place, settings);
}

async function readTable(source: ByteSource, limits: ReaderLimits): Promise<RawSpectrum> {
  const open = await openTable(source, limits);
  const { columns } = open.tables[0]!;
  const numeric = columns.flatMap((column, i) => (column.type === 'number' || column.type === 'integer' ? [i] : []));
  const axisAt = numeric.find((i) => axisMeaning(columns[i]!) !== undefined);
  if (axisAt === undefined) {
    throw bad('No column is a velocity or a frequency.', 'Name it with its unit, as in "velocity (km/s)".');
  }
  const others = numeric.filter((i) => i !== axisAt && axisMeaning(columns[i]!) === undefined);
  const fluxAt =
    others.find((i) => fluxMeaning(columns[i]!) !== undefined) ?? (others.length === 1 ? others[0] : undefined);
  if (fluxAt === undefined) {
    throw bad('No column is a flux density.', 'Name it with its unit, as in "flux (mJy)".');
  }
  const [axis, flux]: [number[], number[]] = [[], []];
  for await (const { columns: data, rows } of open.rows(0)) {
    const [a, f] = [data[axisAt]!, data[fluxAt]!];
    if (a.kind !== 'number' || f.kind !== 'number') throw bad('A column of the spectrum is text.', 'Export numbers.');
    for (let row = 0; row < rows; row++) {
      axis.push(a.values[row]!);
      flux.push(f.values[row]!);
    }
    if (axis.length > MOST_CHANNELS) break;
  }
  const meaning = axisMeaning(columns[axisAt]!)!;
  const unit = fluxMeaning(columns[fluxAt]!);
  return {
    axis: axis.map((value) => value * meaning.factor),
    flux,
    convention: meaning.convention,
    frame: meaning.frame,
    unit: unit === 'unit missing' ? undefined : unit,
    object: null,
  };
}

/** Brings a spectrum to cz at the barycentre, ascending. */
function settle(raw: RawSpectrum, { raDeg, decDeg }: { raDeg: number; decDeg: number }, settings: SpectrumSettings) {
  const notes: string[] = [];
  if (raw.axis.length > MOST_CHANNELS) {
    throw new TableError(
      'too-large',
      `The spectrum has more than ${MOST_CHANNELS} channels.`,
      'Cut it about the line.',
    );
  }
  const convention =
    (raw.convention === 'frequency' ? raw.convention : settings.convention) ?? raw.convention ?? 'optical';
  if (!settings.convention && !raw.convention) notes.push('The file does not say the convention: optical is assumed.');
  if (settings.convention === 'frequency' && raw.convention !== 'frequency') {
    throw bad('The axis is a velocity, not a frequency.', 'Choose the convention of the velocity.');
  }
  const frame = settings.frame ?? raw.frame ?? 'barycentric';
  if (frame === 'topocentric') {
    throw bad(
      'The velocities are topocentric, which need time and place of the observation.',
      'Export barycentric ones.',
    );
  }
  if (!settings.frame && !raw.frame) notes.push('The file does not say the frame: barycentric is assumed.');
  const unit = settings.fluxUnit === undefined ? raw.unit : fluxUnit(settings.fluxUnit);
  if (unit === undefined) {
    throw bad(
      'The unit of the flux densities is missing or not known.',
      'State it in the file, as in "flux (mJy)", or choose it when you upload: Jy, mJy or K.',
    );
  }
  const pairs: [number, number][] = [];
  for (const [i, value] of raw.axis.entries()) {
    if (!Number.isFinite(value)) continue;
    pairs.push([optical(convention, frame, value, raDeg, decDeg), raw.flux[i]! * unit.factor]);
  }
  pairs.sort((a, b) => a[0] - b[0]);
  const distinct = pairs.filter(([v], i) => i === 0 || v > pairs[i - 1]![0]);
  if (distinct.length < pairs.length) notes.push('Of channels with the same velocity the first is kept.');
  const known = distinct.filter(([, value]) => Number.isFinite(value)).length;
  if (known < LEAST_CHANNELS) {
    throw bad(`The spectrum has ${known} channels with a value; ${LEAST_CHANNELS} are needed.`, 'Upload more of it.');
  }
  const spectrum: HiSpectrum = {
    czKms: Float64Array.from(distinct, ([v]) => v),
    flux: Float64Array.from(distinct, ([, value]) => (Number.isFinite(value) ? value : NaN)),
    unit: unit.unit,
    convention,
    frame,
    object: raw.object,
    notes,
  };
  return spectrum;
}

function optical(convention: VelocityConvention, frame: VelocityFrame, value: number, raDeg: number, decDeg: number) {
  try {
    return toBarycentric(frame, toOpticalCz(convention, value), raDeg * DEGREE, decDeg * DEGREE);
  } catch (error) {
    if (error instanceof DomainError)
      throw bad(`The axis cannot be: ${error.message}.`, 'Check its convention and unit.');
    throw error;
  }
}

const bad = (message: string, mend: string) => new TableError('bad-data', message, mend);
