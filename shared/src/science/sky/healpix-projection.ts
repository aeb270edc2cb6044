import { type Direction, wrapTurn } from './direction.ts';

/** A cell of one of the twelve base cells: ix grows to the north-east, iy to the north-west, both in [0, side). */
export interface FaceCell {
  readonly face: number;
  readonly ix: number;
  readonly iy: number;
}

/** Row and column (in units of base cells) of the southern corner of each base cell. */
const FACE_ROW = [2, 2, 2, 2, 3, 3, 3, 3, 4, 4, 4, 4] as const;
const FACE_COLUMN = [1, 3, 5, 7, 0, 2, 4, 6, 1, 3, 5, 7] as const;

/**
 * The cell of a direction on the grid of `side` by `side` cells in each base cell.
 *
 * @param lon longitude, radians, finite
 * @param lat latitude, radians, in [-π/2, π/2]
 * @param side cells along an edge of a base cell, a power of two up to 2^29
 * @returns base cell 0..11 with its column and row; a point on an edge belongs to exactly one cell
 *
 * Source: Górski et al. (2005), ApJ 622, 759, section 5. Near the poles √(3(1-|z|)) is taken from the cosine of the
 * latitude, as 1-|z| has no digits left there.
 */
export function toFaceCell(lon: number, lat: number, side: number): FaceCell {
  // By way of the colatitude, as in the published software, so that places on the equator fall in the same cells.
  const z = Math.cos(Math.PI / 2 - lat);
  const height = Math.abs(z);
  const quarters = wrapTurn(lon) / (Math.PI / 2);
  if (height <= 2 / 3) {
    const up = 0.5 + quarters - 0.75 * z;
    const down = 0.5 + quarters + 0.75 * z;
    const upFace = Math.floor(up);
    const downFace = Math.floor(down);
    const face = upFace === downFace ? (upFace & 3) | 4 : upFace < downFace ? upFace & 3 : (downFace & 3) + 8;
    return { face, ix: Math.floor((down - downFace) * side), iy: side - 1 - Math.floor((up - upFace) * side) };
  }
  const quarter = Math.min(3, Math.floor(quarters));
  const within = quarters - quarter;
  const span = Math.cos(lat) * Math.sqrt(3 / (1 + height)) * side;
  const up = Math.min(side - 1, Math.floor(within * span));
  const down = Math.min(side - 1, Math.floor((1 - within) * span));
  return z >= 0 ? { face: quarter, ix: side - 1 - down, iy: side - 1 - up } : { face: quarter + 8, ix: up, iy: down };
}

/**
 * Direction of a place in a base cell, the inverse of {@link toFaceCell}.
 *
 * @param face base cell, 0..11
 * @param x towards the north-east, in [0, 1]
 * @param y towards the north-west, in [0, 1]
 * @returns direction, radians, longitude in [0, 2π)
 *
 * Source: Górski et al. (2005), ApJ 622, 759, section 5.
 */
export function fromFace(face: number, x: number, y: number): Direction {
  const row = FACE_ROW[face]! - x - y;
  const fromPole = row < 1 ? row : row > 3 ? 4 - row : 1;
  const column = FACE_COLUMN[face]! * fromPole + x - y;
  const lon = fromPole < 1e-15 ? 0 : wrapTurn((Math.PI / 4) * (column / fromPole));
  if (row >= 1 && row <= 3) return { lon, lat: Math.asin(((2 - row) * 2) / 3) };
  const gap = (fromPole * fromPole) / 3;
  const across = fromPole * Math.sqrt((2 - gap) / 3);
  return { lon, lat: Math.atan2(row < 1 ? 1 - gap : gap - 1, across) };
}
