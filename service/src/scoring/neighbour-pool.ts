import { buildVelocityGrid, type VelocityGrid } from '../matching/velocity-grid.ts';
import type { PreparedCatalogue } from './prepared-catalogue.ts';

/** All rows with a velocity of all tables of galaxies and HI detections, behind one grid. */
export interface NeighbourPool {
  grid: VelocityGrid;
  /** Index of the catalogue and of the row in it, by row of the pool. */
  catalogue: Uint16Array;
  row: Uint32Array;
}

export function buildNeighbourPool(catalogues: readonly PreparedCatalogue[]): NeighbourPool {
  const moving = catalogues.filter(
    ({ input, czKms }) => czKms !== undefined && input.kind !== 'stars' && input.kind !== 'groups',
  );
  let total = 0;
  for (const { czKms } of moving) for (let i = 0; i < czKms!.length; i++) if (Number.isFinite(czKms![i])) total++;
  const catalogue = new Uint16Array(total);
  const row = new Uint32Array(total);
  const raDeg = new Float64Array(total);
  const decDeg = new Float64Array(total);
  const cz = new Float64Array(total);
  let at = 0;
  for (const source of moving) {
    const czKms = source.czKms!;
    for (let i = 0; i < czKms.length; i++) {
      if (!Number.isFinite(czKms[i])) continue;
      catalogue[at] = source.index;
      row[at] = i;
      raDeg[at] = source.raDeg[i]!;
      decDeg[at] = source.decDeg[i]!;
      cz[at] = czKms[i]!;
      at++;
    }
  }
  return { grid: buildVelocityGrid(raDeg, decDeg, cz), catalogue, row };
}
