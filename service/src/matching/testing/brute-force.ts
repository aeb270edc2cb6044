const DEGREE = Math.PI / 180;

/**
 * Separation for tests, seconds of arc, by other formulas than the kernels': the haversine below 90 degrees, the
 * supplementary haversine (to the antipode) above. Differences of right ascension are taken in exact binary steps.
 */
export function testSeparation(ra1: number, dec1: number, ra2: number, dec2: number): number {
  const [low, high] = ra1 < ra2 ? [ra1, ra2] : [ra2, ra1];
  const dRa = (high - low > 180 ? low - (high - 360) : high - low) * DEGREE;
  const cosines = Math.cos(dec1 * DEGREE) * Math.cos(dec2 * DEGREE);
  const near = Math.sin(((dec2 - dec1) / 2) * DEGREE) ** 2 + cosines * Math.sin(dRa / 2) ** 2;
  const far = Math.sin(((dec2 + dec1) / 2) * DEGREE) ** 2 + cosines * Math.cos(dRa / 2) ** 2;
  return (2 * Math.atan2(Math.sqrt(near), Math.sqrt(far)) * 3600) / DEGREE;
}

/** A reproducible generator of numbers in [0, 1): mulberry32. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

export interface SkyPoints {
  raDeg: Float64Array;
  decDeg: Float64Array;
}

/** Points spread evenly over the sky between two declinations. */
export function evenSky(count: number, seed: number, decLowDeg = -90, decHighDeg = 90): SkyPoints {
  const random = seeded(seed);
  const low = Math.sin(decLowDeg * DEGREE);
  const high = Math.sin(decHighDeg * DEGREE);
  const raDeg = new Float64Array(count);
  const decDeg = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    raDeg[i] = 360 * random();
    decDeg[i] = Math.asin(low + (high - low) * random()) / DEGREE;
  }
  return { raDeg, decDeg };
}

/** Points near those given, each moved by up to `spreadDeg` on the sky; kept on the sphere and in [0, 360). */
export function near({ raDeg, decDeg }: SkyPoints, spreadDeg: number, seed: number): SkyPoints {
  const random = seeded(seed);
  const moved = { raDeg: new Float64Array(raDeg.length), decDeg: new Float64Array(raDeg.length) };
  for (let i = 0; i < raDeg.length; i++) {
    const dec = Math.max(-90, Math.min(90, decDeg[i]! + (2 * random() - 1) * spreadDeg));
    const ra = raDeg[i]! + ((2 * random() - 1) * spreadDeg) / Math.max(1e-9, Math.cos(dec * DEGREE));
    moved.raDeg[i] = (((ra % 360) + 360) % 360) % 360;
    moved.decDeg[i] = dec;
  }
  return moved;
}

/** Every pair within its position's radius, as 'position row' strings by position then row: all against all. */
export function brutePairs(positions: SkyPoints & { radiusArcsec: Float64Array }, rows: SkyPoints): string[] {
  const found: string[] = [];
  for (let p = 0; p < positions.raDeg.length; p++) {
    for (let r = 0; r < rows.raDeg.length; r++) {
      const apart = testSeparation(positions.raDeg[p]!, positions.decDeg[p]!, rows.raDeg[r]!, rows.decDeg[r]!);
      if (apart <= positions.radiusArcsec[p]!) found.push(`${p} ${r}`);
    }
  }
  return found;
}
