import { assertDirection, type Direction, fromVector, toVector } from './direction.ts';

/** A 3 by 3 matrix, rows first. */
export type Matrix = readonly [
  readonly [number, number, number],
  readonly [number, number, number],
  readonly [number, number, number],
];

/** Product of two matrices. */
export function multiply(a: Matrix, b: Matrix): Matrix {
  const row = (i: 0 | 1 | 2) =>
    ([0, 1, 2] as const).map((j) => a[i][0] * b[0][j] + a[i][1] * b[1][j] + a[i][2] * b[2][j]) as unknown as Matrix[0];
  return [row(0), row(1), row(2)];
}

/** Transpose, which is the inverse of a rotation. */
export function transpose(m: Matrix): Matrix {
  return [
    [m[0][0], m[1][0], m[2][0]],
    [m[0][1], m[1][1], m[2][1]],
    [m[0][2], m[1][2], m[2][2]],
  ];
}

/** Rotation of the axes (not of the vector) about one axis by an angle in radians, right-handed. */
export function aboutAxis(axis: 'x' | 'y' | 'z', angle: number): Matrix {
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  if (axis === 'x')
    return [
      [1, 0, 0],
      [0, c, s],
      [0, -s, c],
    ];
  if (axis === 'y')
    return [
      [c, 0, -s],
      [0, 1, 0],
      [s, 0, c],
    ];
  return [
    [c, s, 0],
    [-s, c, 0],
    [0, 0, 1],
  ];
}

/** A direction (radians) expressed in rotated axes. @throws {DomainError} for a direction out of range */
export function rotate(m: Matrix, lon: number, lat: number): Direction {
  assertDirection('rotate', lon, lat);
  const [x, y, z] = toVector(lon, lat);
  return fromVector([
    m[0][0] * x + m[0][1] * y + m[0][2] * z,
    m[1][0] * x + m[1][1] * y + m[1][2] * z,
    m[2][0] * x + m[2][1] * y + m[2][2] * z,
  ]);
}
