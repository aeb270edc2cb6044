import { type Random, randomStream } from '@eremite/shared/science/robustness/random';
import type { Assumptions } from './assumptions.ts';
import { drawGas, type Gas } from './draw-gas.ts';
import { drawStars, isSeen, SEEING_ARCSEC, type Stars } from './draw-stars.ts';

const DEG = Math.PI / 180;
const C_KMS = 299_792.458;
/** Corner of the field, degrees; it is a box in right ascension and in the sine of declination. */
const CORNER = { raDeg: 150, decDeg: -4 };
/** Stated 5-sigma depths in r of the western and of the eastern table, AB. */
export const DEPTHS = { west: 23.4, east: 22 } as const;
/** Redshifts are taken of nearly all galaxies brighter than this r. */
export const REDSHIFT_DEPTH = 17.8;
const REDSHIFT_SHARE = 0.95;
const BAD_SHARE = 0.004;
/** Number counts of galaxies, N(< r) per square degree: a straight line through Yasuda et al. (2001), from memory. */
const COUNTS = { at20: 1050, slope: 0.4, brightest: 12, faintest: 23.5 };
/** Offset tail of a single dish: the starting points of the criteria. */
const TAIL = { share: 0.12, arcsec: 28 };
const BEAM_ARCSEC = 210;
const SYSTEMATIC_ARCSEC = 10;

/** A row of a table of galaxies; `truth` is the detection whose counterpart it is, -1 for none. */
export interface GalaxyRow {
  raDeg: number;
  decDeg: number;
  r: number;
  radiusArcsec: number;
  czKms: number;
  truth: number;
}

export interface DrawnDetection extends Gas {
  raDeg: number;
  decDeg: number;
  /** It has no stars at all. */
  dark: boolean;
  /** Its counterpart is a row of a table (a shredded one is not). */
  catalogued: boolean;
}

export interface DrawnUniverse {
  beamArcsec: number;
  seeingArcsec: number;
  detections: DrawnDetection[];
  /** Galaxies west and east of the middle of the field, each as deep as its table. */
  west: GalaxyRow[];
  east: GalaxyRow[];
  brightStars: { raDeg: number; decDeg: number; g: number }[];
  /** West and east halves, corners in degrees. */
  halves: Record<'west' | 'east', [number, number][]>;
}

/** Draws a universe whose truth is known: same assumptions, same universe. */
export function drawUniverse(assumptions: Assumptions): DrawnUniverse {
  const { seed, sideDeg } = assumptions;
  const place = random2d(randomStream(seed, 'places'), sideDeg);
  const middle = CORNER.raDeg + sideDeg / 2;
  const brightStars = drawBrightStars(randomStream(seed, 'stars'), place, sideDeg);
  const hidden = maskTest(brightStars);
  const west: GalaxyRow[] = [];
  const east: GalaxyRow[] = [];
  const sight = randomStream(seed, 'catalogue');
  const put = (row: GalaxyRow): boolean => {
    if (!(row.r < 40) || hidden(row.raDeg, row.decDeg)) return false;
    const [table, depth] = row.raDeg < middle ? [west, DEPTHS.west] : [east, DEPTHS.east];
    if (!isSeen(row.r, row.radiusArcsec, depth + assumptions.depthErrorMag, sight)) return false;
    const hasRedshift = row.r < REDSHIFT_DEPTH && sight.uniform() < REDSHIFT_SHARE;
    const bad = sight.uniform() < BAD_SHARE;
    const czKms = !hasRedshift ? NaN : bad ? 60_000 * sight.uniform() : row.czKms + 30 * sight.gaussian();
    table.push({ ...row, czKms });
    return true;
  };
  const detections = drawDetections(assumptions, place, put);
  drawBackground(randomStream(seed, 'background'), place, sideDeg ** 2, put);
  const half = (from: number, to: number): [number, number][] =>
    [
      [from, CORNER.decDeg],
      [to, CORNER.decDeg],
      [to, CORNER.decDeg + sideDeg],
      [from, CORNER.decDeg + sideDeg],
    ] as [number, number][];
  return {
    beamArcsec: BEAM_ARCSEC,
    seeingArcsec: SEEING_ARCSEC,
    detections,
    west,
    east,
    brightStars,
    halves: { west: half(CORNER.raDeg, middle), east: half(middle, CORNER.raDeg + sideDeg) },
  };
}

type Put = (row: GalaxyRow) => boolean;
type PlaceOf = () => { raDeg: number; decDeg: number };

function drawDetections(assumptions: Assumptions, place: PlaceOf, put: Put): DrawnDetection[] {
  const { seed, detections: count } = assumptions;
  const gas = drawGas(randomStream(seed, 'gas'), count);
  const random = randomStream(seed, 'counterparts');
  return gas.map((cloud, i) => {
    const at = place();
    const dark = random.uniform() < assumptions.darkShare;
    const stars = drawStars(cloud, random);
    const shredded = random.uniform() < assumptions.shreddedShare;
    // Stars and gas differ by 30 km/s, or a quarter of the width of a fast rotator.
    const apart = Math.max(30, cloud.width50Kms / 4) * random.gaussian();
    const galaxy = { ...at, ...stars, czKms: cloud.czKms + apart, truth: i };
    const catalogued = !dark && (shredded ? (shred(galaxy, random, put), false) : put(galaxy));
    for (let k = poisson(assumptions.companions, random); k > 0; k--) put(companion(cloud, at, random));
    const sigma = assumptions.centroidFactor * Math.hypot((0.6 * BEAM_ARCSEC) / cloud.signalToNoise, SYSTEMATIC_ARCSEC);
    const wide = random.uniform() < TAIL.share ? Math.hypot(sigma, TAIL.arcsec) : sigma;
    return { ...cloud, ...moved(at, wide * random.gaussian(), wide * random.gaussian()), dark, catalogued };
  });
}

/** Pieces of a galaxy, each a small part of its light, inside twice its half-light radius. */
function shred(galaxy: GalaxyRow & Stars, random: Random, put: Put): void {
  const pieces = 4 + Math.floor(5 * random.uniform());
  for (let k = 0; k < pieces; k++) {
    const share = 0.03 + 0.07 * random.uniform();
    const reach = 1.2 * galaxy.radiusArcsec;
    put({
      ...galaxy,
      ...moved(galaxy, reach * random.gaussian(), reach * random.gaussian()),
      r: galaxy.r - 2.5 * Math.log10(share),
      radiusArcsec: 0.7 + 0.5 * random.uniform(),
    });
  }
}

/** A galaxy that shares the velocity of the gas without having it: projected within 300 kpc, M_r from -21 to -15. */
function companion(cloud: Gas, at: { raDeg: number; decDeg: number }, random: Random): GalaxyRow {
  const kpc = 25 + 275 * Math.sqrt(random.uniform());
  const angle = 2 * Math.PI * random.uniform();
  const arcsec = (kpc / 1000 / cloud.distanceMpc) * 206_265;
  const r = -21 + 6 * random.uniform() ** 0.7 + 5 * Math.log10(cloud.distanceMpc) + 25;
  return {
    ...moved(at, arcsec * Math.sin(angle), arcsec * Math.cos(angle)),
    r,
    radiusArcsec: (3 / cloud.distanceMpc) * 206.265 * 10 ** (-0.1 * (r - 5 * Math.log10(cloud.distanceMpc) - 5)),
    czKms: cloud.czKms + 150 * random.gaussian(),
    truth: -1,
  };
}

function drawBackground(random: Random, place: PlaceOf, area: number, put: Put): void {
  const { at20, slope, brightest, faintest } = COUNTS;
  const count = poisson(area * at20 * 10 ** (slope * (faintest - 20)), random);
  const bright = 10 ** (slope * (brightest - faintest));
  for (let k = 0; k < count; k++) {
    const r = faintest + Math.log10(bright + (1 - bright) * random.uniform()) / slope;
    const z = 0.09 * 10 ** (0.14 * (r - 17.5)) * Math.exp(0.5 * random.gaussian());
    put({
      ...place(),
      r,
      radiusArcsec: 10 ** (0.4 - 0.09 * (r - 18) + 0.15 * random.gaussian()),
      czKms: C_KMS * Math.min(0.5, Math.max(0.002, z)),
      truth: -1,
    });
  }
}

/** Stars with G from 6 to 13, a few tens per square degree at high latitude (slope 0.28 dex, from memory). */
function drawBrightStars(random: Random, place: PlaceOf, sideDeg: number) {
  return Array.from({ length: poisson(25 * sideDeg ** 2, random) }, () => ({
    ...place(),
    g: Math.max(6, 13 + Math.log10(1 - random.uniform()) / 0.28),
  }));
}

/** Whether a place lies under a bright star: 1630 x 1.396^-G arcsec (Legacy Surveys relation). */
function maskTest(stars: readonly { raDeg: number; decDeg: number; g: number }[]) {
  const cells = new Map<string, { raDeg: number; decDeg: number; radius: number }[]>();
  const key = (ra: number, dec: number) => `${Math.floor(ra * 10)}/${Math.floor(dec * 10)}`;
  for (const { raDeg, decDeg, g } of stars) {
    const radius = (1630 * 1.396 ** -g) / 3600;
    for (let i = -1; i <= 1; i++)
      for (let j = -1; j <= 1; j++) {
        const cell = key(raDeg + 0.1 * i, decDeg + 0.1 * j);
        cells.set(cell, [...(cells.get(cell) ?? []), { raDeg, decDeg, radius }]);
      }
  }
  return (ra: number, dec: number): boolean =>
    (cells.get(key(ra, dec)) ?? []).some(
      (star) => Math.hypot((star.raDeg - ra) * Math.cos(dec * DEG), star.decDeg - dec) < star.radius,
    );
}

function random2d(random: Random, sideDeg: number): PlaceOf {
  const low = Math.sin(CORNER.decDeg * DEG);
  const high = Math.sin((CORNER.decDeg + sideDeg) * DEG);
  return () => ({
    raDeg: CORNER.raDeg + sideDeg * random.uniform(),
    decDeg: Math.asin(low + (high - low) * random.uniform()) / DEG,
  });
}

function moved({ raDeg, decDeg }: { raDeg: number; decDeg: number }, eastArcsec: number, northArcsec: number) {
  return {
    raDeg: raDeg + eastArcsec / 3600 / Math.cos(decDeg * DEG),
    decDeg: decDeg + northArcsec / 3600,
  };
}

/** Poisson deviate: by waiting times below 50, by the normal law above. */
function poisson(mean: number, random: Random): number {
  if (mean > 50) return Math.max(0, Math.round(mean + Math.sqrt(mean) * random.gaussian()));
  let count = -1;
  for (let sum = 0; sum < mean; count++) sum -= Math.log(1 - random.uniform());
  return Math.max(0, count);
}
