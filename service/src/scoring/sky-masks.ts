import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import { DEGREE } from '@eremite/shared/science/constants';
import { FAINTEST_MASKED_G, starMaskRadius } from '@eremite/shared/science/photometry/star-mask';
import { positionAngle } from '@eremite/shared/science/sky/position-angle';
import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import { pairSearch } from '../matching/pair-search.ts';
import type { ZoneGrid } from '../matching/zone-grid.ts';
import type { Detection } from './detection-table.ts';
import { isStar, type PreparedCatalogue, rowName } from './prepared-catalogue.ts';
import type { SkyMask } from './scored-detection.ts';

interface Hiding {
  /** What hides: `star` or `galaxy`. */
  what: string;
  catalogue: PreparedCatalogue;
  index: Uint32Array;
  grid: ZoneGrid;
  raDeg: Float64Array;
  decDeg: Float64Array;
  radiusArcsec: Float64Array;
  widestArcsec: number;
}

/** Smaller galaxies hide too little to matter, half-light radius in arcsec. Our choice. */
const LEAST_GALAXY_ARCSEC = 10;

/** Finds what hides parts of a search circle: the bright stars of star tables, the large galaxies of the others. */
export class SkyMasks {
  private readonly tables: Hiding[];
  private readonly discordantKms: number;

  constructor(catalogues: readonly PreparedCatalogue[], { absence, counterpart }: CriteriaSettings) {
    this.discordantKms = counterpart.discordantKms;
    this.tables = catalogues.flatMap((catalogue) => {
      const { kind } = catalogue.input;
      if (kind === 'stars') return absence.starMask ? [brightStars(catalogue)] : [];
      return absence.galaxyMaskRadii > 0 && kind !== 'hi' && kind !== 'groups'
        ? [largeGalaxies(catalogue, absence.galaxyMaskRadii)]
        : [];
    });
  }

  /** Masks of each detection of a range, in order. */
  of(detections: readonly Detection[]): SkyMask[][] {
    const masks: SkyMask[][] = detections.map(() => []);
    for (const stars of this.tables) {
      if (stars.index.length === 0) continue;
      const pairs = pairSearch(stars.grid, {
        raDeg: Float64Array.from(detections, ({ raDeg }) => raDeg),
        decDeg: Float64Array.from(detections, ({ decDeg }) => decDeg),
        radiusArcsec: Float64Array.from(detections, ({ searchArcsec }) => searchArcsec + stars.widestArcsec),
      });
      for (let k = 0; k < pairs.position.length; k++) {
        const p = pairs.position[k]!;
        const s = pairs.row[k]!;
        const separation = pairs.separationArcsec[k]!;
        if (separation >= detections[p]!.searchArcsec + stars.radiusArcsec[s]!) continue;
        if (stars.what === 'galaxy' && this.couldBeHost(detections[p]!, stars, s, separation)) continue;
        masks[p]!.push(maskOf(detections[p]!, stars, s, separation));
      }
    }
    return masks;
  }

  /** A galaxy inside the search that may be the counterpart does not hide itself. */
  private couldBeHost(detection: Detection, { catalogue, index }: Hiding, s: number, separation: number): boolean {
    if (separation > detection.searchArcsec) return false;
    const czKms = catalogue.czKms?.[index[s]!] ?? NaN;
    return !(Math.abs(czKms - detection.czKms) / (1 + detection.redshift) > this.discordantKms);
  }
}

function maskOf(detection: Detection, stars: Hiding, s: number, separation: number): SkyMask {
  const raDeg = stars.raDeg[s]!;
  const decDeg = stars.decDeg[s]!;
  const pa = positionAngle(detection.raDeg * DEGREE, detection.decDeg * DEGREE, raDeg * DEGREE, decDeg * DEGREE);
  return {
    raDeg,
    decDeg,
    radiusArcsec: stars.radiusArcsec[s]!,
    label: `${stars.what} ${rowName(stars.catalogue, stars.index[s]!)}`,
    eastArcsec: separation * Math.sin(pa),
    northArcsec: separation * Math.cos(pa),
  };
}

function brightStars(catalogue: PreparedCatalogue): Hiding {
  const magnitude = catalogue.bands[0]?.magnitude;
  const kept: number[] = [];
  for (let i = 0; magnitude && i < magnitude.length; i++) if (magnitude[i]! < FAINTEST_MASKED_G) kept.push(i);
  return hiding('star', catalogue, kept, (i) => starMaskRadius(magnitude![i]!));
}

/** Galaxies so large that what lies behind them, or in their outskirts, is lost or torn to pieces. */
function largeGalaxies(catalogue: PreparedCatalogue, radii: number): Hiding {
  const { effectiveRadius } = catalogue;
  const kept: number[] = [];
  for (let i = 0; effectiveRadius && i < effectiveRadius.length; i++) {
    if (effectiveRadius[i]! >= LEAST_GALAXY_ARCSEC && !isStar(catalogue, i)) kept.push(i);
  }
  return hiding('galaxy', catalogue, kept, (i) => radii * effectiveRadius![i]!);
}

function hiding(
  what: string,
  catalogue: PreparedCatalogue,
  kept: readonly number[],
  radiusOf: (row: number) => number,
): Hiding {
  const radiusArcsec = Float64Array.from(kept, radiusOf);
  const raDeg = Float64Array.from(kept, (i) => catalogue.raDeg[i]!);
  const decDeg = Float64Array.from(kept, (i) => catalogue.decDeg[i]!);
  return {
    what,
    catalogue,
    index: Uint32Array.from(kept),
    grid: buildZoneGrid(raDeg, decDeg),
    raDeg,
    decDeg,
    radiusArcsec,
    widestArcsec: radiusArcsec.reduce((most, radius) => Math.max(most, radius), 0),
  };
}
