import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { SPEED_OF_LIGHT_KMS } from '@eremite/shared/science/constants';
import { hiDiameterArcmin } from '@eremite/shared/science/hydrogen/hi-size';
import { spoilsIsolation } from '@eremite/shared/science/surroundings/density-measures';
import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import { pairSearch } from '../matching/pair-search.ts';
import type { ZoneGrid } from '../matching/zone-grid.ts';
import type { Detection } from './detection-table.ts';
import { isStar, type PreparedCatalogue } from './prepared-catalogue.ts';
import { asR } from './redshift-reach.ts';
import type { Assessment } from './scored-detection.ts';

/** Isophotal diameter of a disc in half-light radii, and of its gas over that of its stars. Broeils & Rhee (1997), from memory. */
const DIAMETER_RADII = 4;
const GAS_OVER_STARS = 1.7;
/** Smaller galaxies spoil nobody's isolation, half-light radius in arcsec. */
const LEAST_RADIUS_ARCSEC = 2.5;
const FARTHEST_ARCSEC = 5 * 3600;
/** Where no beam is known, arcsec. */
const USUAL_BEAM_ARCSEC = 60;
/** A row this near to one with a redshift is the same galaxy, arcsec. */
const SAME_ARCSEC = 3;

interface Sized {
  catalogue: PreparedCatalogue;
  rows: Uint32Array;
  grid: ZoneGrid;
}

/** Neighbours that need no redshift: those of like size, and those that fibres may have missed. */
export class PhotometricNeighbours {
  private readonly sized: Sized[];

  constructor(
    private readonly catalogues: readonly PreparedCatalogue[],
    private readonly criteria: CriteriaSettings,
  ) {
    this.sized = catalogues.flatMap((catalogue) => (catalogue.effectiveRadius ? [largeOf(catalogue)] : []));
  }

  /**
   * Galaxies of a quarter to four times the size of the detection's stars, nearer than twenty of their own diameters.
   *
   * @returns null where no table has sizes or the detection has no size; its size is that of the gas by its mass over 1.7
   * Source: Karachentseva (1973).
   */
  spoilers({ detection, dominating }: Assessment): number | null {
    const gas = 60 * hiDiameter(detection);
    if (this.sized.length === 0 || !(gas > 0)) return null;
    const diameter = gas / GAS_OVER_STARS;
    const radius = Math.min(FARTHEST_ARCSEC, 20 * 4 * diameter);
    let most = 0;
    for (const { catalogue, rows, grid } of this.sized) {
      const found = pairSearch(grid, at(detection, radius));
      let count = 0;
      found.row.forEach((slot, k) => {
        const row = rows[slot]!;
        if (dominating?.rows.some((own) => own.catalogue === catalogue && own.index === row)) return;
        const size = DIAMETER_RADII * catalogue.effectiveRadius![row]!;
        if (spoilsIsolation(diameter, size, found.separationArcsec[k]!)) count++;
      });
      most = Math.max(most, count);
    }
    return most;
  }

  /**
   * Galaxies without a redshift within two beams, bright enough to count at the distance of the gas: close pairs are those
   * that fibres miss. Null without a distance or a band that can be turned into r.
   */
  unverified({ detection, dominating }: Assessment): number | null {
    const { luminosityMpc, beam } = detection;
    if (!(luminosityMpc > 0)) return null;
    const limit = this.criteria.surroundings.faintestNeighbourMag + 5 * Math.log10(luminosityMpc) + 25;
    const radius = 2 * (beam ? beam.major : USUAL_BEAM_ARCSEC);
    const known: [number, number][] = [];
    const open: [number, number][] = [];
    let tested = false;
    for (const catalogue of this.catalogues) {
      const band = catalogue.bands.find(({ id, toAb }) => !Number.isNaN(asR(0, id, toAb)));
      if (band) tested = true;
      for (const row of pairSearch(catalogue.grid, at(detection, radius)).row) {
        const place: [number, number] = [catalogue.raDeg[row]!, catalogue.decDeg[row]!];
        const own = dominating?.rows.some((each) => each.catalogue === catalogue && each.index === row);
        if (own || isStar(catalogue, row) || hasRedshift(catalogue, row)) known.push(place);
        else if (band && !band.isLimit?.[row] && asR(band.magnitude[row]!, band.id, band.toAb) <= limit)
          open.push(place);
      }
    }
    if (!tested) return null;
    const counted: [number, number][] = [];
    for (const place of open) {
      if (![...known, ...counted].some((other) => isNear(place, other))) counted.push(place);
    }
    return counted.length;
  }
}

const hiDiameter = ({ logHiMass, angularMpc }: Detection): number =>
  angularMpc > 0 && !Number.isNaN(logHiMass) ? hiDiameterArcmin(logHiMass, angularMpc) : NaN;

const hasRedshift = ({ czKms }: PreparedCatalogue, row: number): boolean =>
  czKms !== undefined && Math.abs(czKms[row]!) < SPEED_OF_LIGHT_KMS;

const isNear = ([ra, dec]: [number, number], [otherRa, otherDec]: [number, number]): boolean =>
  Math.hypot((((((ra - otherRa + 540) % 360) + 360) % 360) - 180) * Math.cos((dec * Math.PI) / 180), dec - otherDec) *
    3600 <
  SAME_ARCSEC;

function at({ raDeg, decDeg }: Detection, radiusArcsec: number) {
  return {
    raDeg: Float64Array.of(raDeg),
    decDeg: Float64Array.of(decDeg),
    radiusArcsec: Float64Array.of(radiusArcsec),
  };
}

function largeOf(catalogue: PreparedCatalogue): Sized {
  const { effectiveRadius, raDeg, decDeg } = catalogue;
  const kept: number[] = [];
  for (let i = 0; i < effectiveRadius!.length; i++) {
    if (effectiveRadius![i]! >= LEAST_RADIUS_ARCSEC && !isStar(catalogue, i)) kept.push(i);
  }
  return {
    catalogue,
    rows: Uint32Array.from(kept),
    grid: buildZoneGrid(
      Float64Array.from(kept, (i) => raDeg[i]!),
      Float64Array.from(kept, (i) => decDeg[i]!),
    ),
  };
}
