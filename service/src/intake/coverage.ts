import { DEGREE } from '@eremite/shared/science/constants';
import { DomainError } from '@eremite/shared/science/domain-error';
import {
  allSkyFootprint,
  circlesFootprint,
  type Footprint,
  mocFootprint,
  polygonsFootprint,
} from '@eremite/shared/science/sky/footprint';
import { Moc } from '@eremite/shared/science/sky/moc';
import { rowsFootprint } from '@eremite/shared/science/sky/rows-footprint';
import { type ResolvedSettings, SettingsError } from './resolved.ts';

/** Where a catalogue has looked. Without a region nothing can be concluded from a place where it has no row. */
export interface Coverage {
  type: ResolvedSettings['footprint']['type'];
  moc: Moc | null;
  areaSqDeg: number | null;
  /** How the region was found, or why there is none; a sentence without its first capital. */
  note: string;
}

/**
 * Region of a catalogue as its settings state it, or as its rows show it.
 *
 * @param raDeg positions of all rows, ICRS degrees
 * @throws {SettingsError} for a region that cannot be read
 */
export function coverageOf(
  { footprint, kind }: Pick<ResolvedSettings, 'footprint' | 'kind'>,
  raDeg: Float64Array,
  decDeg: Float64Array,
): Coverage {
  if (footprint.type === 'rows') return fromRows(kind, raDeg, decDeg);
  const stated = statedFootprint(footprint);
  if (stated && footprint.type === 'cones') return { ...known(stated, conesNote(footprint.value)), type: 'cones' };
  if (!stated) return unknown('it is unknown, so a place without rows shows nothing.');
  return known(stated, footprint.type === 'all-sky' ? 'the whole sky, as stated.' : `the ${WORDS[stated.kind]} given.`);
}

function conesNote(value: unknown): string {
  const { radiusArcsec, centres = [] } = value as ConesValue;
  const cones = centres.length === 1 ? 'the one cone' : `the ${centres.length.toLocaleString('en')} cones`;
  return `${cones} of ${radiusArcsec} arcsec around the detections; what lies outside, neighbours and shifted positions too, it cannot tell.`;
}

const WORDS = { rows: 'rows', moc: 'region', circles: 'circles', polygons: 'polygons', 'all-sky': 'sky' } as const;

function fromRows(kind: ResolvedSettings['kind'], raDeg: Float64Array, decDeg: Float64Array): Coverage {
  if (kind === 'hi' || kind === 'stars' || kind === 'groups')
    return unknown('it is not needed for a list of this kind.');
  const found = rowsFootprint(raDeg, decDeg);
  if (found.known) return known(found.footprint, `${found.footprint.notes.join('; ')}.`);
  return unknown(`it is unknown, so a place without rows shows nothing: ${found.reason}.`);
}

/**
 * Footprint that settings state; undefined for none or one to be taken from the rows.
 * @throws {SettingsError} that names what is wrong with it
 */
export function statedFootprint({ type, value }: ResolvedSettings['footprint']): Footprint | undefined {
  try {
    if (type === 'all-sky') return allSkyFootprint();
    if (type === 'moc') return mocFootprint(mocOf(value));
    if (type === 'circles') return circlesFootprint(circlesOf(value));
    if (type === 'cones') return circlesFootprint(conesOf(value));
    if (type === 'polygons') return polygonsFootprint(polygonsOf(value));
    return undefined;
  } catch (error) {
    if (error instanceof DomainError) throw new SettingsError([{ pointer: '/footprint/value', detail: error.message }]);
    throw error;
  }
}

const unknown = (note: string): Coverage => ({ type: 'unknown', moc: null, areaSqDeg: null, note });

function known({ kind, region }: Footprint, note: string): Coverage {
  return { type: kind, moc: region, areaSqDeg: region.area / DEGREE ** 2, note };
}

function mocOf(value: unknown): Moc {
  if (typeof value === 'string') return Moc.parse(value);
  if (typeof value === 'object' && value !== null) return Moc.parseJson(JSON.stringify(value));
  throw new DomainError(
    'A MOC is given as text, such as "6/24185 24190", as JSON by order, or as {"fits": …} with a FITS file in base64.',
  );
}

const isNumbers = (value: unknown, length: number): value is number[] =>
  Array.isArray(value) && value.length === length && value.every((item) => typeof item === 'number');

function circlesOf(value: unknown) {
  const list = Array.isArray(value) ? (value as unknown[]) : [];
  if (list.length === 0) throw new DomainError('Circles are given as [[raDeg, decDeg, radiusDeg], …].');
  return list.map((circle) => {
    if (!isNumbers(circle, 3))
      throw new DomainError(`A circle is [raDeg, decDeg, radiusDeg], found ${JSON.stringify(circle)}.`);
    const [ra, dec, radius] = circle as [number, number, number];
    return { lon: ra * DEGREE, lat: dec * DEGREE, radius: radius * DEGREE };
  });
}

interface ConesValue {
  radiusArcsec: number;
  centres?: [number, number][];
}

function conesOf(value: unknown) {
  const { radiusArcsec, centres } = (typeof value === 'object' && value !== null ? value : {}) as Partial<ConesValue>;
  if (!(typeof radiusArcsec === 'number' && radiusArcsec > 0 && radiusArcsec <= 36_000)) {
    throw new DomainError('Cones need the radius that was asked for, in arcsec, above 0 and at most 36,000.');
  }
  if (!Array.isArray(centres) || centres.length === 0) {
    throw new DomainError('There are no detections for the cones to lie around: publish the HI list first.');
  }
  const radius = (radiusArcsec / 3600) * DEGREE;
  return centres.map((centre: unknown) => {
    if (!isNumbers(centre, 2)) throw new DomainError(`A centre is [raDeg, decDeg], found ${JSON.stringify(centre)}.`);
    return { lon: centre[0]! * DEGREE, lat: centre[1]! * DEGREE, radius };
  });
}

function polygonsOf(value: unknown) {
  const list = Array.isArray(value) ? (value as unknown[]) : [];
  if (list.length === 0) throw new DomainError('Polygons are given as [[[raDeg, decDeg], …], …].');
  return list.map((polygon) => {
    if (!Array.isArray(polygon)) throw new DomainError('A polygon is a list of corners [raDeg, decDeg].');
    return polygon.map((corner: unknown) => {
      if (!isNumbers(corner, 2)) throw new DomainError(`A corner is [raDeg, decDeg], found ${JSON.stringify(corner)}.`);
      return { lon: corner[0]! * DEGREE, lat: corner[1]! * DEGREE };
    });
  });
}
