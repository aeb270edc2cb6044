import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { DomainError } from '@eremite/shared/science/domain-error';
import { type CelestialKeywords, type CelestialWcs, celestialWcs } from '@eremite/shared/science/sky/celestial-wcs';
import type { SkyFrame } from '@eremite/shared/science/sky/frames';
import type { DistortionTerm, PixelDistortion } from '@eremite/shared/science/sky/pixel-distortion';
import { PROJECTION_CODES, type ProjectionCode } from '@eremite/shared/science/sky/sky-projections';
import type { FitsHeader } from '../tables/readers/fits-header.ts';
import { TableError } from '../tables/table.ts';

export interface HeaderWcs {
  frame: SkyFrame;
  projection: ProjectionCode;
  wcs: CelestialWcs;
  notes: string[];
}

interface Axis {
  number: number;
  kind: string;
  code: string;
}

const RADIANS: Readonly<Record<string, number>> = {
  '': DEGREE,
  deg: DEGREE,
  degree: DEGREE,
  degrees: DEGREE,
  arcmin: 60 * ARCSECOND,
  arcsec: ARCSECOND,
  rad: 1,
};

const bad = (message: string, mend = 'Export the image again with standard world coordinates.') =>
  new TableError('bad-header', message, mend, { byte: 0 });

/**
 * World coordinates of the first two long axes of an image.
 *
 * @param pixelAxes their numbers, from 1
 * @returns undefined when the header gives no celestial axes
 * @throws TableError for a projection, frame or unit that is not offered, or keywords that contradict each other
 */
export function readWcs(header: FitsHeader, pixelAxes: readonly [number, number]): HeaderWcs | undefined {
  const axes = celestialAxes(header);
  const lon = axes.find(({ kind }) => kind === 'RA' || kind === 'GLON');
  const lat = axes.find(({ kind }) => kind === 'DEC' || kind === 'GLAT');
  if (!lon || !lat) return undefined;
  if (lon.code !== lat.code || (lon.kind === 'RA') !== (lat.kind === 'DEC')) {
    throw bad(`CTYPE${lon.number} and CTYPE${lat.number} name different projections or frames.`);
  }
  refuseLookup(header);
  const notes: string[] = [];
  const projection = offered(lon.code);
  const frame = readFrame(header, lon.kind, notes);
  if (header.values.has('AMDX1') && header.values.has('AMDY1')) {
    notes.push(
      'The plate solution of the header (AMDX, AMDY) is left aside for its plain projection: off by part of a pixel.',
    );
  }
  try {
    const wcs = celestialWcs(keywords(header, projection, [lon.number, lat.number], pixelAxes));
    return { frame, projection, wcs, notes };
  } catch (error) {
    if (error instanceof DomainError) throw bad(`The world coordinates of the image cannot be: ${error.message}.`);
    throw error;
  }
}

function refuseLookup(header: FitsHeader): void {
  const keyword = ['CPDIS1', 'CPDIS2', 'D2IMDIS1', 'D2IMDIS2'].find((key) => header.values.has(key));
  if (keyword === undefined) return;
  const message = `The image is distorted by lookup tables (${keyword}), which are not read.`;
  throw new TableError('unsupported', message, 'Resample the image to a plain projection.', { byte: 0 });
}

function celestialAxes(header: FitsHeader): Axis[] {
  const count = Math.min(9, Math.max(header.number('NAXIS') ?? 0, header.number('WCSAXES') ?? 0));
  return Array.from({ length: count }, (_, i) => i + 1).flatMap((number) => {
    const read = /^(RA|DEC|GLON|GLAT)-+([A-Z]{3})(-SIP)?$/.exec(header.text(`CTYPE${number}`) ?? '');
    return read ? [{ number, kind: read[1]!, code: read[2]! }] : [];
  });
}

function offered(code: string): ProjectionCode {
  const found = PROJECTION_CODES.find((known) => known === code) ?? (code === 'NCP' ? 'SIN' : undefined);
  if (found) return found;
  const mend = `Resample the image to TAN, or another of ${PROJECTION_CODES.join(', ')}.`;
  throw new TableError('unsupported', `The projection ${code} is not offered.`, mend, { byte: 0 });
}

function readFrame(header: FitsHeader, kind: string, notes: string[]): SkyFrame {
  if (kind === 'GLON') return 'galactic';
  const equinox = header.number('EQUINOX') ?? header.number('EPOCH');
  const system = (header.text('RADESYS') ?? header.text('RADECSYS') ?? '').toUpperCase();
  if (system === 'ICRS') return 'icrs';
  if (system === 'FK5' || (system === '' && (equinox ?? 2000) >= 1984)) {
    if (equinox !== undefined && equinox !== 2000) throw bad(`Equinox ${equinox} of FK5 is not offered, only J2000.`);
    if (system === '' && equinox === undefined) notes.push('The header names no frame: ICRS is assumed.');
    return system === '' && equinox === undefined ? 'icrs' : 'fk5';
  }
  if (system === 'FK4' || system === '') {
    if (equinox !== undefined && equinox !== 1950) throw bad(`Equinox ${equinox} of FK4 is not offered, only B1950.`);
    return 'b1950';
  }
  throw bad(`The frame "${system}" is not offered; known are ICRS, FK5, FK4 and galactic coordinates.`);
}

type Pair = readonly [number, number];

function keywords(header: FitsHeader, projection: ProjectionCode, world: Pair, pixelAxes: Pair): CelestialKeywords {
  const [lon, lat] = world;
  const unit = world.map((axis) => {
    const name = (header.text(`CUNIT${axis}`) ?? '').toLowerCase();
    const size = RADIANS[name];
    if (size === undefined) throw bad(`CUNIT${axis} is "${name}", which is no angle.`);
    return size;
  }) as [number, number];
  const required = (keyword: string) => {
    const value = header.number(keyword);
    if (value === undefined) throw bad(`${keyword} is missing or no number.`);
    return value;
  };
  const value: Pair = [required(`CRVAL${lon}`) * unit[0], required(`CRVAL${lat}`) * unit[1]];
  const angle = (keyword: string) => {
    const degrees = header.number(keyword);
    return degrees === undefined ? undefined : degrees * DEGREE;
  };
  return {
    projection,
    parameters: readParameters(header, projection, world, value[1]),
    pixel: [required(`CRPIX${pixelAxes[0]}`), required(`CRPIX${pixelAxes[1]}`)],
    value,
    matrix: readMatrix(header, world, pixelAxes, unit),
    lonPole: angle(`PV${lon}_3`) ?? angle('LONPOLE'),
    latPole: angle(`PV${lon}_4`) ?? angle('LATPOLE'),
    distortion: readDistortion(header),
  };
}

/** CD, or PC with CDELT, or CDELT with CROTA of the latitude axis (Greisen & Calabretta 2002, sections 2.1 and 6.1). */
function readMatrix(header: FitsHeader, world: Pair, pixelAxes: Pair, unit: Pair): CelestialKeywords['matrix'] {
  const has = (stem: string) => [...header.values.keys()].some((key) => new RegExp(`^${stem}\\d_\\d$`).test(key));
  const [lon, lat] = world;
  if (has('CD')) {
    const cd = (i: number, j: number) => (header.number(`CD${i}_${j}`) ?? 0) * unit[i === lon ? 0 : 1];
    return [lon, lat].map((i) => pixelAxes.map((j) => cd(i, j))) as unknown as CelestialKeywords['matrix'];
  }
  const step = (axis: number) => {
    const value = header.number(`CDELT${axis}`);
    if (value === undefined) throw bad(`The header gives no pixel steps (CD, or CDELT${axis}).`);
    return value * unit[axis === lon ? 0 : 1];
  };
  if (has('PC')) {
    const pc = (i: number, j: number) => (header.number(`PC${i}_${j}`) ?? (i === j ? 1 : 0)) * step(i);
    return [lon, lat].map((i) => pixelAxes.map((j) => pc(i, j))) as unknown as CelestialKeywords['matrix'];
  }
  const turn = (header.number(`CROTA${lat}`) ?? 0) * DEGREE;
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
  const ratio = step(lat) / step(lon);
  const rotated = (i: number, j: number) =>
    i === j ? step(i) * cos : step(i) * (i === lon ? -ratio * sin : sin / ratio);
  return [lon, lat].map((i) => pixelAxes.map((j) => rotated(i, j))) as unknown as CelestialKeywords['matrix'];
}

function readParameters(header: FitsHeader, projection: ProjectionCode, [lon, lat]: Pair, value: number): number[] {
  const isNcp = /NCP/.test(header.text(`CTYPE${lat}`) ?? '');
  // NCP is the slanted SIN that looks along the Earth's axis (Calabretta & Greisen 2002, section 6.1.3).
  if (isNcp) return [0, 1 / Math.tan(value)];
  const given = (axis: number) =>
    [...header.values.keys()].filter((key) => key.startsWith(`PV${axis}_`) && header.number(key) !== 0);
  const ofLon = given(lon).filter((key) => !/_[34]$/.test(key));
  if ((projection === 'TAN' && [...ofLon, ...given(lat)].length > 0) || ofLon.length > 0) {
    const message = 'The header bends its projection with PV keywords (a polynomial distortion, or a moved origin).';
    throw new TableError('unsupported', message, 'Resample the image to a plain TAN projection.', { byte: 0 });
  }
  return [1, 2].flatMap((m) => {
    const parameter = header.number(`PV${lat}_${m}`);
    return parameter === undefined && m === 2 ? [] : [parameter ?? (projection === 'CEA' ? 1 : 0)];
  });
}

/** Only where the coefficients go with the first two axes, as the convention has it. */
function readDistortion(header: FitsHeader): PixelDistortion | undefined {
  if (header.number('A_ORDER') === undefined && header.number('B_ORDER') === undefined) return undefined;
  const terms = (letter: string): DistortionTerm[] =>
    [...header.values.keys()].flatMap((key) => {
      const read = new RegExp(`^${letter}_(\\d)_(\\d)$`).exec(key);
      const value = read ? header.number(key) : undefined;
      return value === undefined ? [] : [{ p: Number(read![1]), q: Number(read![2]), value }];
    });
  return { a: terms('A'), b: terms('B') };
}
