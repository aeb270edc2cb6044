import { assertDirection, type Direction } from './direction.ts';
import { DomainError } from '../domain-error.ts';
import { fromFace, toFaceCell } from './healpix-projection.ts';
import { separation } from './separation.ts';

/**
 * Finest order whose nested indices (below 12 · 4^24 = 3.4e15) are exact as numbers. Its cells are 12.6 mas wide,
 * far finer than any footprint; orders up to 29 need {@link cellOfBig}.
 */
export const FINEST_NUMBER_ORDER = 24;
/** Finest order of the MOC standard; cells are 0.39 mas wide. */
export const FINEST_ORDER = 29;

/** @throws {DomainError} unless the order is an integer in 0..finest */
export function assertOrder(where: string, order: number, finest = FINEST_NUMBER_ORDER): void {
  if (!Number.isInteger(order) || order < 0 || order > finest) {
    throw new DomainError(`${where}: expected a HEALPix order from 0 to ${finest}, got ${order}`);
  }
}

/** Cells of a base cell by order; a power anew for each of a million rows takes longer than all the rest. */
const FACE_CELLS = Float64Array.from({ length: FINEST_ORDER + 1 }, (_, order) => 4 ** order);

/** Number of cells on the whole sky at an order, 12 · 4^order; exact to order 24. */
export function cellCount(order: number): number {
  return 12 * FACE_CELLS[order]!;
}

/** Solid angle of one cell, steradians. Cells of one order have equal areas. */
export function cellArea(order: number): number {
  return (4 * Math.PI) / cellCount(order);
}

/** Side of a square of the area of one cell, radians. */
export function cellSide(order: number): number {
  return Math.sqrt(cellArea(order));
}

/** Largest distance from the centre of any cell of an order to its corners, radians. */
export function cellRadius(order: number): number {
  // The widest cells touch the corners of the base cells on the parallel sin δ = 2/3 (Górski et al. 2005).
  const side = 2 ** order;
  const inner = 1 - 1 / side;
  return separation(Math.PI / (4 * side), Math.asin(2 / 3), 0, Math.asin(1 - (inner * inner) / 3));
}

/** Spreads the 16 low bits of an integer to the even bits of 32. */
function spread(bits: number): number {
  let v = bits & 0xffff;
  v = (v | (v << 8)) & 0x00ff00ff;
  v = (v | (v << 4)) & 0x0f0f0f0f;
  v = (v | (v << 2)) & 0x33333333;
  return (v | (v << 1)) & 0x55555555;
}

/** Gathers the even bits of a 32-bit integer into 16 low bits. */
function gather(bits: number): number {
  let v = bits & 0x55555555;
  v = (v | (v >>> 1)) & 0x33333333;
  v = (v | (v >>> 2)) & 0x0f0f0f0f;
  v = (v | (v >>> 4)) & 0x00ff00ff;
  return (v | (v >>> 8)) & 0xffff;
}

const WORD = 2 ** 32;

function toIndex(order: number, face: number, ix: number, iy: number): number {
  const low = (spread(ix) | (spread(iy) << 1)) >>> 0;
  const base = face * FACE_CELLS[order]! + low;
  return order <= 16 ? base : base + (spread(ix >>> 16) | (spread(iy >>> 16) << 1)) * WORD;
}

function fromIndex(order: number, cell: number): { face: number; ix: number; iy: number } {
  const perFace = FACE_CELLS[order]!;
  const face = Math.floor(cell / perFace);
  const within = cell - face * perFace;
  const high = Math.floor(within / WORD);
  const low = within - high * WORD;
  return { face, ix: gather(low) | (gather(high) << 16), iy: gather(low >>> 1) | (gather(high >>> 1) << 16) };
}

function assertCell(where: string, order: number, cell: number): void {
  assertOrder(where, order);
  if (!Number.isInteger(cell) || cell < 0 || cell >= cellCount(order)) {
    throw new DomainError(`${where}: order ${order} has cells 0 to ${cellCount(order) - 1}, got ${cell}`);
  }
}

/**
 * Nested HEALPix cell of a direction.
 *
 * @param order 0..24 (see {@link FINEST_NUMBER_ORDER})
 * @param lon longitude, radians (ICRS right ascension for a MOC)
 * @param lat latitude, radians
 * @returns nested index, an exact integer
 * @throws {DomainError} for an order or direction out of range
 *
 * Source: Górski et al. (2005), ApJ 622, 759.
 */
export function cellOf(order: number, lon: number, lat: number): number {
  assertOrder('cellOf', order);
  assertDirection('cellOf', lon, lat);
  const { face, ix, iy } = toFaceCell(lon, lat, 2 ** order);
  return toIndex(order, face, ix, iy);
}

/** As {@link cellOf}, for orders 0..29, whose indices exceed 2^53 from order 25 on. */
export function cellOfBig(order: number, lon: number, lat: number): bigint {
  assertOrder('cellOfBig', order, FINEST_ORDER);
  assertDirection('cellOfBig', lon, lat);
  const { face, ix, iy } = toFaceCell(lon, lat, 2 ** order);
  const low = (spread(ix) | (spread(iy) << 1)) >>> 0;
  const high = spread(ix >>> 16) | (spread(iy >>> 16) << 1);
  return (BigInt(face) << BigInt(2 * order)) | (BigInt(high) << 32n) | BigInt(low);
}

/**
 * Centre of a nested cell.
 *
 * @returns direction, radians, longitude in [0, 2π)
 * @throws {DomainError} for an order or cell out of range
 */
export function cellCentre(order: number, cell: number): Direction {
  assertCell('cellCentre', order, cell);
  const { face, ix, iy } = fromIndex(order, cell);
  const side = 2 ** order;
  return fromFace(face, (ix + 0.5) / side, (iy + 0.5) / side);
}

/**
 * Boundary of a nested cell, counter-clockwise as seen from inside the sphere, from the south corner.
 *
 * @param steps points along each of the four edges; 1 gives the corners S, E, N, W
 * @returns 4 · steps directions, radians
 * @throws {DomainError} for an order, cell or number of steps out of range
 */
export function cellBoundary(order: number, cell: number, steps = 1): Direction[] {
  assertCell('cellBoundary', order, cell);
  if (!Number.isInteger(steps) || steps < 1) throw new DomainError(`cellBoundary: expected steps >= 1, got ${steps}`);
  const { face, ix, iy } = fromIndex(order, cell);
  const side = 2 ** order;
  const at = (x: number, y: number) => fromFace(face, (ix + x) / side, (iy + y) / side);
  const t = Array.from({ length: steps }, (_, i) => i / steps);
  return [
    ...t.map((s) => at(s, 0)),
    ...t.map((s) => at(1, s)),
    ...t.map((s) => at(1 - s, 1)),
    ...t.map((s) => at(0, 1 - s)),
  ];
}

const STEPS = [
  [-1, -1],
  [-1, 0],
  [-1, 1],
  [0, 1],
  [1, 1],
  [1, 0],
  [1, -1],
  [0, -1],
] as const;

/**
 * The base cell met when leaving one over the given edge or corner, and how its axes lie against those left: alike
 * (`none`), both reversed (`half`), or turned by a quarter (`swap`). Undefined where three base cells meet and
 * nothing lies beyond the corner.
 */
function across(face: number, dx: number, dy: number): { face: number; turn: 'none' | 'half' | 'swap' } | undefined {
  const ring = face & 3;
  const after = (ring + 1) & 3;
  const before = (ring + 3) & 3;
  if (face < 4) {
    if (dx === 1 && dy === 1) return { face: (ring + 2) & 3, turn: 'half' };
    if (dx === 1 && dy === 0) return { face: after, turn: 'swap' };
    if (dx === 0 && dy === 1) return { face: before, turn: 'swap' };
    if (dx === -1 && dy === 0) return { face: 4 + ring, turn: 'none' };
    if (dx === 0 && dy === -1) return { face: 4 + after, turn: 'none' };
    if (dx === -1 && dy === -1) return { face: 8 + ring, turn: 'none' };
    return undefined;
  }
  if (face < 8) {
    if (dx === 1 && dy === 0) return { face: ring, turn: 'none' };
    if (dx === 0 && dy === 1) return { face: before, turn: 'none' };
    if (dx === -1 && dy === 0) return { face: 8 + before, turn: 'none' };
    if (dx === 0 && dy === -1) return { face: 8 + ring, turn: 'none' };
    if (dx === 1 && dy === -1) return { face: 4 + after, turn: 'none' };
    if (dx === -1 && dy === 1) return { face: 4 + before, turn: 'none' };
    return undefined;
  }
  if (dx === -1 && dy === -1) return { face: 8 + ((ring + 2) & 3), turn: 'half' };
  if (dx === 0 && dy === -1) return { face: 8 + after, turn: 'swap' };
  if (dx === -1 && dy === 0) return { face: 8 + before, turn: 'swap' };
  if (dx === 1 && dy === 0) return { face: 4 + after, turn: 'none' };
  if (dx === 0 && dy === 1) return { face: 4 + ring, turn: 'none' };
  if (dx === 1 && dy === 1) return { face: ring, turn: 'none' };
  return undefined;
}

/** Neighbours of a cell that touches no edge of its base cell, which is nearly any. */
function inside(order: number, face: number, ix: number, iy: number): number[] {
  const found = [0, 0, 0, 0, 0, 0, 0, 0];
  for (let n = 0; n < 8; n++) {
    const cell = toIndex(order, face, ix + STEPS[n]![0], iy + STEPS[n]![1]);
    let at = n;
    for (; at > 0 && found[at - 1]! > cell; at--) found[at] = found[at - 1]!;
    found[at] = cell;
  }
  return found;
}

/**
 * The cells that share an edge or a corner with a cell: eight, or seven at a corner of three base cells, fewer at
 * order 0.
 *
 * @returns nested indices, ascending, without repetition
 * @throws {DomainError} for an order or cell out of range
 */
export function neighbours(order: number, cell: number): number[] {
  assertCell('neighbours', order, cell);
  const { face, ix, iy } = fromIndex(order, cell);
  const side = 2 ** order;
  if (ix > 0 && iy > 0 && ix < side - 1 && iy < side - 1) return inside(order, face, ix, iy);
  const found = new Set<number>();
  for (const [dx, dy] of STEPS) {
    const x = ix + dx;
    const y = iy + dy;
    const overX = x < 0 ? -1 : x >= side ? 1 : 0;
    const overY = y < 0 ? -1 : y >= side ? 1 : 0;
    if (overX === 0 && overY === 0) {
      found.add(toIndex(order, face, x, y));
      continue;
    }
    const beyond = across(face, overX, overY);
    if (!beyond) continue;
    const wrappedX = x - overX * side;
    const wrappedY = y - overY * side;
    // Around a pole the axes turn: the strip along one edge continues along the other edge of the next base cell.
    if (beyond.turn === 'none') found.add(toIndex(order, beyond.face, wrappedX, wrappedY));
    else if (beyond.turn === 'half') found.add(toIndex(order, beyond.face, side - 1 - wrappedX, side - 1 - wrappedY));
    else if (overX !== 0) found.add(toIndex(order, beyond.face, wrappedY, side - 1 - wrappedX));
    else found.add(toIndex(order, beyond.face, side - 1 - wrappedY, wrappedX));
  }
  found.delete(cell);
  return [...found].sort((a, b) => a - b);
}
