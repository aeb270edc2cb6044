import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/** A small invented field in which each detection shows one case a user must tell apart. */
export interface Universe {
  /** CSV text by file name. */
  files: Record<string, string>;
  /** What each detection is. */
  cases: Record<string, string>;
}

/** Mulberry32: the same field every time. */
function generator(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** Field of the galaxy table, degrees. */
export const FIELD = { raMin: 150, raMax: 158, decMin: 0, decMax: 6 };
export const FIELD_POLYGON = [
  [150, 0],
  [158, 0],
  [158, 6],
  [150, 6],
];
/** Galaxies a square degree without a part in any case. */
const BACKGROUND = 250;
/** Redshifts are complete to this r magnitude. */
export const REDSHIFT_DEPTH = 17.8;

/** Makes the tables: interferometer and single-dish detections, and galaxies with magnitudes, sizes and redshifts. */
export function makeUniverse(seed = 7): Universe {
  const random = generator(seed);
  const galaxies: string[] = ['galaxy,ra,dec,rmag,re_arcsec,cz_kms'];
  const fine: string[] = ['source,ra_deg,dec_deg,cz_kms,w50_kms,flux_jykms,snr'];
  const coarse: string[] = [...fine];
  const cases: Record<string, string> = {};
  const galaxy = (name: string, ra: number, dec: number, rmag: number, re: number, cz: number | '') =>
    galaxies.push([name, ra.toFixed(6), dec.toFixed(6), rmag.toFixed(3), re.toFixed(1), cz].join(','));
  const detection = (
    list: string[],
    name: string,
    ra: number,
    dec: number,
    cz: number | '',
    width: number,
    flux: number | '',
    snr: number,
  ) => {
    list.push([name, ra.toFixed(6), dec.toFixed(6), cz, width, flux, snr].join(','));
    cases[name] = name;
  };
  const arcsec = 1 / 3600;
  // About 40 Mpc away with 3e9 solar masses of HI: an ordinary host would have r near 14.
  detection(fine, 'ordinary', 151, 1, 2900, 150, 8.4, 20);
  galaxy('host of ordinary', 151 + 1.2 * arcsec, 1, 14.6, 12, 2912);
  detection(fine, 'faint host', 152.5, 4.5, 3000, 80, 8.4, 20);
  galaxy('faint thing', 152.5, 4.5 + 1 * arcsec, 20, 6, '');
  detection(fine, 'two hosts', 155.5, 1, 3100, 120, 8.4, 20);
  galaxy('first host', 155.5 + 2 * arcsec, 1, 15.1, 3, '');
  galaxy('second host', 155.5 - 2.2 * arcsec, 1, 15.2, 3, '');
  detection(fine, 'empty and alone', 154, 3, 3000, 60, 8.4, 20);
  detection(fine, 'empty with neighbour', 156.5, 4.5, 3300, 60, 8.4, 20);
  galaxy('big neighbour', 156.75, 4.6, 12.5, 30, 3350);
  detection(fine, 'uncovered', 165, 3, 3000, 60, 8.4, 20);
  detection(fine, 'slow cloud', 153.2, 1.2, 120, 22, 20, 20);
  detection(fine, 'without velocity', 157, 2, '', 60, 8.4, 20);
  detection(fine, 'without flux', 151.5, 5.2, 9000, 60, '', 20);
  detection(fine, 'behind', 153, 5.3, 4600, 60, 8.4, 20);
  galaxy('far galaxy', 153 + 2 * arcsec, 5.3, 16.8, 3, 25_000);
  detection(coarse, 'crowded beam', 157.2, 0.8, 6100, 160, 6, 20);
  galaxy('left galaxy', 157.2 + 40 * arcsec, 0.8, 15.3, 6, 6080);
  galaxy('right galaxy', 157.2 - 35 * arcsec, 0.8, 15.4, 6, 6120);
  const area = (FIELD.raMax - FIELD.raMin) * (FIELD.decMax - FIELD.decMin);
  for (let i = 0; i < BACKGROUND * area; i++) {
    const ra = FIELD.raMin + (FIELD.raMax - FIELD.raMin) * random();
    const dec = FIELD.decMin + (FIELD.decMax - FIELD.decMin) * random();
    const rmag = 23 + Math.log10(random() + 1e-6) / 0.45;
    const cz = rmag < REDSHIFT_DEPTH ? Math.round(15_000 + 45_000 * random()) : '';
    // Keeps the few square arcsec of the cases clear, so that each shows its one thing.
    const near = [...fine, ...coarse].some((line) => {
      const [, r, d] = line.split(',');
      return Math.hypot(Number(r) - ra, Number(d) - dec) < 120 * arcsec;
    });
    if (!near) galaxy(`g${i}`, ra, dec, rmag, 0.8 + random(), cz);
  }
  return {
    files: {
      'fine.csv': `${fine.join('\n')}\n`,
      'coarse.csv': `${coarse.join('\n')}\n`,
      'galaxies.csv': `${galaxies.join('\n')}\n`,
    },
    cases,
  };
}

/** Depth of the galaxy table: deep enough for a claim, too shallow for one, or not stated. */
export type Depth = number | null;

/** A plan over the tables. */
export function planOf(depth: Depth, more: Record<string, unknown> = {}, galaxySettings: Record<string, unknown> = {}) {
  const columns = {
    name: 'source',
    ra: 'ra_deg',
    dec: 'dec_deg',
    velocity: 'cz_kms',
    width50: 'w50_kms',
    flux: 'flux_jykms',
    signalToNoise: 'snr',
  };
  const velocity = { convention: 'optical', frame: 'barycentric' };
  return {
    survey: { name: 'an invented field' },
    tables: [
      {
        file: 'fine.csv',
        settings: { kind: 'hi', columns, velocity, beamArcsec: { major: 30, minor: 30, angleDeg: 0 } },
      },
      {
        file: 'coarse.csv',
        settings: { kind: 'hi', columns, velocity, beamArcsec: { major: 210, minor: 210, angleDeg: 0 } },
      },
      {
        file: 'galaxies.csv',
        settings: {
          kind: 'optical',
          name: 'galaxies',
          columns: {
            name: 'galaxy',
            ra: 'ra',
            dec: 'dec',
            velocity: 'cz_kms',
            effectiveRadius: 're_arcsec',
            magnitudes: [{ column: 'rmag', band: 'r' }],
          },
          bands: [{ name: 'r', system: 'AB', depth5Sigma: depth, seeingFwhmArcsec: 1 }],
          redshiftDepth: { band: 'r', magnitude: REDSHIFT_DEPTH },
          footprint: { type: 'polygons', value: [FIELD_POLYGON] },
          ...galaxySettings,
        },
      },
    ],
    criteria: { robustness: { draws: 200 }, control: { offsetsPerSource: 4 } },
    ...more,
  };
}

/** Writes tables and plan into a folder. @returns path of the plan */
export function writePlan(folder: string, plan: unknown, universe = makeUniverse()): string {
  mkdirSync(folder, { recursive: true });
  for (const [name, text] of Object.entries(universe.files)) writeFileSync(join(folder, name), text);
  const path = join(folder, 'plan.json');
  writeFileSync(path, JSON.stringify(plan, null, 2));
  return path;
}
