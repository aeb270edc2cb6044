import { areaSqDeg, FIELD } from './field.ts';
import { galaxyAt, type Place, type Source } from './galaxy.ts';
import type { Random } from './random.ts';

const { wide } = FIELD;
const DEG = Math.PI / 180;

/** HI mass function, Jones et al. (2018): alpha -1.25, log M* 9.94, phi* 4.5e-3 Mpc^-3 dex-scaled (from memory). */
function massFunction(): { values: number[]; cumulative: number[]; density: number } {
  const values: number[] = [];
  const cumulative: number[] = [];
  let density = 0;
  for (let logM = 7.2; logM <= 11; logM += 0.02) {
    const x = 10 ** (logM - 9.94);
    density += Math.LN10 * 4.5e-3 * x ** (-1.25 + 1) * Math.exp(-x) * 0.02;
    values.push(logM);
    cumulative.push(density);
  }
  return { values, cumulative, density };
}

/** Nearest and farthest distance of the volume, Mpc. */
const NEAR = 8;
const FAR = 290;

function placeIn(random: Random): Place {
  const sinDec = random.uniform(Math.sin(wide.decMin * DEG), Math.sin(wide.decMax * DEG));
  return {
    raDeg: random.uniform(wide.raMin, wide.raMax),
    decDeg: Math.asin(sinDec) / DEG,
    distanceMpc: Math.cbrt(random.uniform(NEAR ** 3, FAR ** 3)),
    peculiarKms: random.normal(0, 150),
  };
}

/** A place near another: groups of galaxies with a power-law profile out to about 1 Mpc and 120 km/s. */
function placeNear(centre: Place, random: Random): Place {
  const radiusMpc = 0.03 + 0.9 * random.uniform() ** 2;
  const angle = random.uniform(0, 2 * Math.PI);
  const offsetDeg = radiusMpc / centre.distanceMpc / DEG;
  return {
    raDeg: centre.raDeg + (offsetDeg * Math.cos(angle)) / Math.cos(centre.decDeg * DEG),
    decDeg: centre.decDeg + offsetDeg * Math.sin(angle),
    distanceMpc: centre.distanceMpc,
    peculiarKms: centre.peculiarKms + random.normal(0, 120),
  };
}

/**
 * Galaxies with gas in the volume behind the wide field: an HI mass function, a third of them in small groups.
 * Those too faint for every table are dropped as they are drawn (they could only matter within 30 Mpc).
 */
export function makeGalaxies(random: Random): Source[] {
  const { values, cumulative, density } = massFunction();
  const steradian = areaSqDeg(wide.raMin, wide.raMax, wide.decMin, wide.decMax) * DEG ** 2;
  const expected = (density * steradian * (FAR ** 3 - NEAR ** 3)) / 3;
  const galaxies: Source[] = [];
  let centre: Place | undefined;
  for (let left = random.poisson(expected); left > 0; left -= 1) {
    const clustered = centre !== undefined && random.uniform() < 0.4;
    const place = clustered ? placeNear(centre!, random) : placeIn(random);
    if (!clustered) centre = place;
    const logHi = random.fromCumulative(values, cumulative);
    if (logHi < 8 && place.distanceMpc > 60) continue;
    if (logHi < 8.8 && place.distanceMpc > 130) continue;
    galaxies.push(galaxyAt(place, logHi, random));
  }
  return galaxies;
}

/**
 * Galaxies per square degree brighter than r, a smooth line through published counts
 * (Yasuda et al. 2001, AJ 122, 1104; Metcalfe et al. 2001, MNRAS 323, 795; both from memory).
 */
const COUNTS: readonly [number, number][] = [
  [14, 0.9],
  [15, 3.6],
  [16, 14],
  [17, 45],
  [17.77, 95],
  [18.5, 230],
  [19, 390],
  [20, 1050],
  [21, 2700],
  [22, 6400],
  [23, 14_000],
];

/** Distant galaxies behind the strip down to the catalogue's cut, without gas that the survey could see. */
export function makeBackground(
  random: Random,
  box: { raMin: number; raMax: number; decMin: number; decMax: number },
  faintest: number,
): Source[] {
  const area = areaSqDeg(box.raMin, box.raMax, box.decMin, box.decMax);
  const table = COUNTS.filter(([mag]) => mag <= faintest);
  const values = table.map(([mag]) => mag);
  const cumulative = table.map(([, count]) => count);
  const sources: Source[] = [];
  for (let left = random.poisson(cumulative.at(-1)! * area); left > 0; left -= 1) {
    const rMag = random.fromCumulative(values, cumulative);
    const z = Math.min(0.6, Math.max(0.065, 0.1 * 10 ** (0.13 * (rMag - 17.77)) * Math.exp(random.normal(0, 0.35))));
    const red = random.uniform() < 0.45;
    sources.push({
      raDeg: random.uniform(box.raMin, box.raMax),
      decDeg: Math.asin(random.uniform(Math.sin(box.decMin * DEG), Math.sin(box.decMax * DEG))) / DEG,
      czKms: z * 299_792.458,
      distanceMpc: NaN,
      logHi: NaN,
      rMag,
      gMag: rMag + (red ? 1.15 : 0.7) + random.normal(0, 0.18),
      nuvMag: rMag + (red ? 5 : 2.9) + random.normal(0, 0.6),
      w1Mag: rMag - (red ? 3.4 : 2.6) + random.normal(0, 0.4),
      effectiveRadiusArcsec: Math.max(0.25, 10 ** (0.42 - 0.09 * (rMag - 18) + random.normal(0, 0.18))),
      width50Kms: NaN,
      story: 'background',
    });
  }
  return sources;
}
