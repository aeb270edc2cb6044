/** The invented survey: a deep strip, a wide redshift survey about it, and what each table reaches. */
export const FIELD = {
  /** Deep strip, degrees. */
  raMin: 45.6,
  raMax: 50.6,
  decMin: 13.1,
  decMax: 15.1,
  /** Redshift survey about it. */
  wide: { raMin: 38.5, raMax: 57.5, decMin: 6, decMax: 22 },
  /** Ultraviolet stops short of the western quarter. */
  ultravioletRaMin: 46.9,
  beamArcsec: 45,
  /** Noise of one 10 km/s channel, mJy. */
  channelNoiseMjy: 0.23,
  optical: { depthR: 24.4, depthG: 24.9, cutR: 23, seeing: 1.2 },
  ultraviolet: { depth: 22.7, seeing: 5.3 },
  infrared: { depth: 16.9, cut: 16.6, seeing: 6.1 },
  redshifts: { depthR: 17.77 },
} as const;

export const H0 = 70;
export const C_KMS = 299_792.458;

const DEG = Math.PI / 180;

/** Solid angle of a box in right ascension and declination, square degrees. */
export function areaSqDeg(raMin: number, raMax: number, decMin: number, decMax: number): number {
  return ((raMax - raMin) * (Math.sin(decMax * DEG) - Math.sin(decMin * DEG))) / DEG;
}

export function inside(raDeg: number, decDeg: number, margin = 0): boolean {
  return (
    raDeg > FIELD.raMin + margin &&
    raDeg < FIELD.raMax - margin &&
    decDeg > FIELD.decMin + margin &&
    decDeg < FIELD.decMax - margin
  );
}

/** Moves a position by offsets in arcsec, east and north. */
export function moved(raDeg: number, decDeg: number, eastArcsec: number, northArcsec: number): [number, number] {
  const dec = decDeg + northArcsec / 3600;
  return [raDeg + eastArcsec / 3600 / Math.cos(decDeg * DEG), dec];
}

/**
 * Velocity in the Local Group frame less the barycentric one, km/s: 316 km/s towards l 93, b -4.
 * Source: Karachentsev & Makarov (1996), AJ 111, 794. At the strip (l 166, b -36) it is within 2 km/s of constant,
 * so the apex angle is taken at each position all the same.
 */
export function localGroupCorrection(raDeg: number, decDeg: number): number {
  const pole = { ra: 192.85948 * DEG, dec: 27.12825 * DEG, l: 122.93192 * DEG };
  const ra = raDeg * DEG;
  const dec = decDeg * DEG;
  const sinB = Math.sin(dec) * Math.sin(pole.dec) + Math.cos(dec) * Math.cos(pole.dec) * Math.cos(ra - pole.ra);
  const b = Math.asin(sinB);
  const l =
    pole.l -
    Math.atan2(
      Math.cos(dec) * Math.sin(ra - pole.ra),
      Math.sin(dec) * Math.cos(pole.dec) - Math.cos(dec) * Math.sin(pole.dec) * Math.cos(ra - pole.ra),
    );
  const apex = { l: 93 * DEG, b: -4 * DEG };
  return 316 * (sinB * Math.sin(apex.b) + Math.cos(b) * Math.cos(apex.b) * Math.cos(l - apex.l));
}
