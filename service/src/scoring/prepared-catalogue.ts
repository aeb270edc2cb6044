import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { ARCSECOND } from '@eremite/shared/science/constants';
import { type NumberCounts, numberCounts } from '@eremite/shared/science/counterpart/magnitude-term';
import { BANDS, type BandId } from '@eremite/shared/science/photometry/bands';
import { cellCount } from '@eremite/shared/science/sky/healpix';
import { Moc } from '@eremite/shared/science/sky/moc';
import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import type { ZoneGrid } from '../matching/zone-grid.ts';
import { textAt } from '../tiles/column-pack.ts';
import { bandsOf, limitRole, nameRole, numberRole } from '../tiles/role-table.ts';
import { AREA_ORDER, type CatalogueDigest, digestOf } from './catalogue-digest.ts';
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
  /** Of all rows of the table, also of those that were not read. */
  digest: CatalogueDigest;
  rows: number;
  grid: ZoneGrid;
  /** In the criteria's order of preference. */
  bands: PreparedBand[];
  /** Area behind the densities, square arcsec. */
  area: number;
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
export { isStar, STAR_PROBABILITY } from './is-star.ts';

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
  const digest = input.digest ?? digestOf(roles);
  const area = moc && moc.area > 0 ? moc.area / SQUARE_ARCSEC : occupiedArea(digest);
  const starProbability = numberRole(roles, 'starProbability');
  const prepared: PreparedCatalogue = {
    index,
    input,
    digest,
    rows: roles.rows,
    grid: buildZoneGrid(keepGrid ? raDeg : new Float64Array(0), keepGrid ? decDeg : new Float64Array(0)),
    bands: [],
    area,
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
  prepared.density = Math.max(1, digest.galaxies) / area;
  const rank = (name: string) => {
    const place = criteria.counterpart.bandPreference.indexOf(name);
    return place < 0 ? 1000 : place;
  };
  prepared.bands = bandsOf(roles)
    .map((name) => prepareBand(prepared, name, criteria, digest, area))
    .sort((a, b) => rank(a.name) - rank(b.name));
  return prepared;
}

function prepareBand(
  catalogue: PreparedCatalogue,
  name: string,
  criteria: CriteriaSettings,
  digest: CatalogueDigest,
  area: number,
): PreparedBand {
  const { roles, bands } = catalogue.input;
  const magnitude = numberRole(roles, `mag:${name}`)!;
  const isLimit = limitRole(roles, `magLimit:${name}`);
  const facts = bands.find((band) => band.name === name);
  const id = name in BANDS ? (name as BandId) : undefined;
  const system = facts?.system ?? (id ? BANDS[id].usualSystem : 'AB');
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
    counts: digest.counts[name] && numberCounts(digest.counts[name], area),
    toAb: system === 'Vega' && id ? BANDS[id].abMinusVega : 0,
  };
}

/**
 * Area of the sky that rows occupy, square arcsec: of the HEALPix cells that hold one, at the finest order with eight rows a
 * cell on average. For densities only; it says nothing of what is covered.
 */
function occupiedArea({ sampled: { cell } }: CatalogueDigest): number {
  const whole = (4 * Math.PI) / SQUARE_ARCSEC;
  let area = whole;
  for (let order = 0; order <= AREA_ORDER; order++) {
    const width = 4 ** (AREA_ORDER - order);
    const cells = new Set<number>();
    for (const fine of cell) cells.add(Math.floor(fine / width));
    if (cells.size === 0 || cell.length / cells.size < 8) return area;
    area = (whole * cells.size) / cellCount(order);
  }
  return area;
}
