/** Numbers as sentences carry them: sensible digits, units beside. */
export const percent = (p: number): string => {
  const value = 100 * p;
  if (value > 0 && value < 0.1) return 'under 0.1 per cent';
  if (value > 99.9 && value < 100) return 'over 99.9 per cent';
  return `${value >= 10 ? Number(value.toPrecision(3)) : Number(value.toPrecision(2))} per cent`;
};
/** An angle given in arcsec; in arcmin or degrees where it is large. */
export function arcsec(x: number): string {
  if (x >= 2 * 3600) return `${(x / 3600).toFixed(1)} degrees`;
  if (x >= 1000) return `${(x / 60).toFixed(1)} arcmin`;
  return `${x >= 100 ? x.toFixed(0) : x.toFixed(1)} arcsec`;
}
export const kms = (x: number): string => `${x.toFixed(0)} km/s`;
export const signedKms = (x: number): string => `${x < 0 ? '-' : '+'}${Math.abs(x).toFixed(0)} km/s`;
export const kpc = (x: number): string => (x >= 1000 ? `${(x / 1000).toFixed(2)} Mpc` : `${x.toFixed(0)} kpc`);
/** In kpc below 1 Mpc, so that a near galaxy keeps its digits. */
export const mpc = (x: number): string =>
  x < 1 ? `${Number((1000 * x).toPrecision(3))} kpc` : `${x >= 100 ? x.toFixed(0) : x.toFixed(1)} Mpc`;
/** A distance and its error in one unit, to the digit the error bears (two where its first digits are under 3.5). */
export function mpcWithError(x: number, error: number): string {
  const [value, spread, unit] = x < 1 ? [1000 * x, 1000 * error, 'kpc'] : [x, error, 'Mpc'];
  const place = spread > 0 ? Math.floor(Math.log10(spread)) : -1;
  const decimals = Math.min(4, Math.max(0, (spread / 10 ** place < 3.5 ? 1 : 0) - place));
  return `${value.toFixed(decimals)} +/- ${spread.toFixed(decimals)} ${unit}`;
}
export const mag = (x: number): string => x.toFixed(1);
export const ratio = (x: number): string => (x >= 100 ? x.toFixed(0) : Number(x.toPrecision(2)).toString());
export const probability = (p: number): string => {
  if (p > 0 && p < 0.001) return 'under 0.001';
  if (p > 0.999 && p < 1) return 'over 0.999';
  return p.toFixed(p > 0.99 || p < 0.01 ? 3 : 2);
};
/** A power, never rounded up: it is read against a threshold close to one. */
export const powerFigure = (p: number): string =>
  p > 0.999 && p < 1 ? 'over 0.999' : (Math.floor(1000 * p + 1e-9) / 1000).toFixed(3);
/** A probability said to be under a limit, with as many digits as that takes to be seen. */
export function probabilityUnder(p: number, limit: number): string {
  const plain = probability(p);
  return Number(plain) < limit || !plain.startsWith('0') ? plain : (Math.floor(1000 * p) / 1000).toFixed(3);
}
