import { buildZoneGrid } from '../matching/build-zone-grid.ts';
import { pairSearch } from '../matching/pair-search.ts';
import type { ZoneGrid } from '../matching/zone-grid.ts';
import { numberRole } from '../tiles/role-table.ts';
import { type CatalogueDigest, digestOf } from './catalogue-digest.ts';
import type { Detection } from './detection-table.ts';
import type { EngineCatalogue } from './engine-input.ts';

/** The map of the dust behind such columns is 6 arcmin wide (Schlegel et al. 1998), so that this is still the same place. */
const NEAR_ARCSEC = 600;
type Samples = { name: string } & Pick<CatalogueDigest['reddening'], 'raDeg' | 'decDeg' | 'ebvMag'>;
type Table = Pick<EngineCatalogue, 'name' | 'roles' | 'digest'>;

/** Rows with a reddening, thinned; undefined where the table has none. */
function samplesOf({ name, roles, digest }: Table): Samples | undefined {
  if (!numberRole(roles, 'ebvMag')) return undefined;
  const { reddening } = digest ?? digestOf(roles);
  return reddening.row.length > 0 ? { name, ...reddening } : undefined;
}

/** E(B-V) of the sky about detections that give none, told from rows of the tables. */
export class LocalReddening {
  private readonly tables: { samples: Samples; grid: ZoneGrid }[];

  constructor(catalogues: readonly Table[]) {
    this.tables = catalogues.flatMap((catalogue) => {
      const samples = samplesOf(catalogue);
      return samples ? [{ samples, grid: buildZoneGrid(samples.raDeg, samples.decDeg) }] : [];
    });
  }

  /**
   * Gives detections without a reddening of their own the median E(B-V) of the rows within 10 arcmin of the first table, in
   * the order of the run, that has any there. Where no table has, it stays missing.
   */
  fill(detections: readonly Detection[]): void {
    let open = detections.filter(({ ebvMag }) => Number.isNaN(ebvMag));
    for (const { samples, grid } of this.tables) {
      if (open.length === 0) return;
      const pairs = pairSearch(grid, {
        raDeg: Float64Array.from(open, ({ raDeg }) => raDeg),
        decDeg: Float64Array.from(open, ({ decDeg }) => decDeg),
        radiusArcsec: new Float64Array(open.length).fill(NEAR_ARCSEC),
      });
      const near: number[][] = open.map(() => []);
      for (let k = 0; k < pairs.position.length; k++) near[pairs.position[k]!]!.push(samples.ebvMag[pairs.row[k]!]!);
      near.forEach((values, i) => {
        if (values.length === 0) return;
        open[i]!.ebvMag = median(values);
        open[i]!.ebvSource = samples.name;
      });
      open = open.filter(({ ebvMag }) => Number.isNaN(ebvMag));
    }
  }
}

function median(values: number[]): number {
  const sorted = values.sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}
