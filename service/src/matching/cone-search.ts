import { around } from 'geokdbush';
import { ARCSECOND } from '@eremite/shared/science/constants';
import { type ConeIndex, treeRaDeg } from './cone-index.ts';
import { separationArcsec } from './separation-arcsec.ts';
import { checkPosition, checkRadius, wrapRaDeg } from './sky-position.ts';

/** Radius of the sphere in which geokdbush measures, so that its kilometres are an angle again. */
const TREE_SPHERE = 6371;

/** Rows of a catalogue by separation, then row. */
export interface ConeRows {
  row: Uint32Array;
  separationArcsec: Float64Array;
}

/** Rows the tree finds within a little more than the radius, then measured and sorted exactly. */
function rowsWithin(index: ConeIndex, raDeg: number, decDeg: number, radiusArcsec: number): ConeRows {
  const ra = wrapRaDeg(raDeg);
  const radius = Math.min(Math.PI, radiusArcsec * ARCSECOND * (1 + 1e-9) + 1e-14);
  // Its haversine flattens towards the antipode: there everything is looked at.
  const reach = radius > 3 ? Infinity : radius * TREE_SPHERE;
  const tree = index.tree;
  const ids =
    reach === Infinity ? Array.from(index.raDeg.keys()) : around(tree, treeRaDeg(ra), decDeg, Infinity, reach);
  const apart = ids.map((id) => separationArcsec(ra, decDeg, wrapRaDeg(index.raDeg[id]!), index.decDeg[id]!));
  const order = Uint32Array.from(ids.keys()).filter((i) => apart[i]! <= radiusArcsec);
  order.sort((a, b) => apart[a]! - apart[b]! || ids[a]! - ids[b]!);
  return {
    row: Uint32Array.from(order, (i) => ids[i]!),
    separationArcsec: Float64Array.from(order, (i) => apart[i]!),
  };
}

/**
 * All rows within a radius of one position, a row exactly at the radius included: the same rows as `pairSearch`.
 *
 * @param radiusArcsec 0 to 648000
 * @throws {DomainError} if the position or radius makes no sense
 */
export function coneSearch(index: ConeIndex, raDeg: number, decDeg: number, radiusArcsec: number): ConeRows {
  checkPosition('position', 0, raDeg, decDeg);
  checkRadius('position', 0, radiusArcsec / 3600);
  return rowsWithin(index, raDeg, decDeg, radiusArcsec);
}

/**
 * The k rows nearest to one position however far, all of the catalogue's if it has fewer. Of rows equally far the one
 * that comes first in the catalogue is taken.
 *
 * @throws {DomainError} if the position makes no sense
 */
export function nearestRows(index: ConeIndex, raDeg: number, decDeg: number, k: number): ConeRows {
  checkPosition('position', 0, raDeg, decDeg);
  const rows = index.raDeg.length;
  const ra = wrapRaDeg(raDeg);
  const ids = k < rows ? around(index.tree, treeRaDeg(ra), decDeg, k) : [];
  // The tree rounds in its own way and breaks ties as it likes: measure the farthest, and sort all within that.
  const farthest = ids.reduce(
    (most, id) => Math.max(most, separationArcsec(ra, decDeg, wrapRaDeg(index.raDeg[id]!), index.decDeg[id]!)),
    0,
  );
  const found = rowsWithin(index, raDeg, decDeg, k < rows ? farthest : 648_001);
  return { row: found.row.slice(0, k), separationArcsec: found.separationArcsec.slice(0, k) };
}
