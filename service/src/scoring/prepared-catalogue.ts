import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { ARCSECOND, DEGREE } from '@eremite/shared/science/constants';
import { countMagnitudes, type NumberCounts } from '@eremite/shared/science/counterpart/magnitude-term';
import { BANDS, type BandId } from '@eremite/shared/science/photometry/bands';
import { cellCount, cellOf } from '@eremite/shared/science/sky/healpix';
import { Moc } from '@eremite/shared/science/sky/moc';
import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import type { ZoneGrid } from '../matching/zone-grid.ts';
import { textAt } from '../tiles/column-pack.ts';
import { bandsOf, limitRole, nameRole, numberRole } from '../tiles/role-table.ts';
import type { EngineBand, EngineCatalogue } from './engine-input.ts';

/** A band of a catalogue made ready: its magnitudes and how many unrelated objects have them. */
export interface PreparedBand extends EngineBand {
  /** Undefined where the band is not one we know: its light cannot be predicted. */
  id: BandId | undefined;
  magnitude: Float64Array;
  isLimit: Uint8Array | undefined;
  /** Undefined where no row has a magnitude. */
  counts: NumberCounts | undefined;
  /** Added to a magnitude of the table it gives AB. */
  toAb: number;
  seeing: number;
}

/** A catalogue made ready for scoring. */
export interface PreparedCatalogue {
  index: number;
  input: EngineCatalogue;
  rows: number;
  grid: ZoneGrid;
  /** In the criteria's order of preference. */
  bands: PreparedBand[];
  /** Rows per square arcsec, stars left out. */
  density: number;
  moc: Moc | null;
  /** Whether the area behind the densities had to be told from the occupied cells. */
  areaFromRows: boolean;
  raDeg: Float64Array;
  decDeg: Float64Array;
  czKms: Float64Array | undefined;
  sigma: Float64Array | undefined;
  defaultSigma: number;
  effectiveRadius: Float64Array | undefined;
  starProbability: Float64Array | undefined;
  pmRa: Float64Array | undefined;
  pmDec: Float64Array | undefined;
  continuum: Float64Array | undefined;
}

const SQUARE_ARCSEC = ARCSECOND ** 2;
/** A star by its own table. */
export const STAR_PROBABILITY = 0.5;
/** Galaxies do not move: a faster object is a star of the Galaxy, mas/yr. */
const STAR_MOTION_MAS_YR = 20;

export function isStar(
  { starProbability, pmRa, pmDec }: Pick<PreparedCatalogue, 'starProbability' | 'pmRa' | 'pmDec'>,
  row: number,
): boolean {
  if (starProbability && starProbability[row]! > STAR_PROBABILITY) return true;
  return pmRa !== undefined && pmDec !== undefined && Math.hypot(pmRa[row]!, pmDec[row]!) > STAR_MOTION_MAS_YR;
}

/** Name of a row, or its number in the file. */
export function rowName({ input }: PreparedCatalogue, row: number): string {
  const names = nameRole(input.roles);
  return (names && textAt(names, row)) || String(input.roles.columns.row[row]!);
}

/** FWHM where none is stated, arcsec: by band, for the optical a setting. Common practice. */
function usualSeeing(id: BandId | undefined, criteria: CriteriaSettings): number {
  const regime = id && BANDS[id].regime;
  if (regime === 'ultraviolet') return 5;
  if (id && /^W/.test(id)) return id === 'W4' ? 12 : 6;
  return regime === 'infrared' ? 2 : criteria.absence.seeingFwhmArcsec;
}

/** @param keepGrid false where nobody searches the catalogue by position */
export function prepareCatalogue(
  input: EngineCatalogue,
  index: number,
  criteria: CriteriaSettings,
  keepGrid: boolean,
): PreparedCatalogue {
  const { roles } = input;
  const { raDeg, decDeg } = roles.columns;
  const moc = input.coverage ? Moc.fromRanges(input.coverage.order, input.coverage.ranges) : null;
  const area = moc && moc.area > 0 ? moc.area / SQUARE_ARCSEC : occupiedArea(raDeg, decDeg);
  const starProbability = numberRole(roles, 'starProbability');
  const prepared: PreparedCatalogue = {
    index,
    input,
    rows: roles.rows,
    grid: buildZoneGrid(keepGrid ? raDeg : new Float64Array(0), keepGrid ? decDeg : new Float64Array(0)),
    bands: [],
    density: 0,
    moc,
    areaFromRows: !moc,
    raDeg,
    decDeg,
    czKms: numberRole(roles, 'czKms'),
    sigma: numberRole(roles, 'positionErrorArcsec'),
    defaultSigma: input.positionErrorArcsec ?? criteria.position.opticalErrorArcsec,
    effectiveRadius: numberRole(roles, 'effectiveRadiusArcsec'),
    starProbability,
    pmRa: numberRole(roles, 'pmRaMasYr'),
    pmDec: numberRole(roles, 'pmDecMasYr'),
    continuum: numberRole(roles, 'continuumMjy'),
  };
  let galaxies = roles.rows;
  if (starProbability) for (let i = 0; i < roles.rows; i++) if (isStar(prepared, i)) galaxies--;
  prepared.density = Math.max(1, galaxies) / area;
  const rank = (name: string) => {
    const place = criteria.counterpart.bandPreference.indexOf(name);
    return place < 0 ? 1000 : place;
  };
  prepared.bands = bandsOf(roles)
    .map((name) => prepareBand(prepared, name, criteria, area))
    .sort((a, b) => rank(a.name) - rank(b.name));
  return prepared;
}

function prepareBand(
  catalogue: PreparedCatalogue,
  name: string,
  criteria: CriteriaSettings,
  area: number,
): PreparedBand {
  const { roles, bands } = catalogue.input;
  const magnitude = numberRole(roles, `mag:${name}`)!;
  const isLimit = limitRole(roles, `magLimit:${name}`);
  const facts = bands.find((band) => band.name === name);
  const id = name in BANDS ? (name as BandId) : undefined;
  const system = facts?.system ?? (id ? BANDS[id].usualSystem : 'AB');
  let counted = magnitude;
  if (isLimit || catalogue.starProbability || catalogue.pmRa) {
    counted = magnitude.slice();
    for (let i = 0; i < counted.length; i++) if (isLimit?.[i] || isStar(catalogue, i)) counted[i] = NaN;
  }
  return {
    name,
    id,
    system,
    depth5Sigma: facts?.depth5Sigma ?? null,
    seeingFwhmArcsec: facts?.seeingFwhmArcsec ?? null,
    seeing: facts?.seeingFwhmArcsec ?? usualSeeing(id, criteria),
    extinction: facts?.extinction ?? 'none',
    magnitude,
    isLimit,
    counts: countMagnitudes(counted, area),
    toAb: system === 'Vega' && id ? BANDS[id].abMinusVega : 0,
  };
}

/**
 * Area of the sky that rows occupy, square arcsec: of the HEALPix cells that hold one, at the finest order with eight rows a
 * cell on average. For densities only; it says nothing of what is covered.
 */
function occupiedArea(raDeg: Float64Array, decDeg: Float64Array): number {
  const whole = (4 * Math.PI) / SQUARE_ARCSEC;
  const step = Math.max(1, Math.floor(raDeg.length / 50_000));
  const sampled = Math.ceil(raDeg.length / step);
  let area = whole;
  for (let order = 0; order <= 12; order++) {
    const cells = new Set<number>();
    for (let i = 0; i < raDeg.length; i += step) {
      const ra = ((raDeg[i]! % 360) + 360) % 360;
      cells.add(cellOf(order, ra * DEGREE, decDeg[i]! * DEGREE));
    }
    if (cells.size === 0 || sampled / cells.size < 8) return area;
    area = (whole * cells.size) / cellCount(order);
  }
  return area;
}
