import { DEGREE } from '@eremite/shared/science/constants';
import { FAINTEST_MASKED_G, starMaskRadius } from '@eremite/shared/science/photometry/star-mask';
import { positionAngle } from '@eremite/shared/science/sky/position-angle';
import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import { pairSearch } from '../matching/pair-search.ts';
import type { Detection } from './detection-table.ts';
import { type PreparedCatalogue, rowName } from './prepared-catalogue.ts';
import type { StarMask } from './scored-detection.ts';

interface BrightStars {
  catalogue: PreparedCatalogue;
  index: Uint32Array;
  raDeg: Float64Array;
  decDeg: Float64Array;
  radiusArcsec: Float64Array;
  widestArcsec: number;
}

/** Finds the bright stars of the star tables whose masks touch a search circle. */
export class StarMasks {
  private readonly tables: BrightStars[];

  constructor(catalogues: readonly PreparedCatalogue[]) {
    this.tables = catalogues.filter(({ input }) => input.kind === 'stars').map(brightStars);
  }

  /** Masks of each detection of a range, in order. */
  of(detections: readonly Detection[]): StarMask[][] {
    const masks: StarMask[][] = detections.map(() => []);
    for (const stars of this.tables) {
      if (stars.index.length === 0) continue;
      const pairs = pairSearch(buildZoneGrid(stars.raDeg, stars.decDeg), {
        raDeg: Float64Array.from(detections, ({ raDeg }) => raDeg),
        decDeg: Float64Array.from(detections, ({ decDeg }) => decDeg),
        radiusArcsec: Float64Array.from(detections, ({ searchArcsec }) => searchArcsec + stars.widestArcsec),
      });
      for (let k = 0; k < pairs.position.length; k++) {
        const p = pairs.position[k]!;
        const s = pairs.row[k]!;
        const separation = pairs.separationArcsec[k]!;
        if (separation >= detections[p]!.searchArcsec + stars.radiusArcsec[s]!) continue;
        masks[p]!.push(maskOf(detections[p]!, stars, s, separation));
      }
    }
    return masks;
  }
}

function maskOf(detection: Detection, stars: BrightStars, s: number, separation: number): StarMask {
  const raDeg = stars.raDeg[s]!;
  const decDeg = stars.decDeg[s]!;
  const pa = positionAngle(detection.raDeg * DEGREE, detection.decDeg * DEGREE, raDeg * DEGREE, decDeg * DEGREE);
  return {
    raDeg,
    decDeg,
    radiusArcsec: stars.radiusArcsec[s]!,
    label: `star ${rowName(stars.catalogue, stars.index[s]!)}`,
    eastArcsec: separation * Math.sin(pa),
    northArcsec: separation * Math.cos(pa),
  };
}

function brightStars(catalogue: PreparedCatalogue): BrightStars {
  const magnitude = catalogue.bands[0]?.magnitude;
  const kept: number[] = [];
  for (let i = 0; magnitude && i < magnitude.length; i++) if (magnitude[i]! < FAINTEST_MASKED_G) kept.push(i);
  const radiusArcsec = Float64Array.from(kept, (i) => starMaskRadius(magnitude![i]!));
  return {
    catalogue,
    index: Uint32Array.from(kept),
    raDeg: Float64Array.from(kept, (i) => catalogue.raDeg[i]!),
    decDeg: Float64Array.from(kept, (i) => catalogue.decDeg[i]!),
    radiusArcsec,
    widestArcsec: radiusArcsec.reduce((most, radius) => Math.max(most, radius), 0),
  };
}
