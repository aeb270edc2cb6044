import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';

export interface DemoTable {
  file: string;
  settings: IntakeSettings;
}

const REFERENCE = 'Invented for the demo; see testdata/README.md.';

/** The tables of the Halcyon Strip and how they are read. */
export const DEMO_TABLES: readonly DemoTable[] = [
  {
    file: 'halcyon-hi.csv',
    settings: {
      kind: 'hi',
      name: 'Halcyon HI list',
      columns: {
        name: 'hly_id',
        ra: 'ra_deg',
        dec: 'dec_deg',
        velocity: 'cz_kms',
        velocityError: 'e_cz_kms',
        width50: 'w50_kms',
        flux: 'flux_jykms',
        fluxError: 'e_flux_jykms',
        signalToNoise: 'snr',
        reliability: 'reliability',
      },
      units: { ra: 'deg', dec: 'deg', velocity: 'km/s', flux: 'Jy km/s' },
      frame: 'icrs',
      velocity: { convention: 'optical', frame: 'barycentric' },
      beamArcsec: { major: 45, minor: 45, angleDeg: 0 },
      reference: REFERENCE,
    },
  },
  {
    file: 'halcyon-deep.csv.gz',
    settings: {
      kind: 'optical',
      name: 'Halcyon deep g, r',
      columns: {
        name: 'gid',
        ra: 'ra_deg',
        dec: 'dec_deg',
        effectiveRadius: 're_arcsec',
        starGalaxy: 'p_star',
        reddening: 'ebv',
        magnitudes: [
          { column: 'r_mag', error: 'e_r_mag', band: 'r' },
          { column: 'g_mag', error: 'e_g_mag', band: 'g' },
        ],
      },
      frame: 'icrs',
      positionErrorArcsec: 0.2,
      errorMeaning: 'sigma1d',
      bands: [
        { name: 'r', system: 'AB', depth5Sigma: 24.4, seeingFwhmArcsec: 1.2, extinction: 'column' },
        { name: 'g', system: 'AB', depth5Sigma: 24.9, seeingFwhmArcsec: 1.3, extinction: 'column' },
      ],
      footprint: { type: 'rows' },
      reference: REFERENCE,
    },
  },
  {
    file: 'halcyon-nuv.vot.gz',
    settings: {
      kind: 'ultraviolet',
      name: 'Halcyon NUV',
      columns: { name: 'uid', ra: 'ra', dec: 'dec', magnitudes: [{ column: 'nuv', error: 'e_nuv', band: 'NUV' }] },
      frame: 'icrs',
      positionErrorArcsec: 0.9,
      errorMeaning: 'sigma1d',
      bands: [{ name: 'NUV', system: 'AB', depth5Sigma: 22.7, seeingFwhmArcsec: 5.3, extinction: 'none' }],
      footprint: {
        type: 'polygons',
        value: [
          [
            [46.9, 13.1],
            [50.6, 13.1],
            [50.6, 15.1],
            [46.9, 15.1],
          ],
        ],
      },
      reference: REFERENCE,
    },
  },
  {
    file: 'halcyon-w1.tsv.gz',
    settings: {
      kind: 'infrared',
      name: 'Halcyon W1',
      columns: {
        name: 'iid',
        ra: 'ra_deg',
        dec: 'dec_deg',
        magnitudes: [{ column: 'w1_mag', error: 'e_w1_mag', band: 'W1' }],
      },
      frame: 'icrs',
      positionErrorArcsec: 0.4,
      errorMeaning: 'sigma1d',
      bands: [{ name: 'W1', system: 'Vega', depth5Sigma: 16.9, seeingFwhmArcsec: 6.1, extinction: 'none' }],
      footprint: {
        type: 'polygons',
        value: [
          [
            [45.6, 13.1],
            [50.6, 13.1],
            [50.6, 15.1],
            [45.6, 15.1],
          ],
        ],
      },
      reference: REFERENCE,
    },
  },
  {
    file: 'halcyon-redshifts.csv.gz',
    settings: {
      kind: 'optical',
      name: 'Halcyon redshifts',
      columns: {
        name: 'zid',
        ra: 'ra_deg',
        dec: 'dec_deg',
        redshift: 'z',
        redshiftError: 'e_z',
        redshiftQuality: 'z_quality',
        magnitudes: [{ column: 'r_mag', band: 'r' }],
      },
      frame: 'icrs',
      velocity: { convention: 'optical', frame: 'barycentric' },
      positionErrorArcsec: 0.2,
      errorMeaning: 'sigma1d',
      bands: [{ name: 'r', system: 'AB', depth5Sigma: 17.77, extinction: 'none' }],
      redshiftDepth: { band: 'r', magnitude: 17.77 },
      footprint: {
        type: 'polygons',
        value: [
          [
            [38.5, 6],
            [57.5, 6],
            [57.5, 22],
            [38.5, 22],
          ],
        ],
      },
      reference: REFERENCE,
    },
  },
  {
    file: 'halcyon-stars.csv',
    settings: {
      kind: 'stars',
      name: 'Halcyon bright stars',
      columns: { name: 'sid', ra: 'ra_deg', dec: 'dec_deg', magnitudes: [{ column: 'g_mag', band: 'G' }] },
      frame: 'icrs',
      bands: [{ name: 'G', system: 'Vega', extinction: 'none' }],
      reference: REFERENCE,
    },
  },
];

/** Where the demo's files lie, from the bundle or from the source. */
export function demoFile(name: string): string {
  const beside = new URL(`../../testdata/demo/${name}`, import.meta.url);
  return fileURLToPath(existsSync(beside) ? beside : new URL(`../../../../testdata/demo/${name}`, import.meta.url));
}
