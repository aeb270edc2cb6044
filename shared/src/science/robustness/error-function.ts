/*
 * The coefficients are those of FDLIBM's s_erf.c:
 * Copyright (C) 1993 by Sun Microsystems, Inc. All rights reserved. Developed at SunPro, a Sun Microsystems, Inc.
 * business. Permission to use, copy, modify, and distribute this software is freely granted, provided that this notice
 * is preserved.
 */
const ERF_P = [
  1.28379167095512558561e-1, -3.2504210724700149937e-1, -2.84817495755985104766e-2, -5.77027029648944159157e-3,
  -2.37630166566501626084e-5,
];
const ERF_Q = [
  1, 3.97917223959155352819e-1, 6.50222499887672944485e-2, 5.08130628187576562776e-3, 1.32494738004321644526e-4,
  -3.9602282787753681232e-6,
];
/** erf(1), to single precision: the middle range is the difference from it. */
const ERF_ONE = 8.45062911510467529297e-1;
const ONE_P = [
  -2.36211856075265944077e-3, 4.14856118683748331666e-1, -3.72207876035701323847e-1, 3.18346619901161753674e-1,
  -1.10894694282396677476e-1, 3.54783043256182359371e-2, -2.166375594868790843e-3,
];
const ONE_Q = [
  1, 1.06420880400844228286e-1, 5.40397917702171048937e-1, 7.18286544141962662868e-2, 1.26171219808761642112e-1,
  1.36370839120290507362e-2, 1.1984499846799107417e-2,
];
const NEAR_P = [
  -9.86494403484714822705e-3, -6.93858572707181764372e-1, -1.05586262253232909814e1, -6.23753324503260060396e1,
  -1.62396669462573470355e2, -1.84605092906711035994e2, -8.12874355063065934246e1, -9.81432934416914548592,
];
const NEAR_Q = [
  1, 1.96512716674392571292e1, 1.376577541435190426e2, 4.34565877475229228821e2, 6.45387271733267880336e2,
  4.29008140027567833386e2, 1.08635005541779435134e2, 6.57024977031928170135, -6.04244152148580987438e-2,
];
const FAR_P = [
  -9.86494292470009928597e-3, -7.99283237680523006574e-1, -1.77579549177547519889e1, -1.60636384855821916062e2,
  -6.37566443368389627722e2, -1.02509513161107724954e3, -4.83519191608651397019e2,
];
const FAR_Q = [
  1, 3.03380607434824582924e1, 3.25792512996573918826e2, 1.53672958608443695994e3, 3.19985821950859553908e3,
  2.55305040643316442583e3, 4.74528541206955367215e2, -2.24409524465858183362e1,
];

/**
 * Complementary error function.
 *
 * @param x any number
 * @returns erfc(x), in [0, 2]; relative error below 1e-14 wherever the result does not underflow (x < 26.5)
 *
 * Source: rational approximations of FDLIBM (1993). Some tens of nanoseconds: the completeness of every draw rests on it.
 */
export function erfc(x: number): number {
  const size = Math.abs(x);
  if (size < 0.84375) return 1 - nearZero(x);
  if (size < 1.25) {
    const beyond = nearOne(size);
    return x > 0 ? 1 - ERF_ONE - beyond : 1 + ERF_ONE + beyond;
  }
  if (size > 28) return x > 0 ? 0 : 2;
  if (Number.isNaN(x)) return NaN;
  return x > 0 ? tail(size) : 2 - tail(size);
}

/** Error function of any number; relative error below 1e-14. */
export function erf(x: number): number {
  const size = Math.abs(x);
  if (size < 0.84375) return nearZero(x);
  const value = size < 1.25 ? ERF_ONE + nearOne(size) : size > 6 ? 1 : 1 - tail(size);
  return Number.isNaN(x) ? NaN : x > 0 ? value : -value;
}

/** Probability that a standard normal deviate lies below x. */
export function normalCdf(x: number): number {
  return 0.5 * erfc(-x / Math.SQRT2);
}

function nearZero(x: number): number {
  const square = x * x;
  return x + (x * polynomial(ERF_P, square)) / polynomial(ERF_Q, square);
}

function nearOne(size: number): number {
  return polynomial(ONE_P, size - 1) / polynomial(ONE_Q, size - 1);
}

function tail(size: number): number {
  const inverse = 1 / (size * size);
  const near = size < 1 / 0.35;
  const ratio = polynomial(near ? NEAR_P : FAR_P, inverse) / polynomial(near ? NEAR_Q : FAR_Q, inverse);
  // exp(-x^2) loses digits as a whole: the square of a single-precision x is exact, the rest is small.
  const rounded = Math.fround(size);
  return (Math.exp(-rounded * rounded - 0.5625) * Math.exp((rounded - size) * (rounded + size) + ratio)) / size;
}

function polynomial(coefficients: readonly number[], x: number): number {
  let sum = 0;
  for (let k = coefficients.length - 1; k >= 0; k--) sum = sum * x + coefficients[k]!;
  return sum;
}
