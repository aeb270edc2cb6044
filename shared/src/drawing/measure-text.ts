const MINUS = '\u2212';

/** Decimals of a measure so that it has about three digits. */
const decimals = (value: number): number => (value < 10 ? 1 : 0);

/** An angle in the unit that reads best: `26″`, `3.6′`, `1.4°`. @param arcsec not negative */
export function angleText(arcsec: number): string {
  if (arcsec < 100) return `${arcsec.toFixed(decimals(arcsec))}″`;
  if (arcsec < 6000) return `${(arcsec / 60).toFixed(1)}′`;
  return `${(arcsec / 3600).toFixed(2)}°`;
}

/** A length on the sky: `8.4 kpc`, `640 kpc`, `1.3 Mpc`. @param kpc not negative */
export function kpcText(kpc: number): string {
  if (kpc < 1000) return `${kpc.toFixed(kpc < 100 ? 1 : 0)} kpc`;
  return `${(kpc / 1000).toFixed(2)} Mpc`;
}

/** A number with its sign and a true minus: `+120`, `−85`, `0`. */
export function signedText(value: number, places = 0): string {
  const text = Math.abs(value).toFixed(places);
  if (Number(text) === 0) return text;
  return `${value < 0 ? MINUS : '+'}${text}`;
}

/** A number with a true minus: `−17.2`. */
export const numberText = (value: number, places: number): string => value.toFixed(places).replace('-', MINUS);

/** A probability with the digits that matter near both ends, as everywhere in the application. */
export function probabilityText(value: number): string {
  if (value === 0 || value === 1) return String(value);
  if (value < 0.001) return '<0.001';
  if (value > 0.999) return '>0.999';
  return value.toFixed(value < 0.01 || value > 0.99 ? 3 : 2);
}
