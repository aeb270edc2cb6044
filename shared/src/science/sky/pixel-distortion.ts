/** Coefficient of uᵖ vᑫ in a polynomial of pixel offsets. */
export interface DistortionTerm {
  readonly p: number;
  readonly q: number;
  readonly value: number;
}

/** Polynomial shifts of the pixels before the linear part: A for the first axis, B for the second. */
export interface PixelDistortion {
  readonly a: readonly DistortionTerm[];
  readonly b: readonly DistortionTerm[];
}

const MOST_STEPS = 30;
const CLOSE_PX = 1e-7;

const polynomial = (terms: readonly DistortionTerm[], u: number, v: number) =>
  terms.reduce((sum, { p, q, value }) => sum + value * u ** p * v ** q, 0);

/**
 * Offsets from the reference pixel as the linear part wants them.
 *
 * @param u offset of the first axis from CRPIX1, pixels
 * @param v offset of the second axis from CRPIX2, pixels
 *
 * Source: Shupe et al. (2005), ASP Conf. Ser. 347, 491 (the SIP convention).
 */
export function distort({ a, b }: PixelDistortion, u: number, v: number): readonly [number, number] {
  return [u + polynomial(a, u, v), v + polynomial(b, u, v)];
}

/** Inverse of {@link distort} to 1e-7 pixel by iteration; undefined where the distortion is too strong for it. */
export function undistort(distortion: PixelDistortion, x: number, y: number): readonly [number, number] | undefined {
  let [u, v] = [x, y];
  for (let step = 0; step < MOST_STEPS; step++) {
    const [atX, atY] = distort(distortion, u, v);
    u += x - atX;
    v += y - atY;
    if (!Number.isFinite(u + v)) return undefined;
    if (Math.hypot(x - atX, y - atY) < CLOSE_PX) return [u, v];
  }
  return undefined;
}
