import { FIELD, moved } from './field.ts';
import { darkAt, galaxyAt, type Place, type Source, withStars } from './galaxy.ts';
import type { Random } from './random.ts';

export interface Star {
  raDeg: number;
  decDeg: number;
  gMag: number;
}

/** The cases a user must be able to tell apart, each at a place of its own in the strip. */
export interface Stories {
  sources: Source[];
  /** Places to be emptied of ordinary galaxies first: within `radiusMpc` and `windowKms`. */
  cleared: { place: Place; radiusMpc: number; windowKms: number }[];
  stars: Star[];
}

export function tellStories(random: Random): Stories {
  const sources: Source[] = [];
  const cleared: Stories['cleared'] = [];
  const stars: Star[] = [];
  let slot = 0;
  // Places run along the strip so that no two stories share a beam.
  const next = (distanceMpc: number): Place => {
    const raDeg = FIELD.raMin + 0.18 + ((slot * 0.61803) % 1) * (FIELD.raMax - FIELD.raMin - 0.36);
    const decDeg = FIELD.decMin + 0.18 + ((slot * 0.7548777) % 1) * (FIELD.decMax - FIELD.decMin - 0.36);
    slot += 1;
    return { raDeg, decDeg, distanceMpc, peculiarKms: 0 };
  };
  const beside = (place: Place, kpc: number, angleDeg: number, kms: number): Place => {
    const arcsec = (kpc / 1000 / place.distanceMpc) * 206_265;
    const angle = (angleDeg * Math.PI) / 180;
    const [raDeg, decDeg] = moved(place.raDeg, place.decDeg, arcsec * Math.sin(angle), arcsec * Math.cos(angle));
    return { raDeg, decDeg, distanceMpc: place.distanceMpc, peculiarKms: place.peculiarKms + kms };
  };

  for (const [logHi, distance] of [
    [9.05, 13.5],
    [9.75, 56],
    [9.8, 64],
    [9.9, 73],
    [9.95, 82],
  ] as const) {
    const place = next(distance);
    cleared.push({ place, radiusMpc: 1.25, windowKms: 750 });
    sources.push(darkAt(place, logHi, random, 'dark and alone'));
  }
  for (const [logHi, distance, kpc, kms] of [
    [9.25, 33.5, 120, 110],
    [9.3, 29, 70, -60],
    [9.4, 45, 190, 150],
  ] as const) {
    const place = next(distance);
    cleared.push({ place, radiusMpc: 0.6, windowKms: 600 });
    sources.push(darkAt(place, logHi, random, 'dark with a gas-rich neighbour'));
    sources.push(
      withStars(beside(place, kpc, random.uniform(0, 360), kms), 9.95, -20.3, 10, 4.2, random, 'gas-rich neighbour'),
    );
  }
  for (const [logHi, distance] of [
    [9.1, 26],
    [9.0, 21],
    [9.3, 37],
    [9.2, 31],
  ] as const) {
    const luminosity = 10 ** logHi / random.uniform(32, 60);
    const place = next(distance);
    cleared.push({ place, radiusMpc: 0.8, windowKms: 600 });
    const absoluteR = 4.65 - 2.5 * Math.log10(luminosity);
    sources.push(
      withStars(
        place,
        logHi,
        absoluteR,
        Math.log10(luminosity * 0.5),
        random.uniform(0.9, 1.4),
        random,
        'low surface brightness',
      ),
    );
  }
  for (const [a, b, distance] of [
    [9.35, 9.25, 62],
    [9.5, 9.45, 78],
    [9.2, 9.1, 47],
  ] as const) {
    const place = next(distance);
    sources.push(withStars(place, a, -18.4, 9.2, 3.1, random, 'two in a beam'));
    sources.push(
      withStars(
        beside(place, (18 * distance) / 206.265, random.uniform(0, 360), 40),
        b,
        -18.1,
        9.1,
        2.9,
        random,
        'two in a beam',
      ),
    );
  }
  for (const [logHi, distance] of [
    [8.7, 92],
    [8.75, 105],
    [8.6, 80],
    [8.65, 88],
  ] as const) {
    sources.push(darkAt(next(distance), logHi, random, 'too shallow'));
  }
  for (const gMag of [6.4, 7.1]) {
    const place = next(30);
    const [raDeg, decDeg] = moved(place.raDeg, place.decDeg, 18, -12);
    stars.push({ raDeg, decDeg, gMag });
    sources.push(darkAt(place, 9.3, random, 'masked by a star'));
  }
  for (const [logHi, distance] of [
    [9.3, 32],
    [9.5, 48],
  ] as const) {
    const place = { ...next(distance), raDeg: FIELD.raMax + 0.12 };
    sources.push(darkAt(place, logHi, random, 'not covered'));
  }
  for (const [kms, width, flux] of [
    [-182, 22, 3.1],
    [-241, 26, 1.9],
    [-203, 19, 0.9],
  ] as const) {
    const place = next(1);
    sources.push({
      ...darkAt(place, Math.log10(2.356e5 * flux), random, 'high-velocity cloud'),
      czKms: kms,
      width50Kms: width,
    });
  }
  {
    const place = next(3.4);
    const dwarf = withStars(place, 7.4, -13.2, 7, 0.5, random, 'distance unusable');
    sources.push({ ...dwarf, czKms: 238 });
    sources.push({ ...galaxyAt(next(40), 9.2, random, 'no velocity measured') });
  }
  for (const distance of [110, 125]) {
    const place = next(distance);
    // A second of arc either way: less than the error of the gas position, more than the half-light radius.
    for (const angle of [70, 250]) {
      const host = beside(place, distance / 206.265, angle, 0);
      sources.push({ ...withStars(host, NaN, -15.9, 8, 0.5, random, 'contested host'), width50Kms: NaN });
    }
    sources.push(darkAt(place, 9.0, random, 'contested'));
  }
  return { sources, cleared, stars };
}
