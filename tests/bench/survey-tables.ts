import { closeSync, openSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { seeded } from '@eremite/service/matching/testing/brute-force.ts';

/** Where the survey lies: a band of the sky as large single-dish surveys cover, degrees. */
const RA = { low: 112.5, high: 247.5 };
const DEC = { low: 0, high: 36 };
const DEGREE = Math.PI / 180;
/** Share of detections with a galaxy of stars in the tables. */
const WITH_COUNTERPART = 0.9;
const H0 = 70;
/** 1-D error of the HI positions, arcsec: that of a beam of 210 arcsec at S/N 10 with the systematic term. */
const OFFSET_ARCSEC = 16;

/** The catalogues beside the HI list: band, limit, and share of rows with a velocity. */
const CATALOGUES = [
  { name: 'deep', kind: 'optical', band: 'r', system: 'AB', depth: 22.5, colour: 0, moving: 0 },
  { name: 'near', kind: 'infrared', band: 'J', system: 'Vega', depth: 19.5, colour: -1.2, moving: 0 },
  { name: 'violet', kind: 'ultraviolet', band: 'NUV', system: 'AB', depth: 22.7, colour: 1.4, moving: 0 },
  { name: 'redshifts', kind: 'optical', band: 'g', system: 'AB', depth: 20.5, colour: 0.5, moving: 0.3 },
] as const;

/** A normal deviate by the polar method's simpler kin: the sum of twelve uniform ones, good to three sigma. */
const normal = (random: () => number): number => {
  let sum = -6;
  for (let i = 0; i < 12; i++) sum += random();
  return sum;
};

/** Writes lines piece by piece: a million of them need not be in memory at once. */
class Lines {
  private readonly handle: number;
  private text: string;
  constructor(path: string, header: string) {
    this.handle = openSync(path, 'w');
    this.text = `${header}\n`;
  }
  add(line: string): void {
    this.text += `${line}\n`;
    if (this.text.length > 1 << 20) this.flush();
  }
  private flush(): void {
    writeSync(this.handle, this.text);
    this.text = '';
  }
  close(): void {
    this.flush();
    closeSync(this.handle);
  }
}

interface Gas {
  raDeg: number;
  decDeg: number;
  czKms: number;
  rMag: number;
}

function place(random: () => number): { raDeg: number; decDeg: number } {
  const low = Math.sin(DEC.low * DEGREE);
  const high = Math.sin(DEC.high * DEGREE);
  return {
    raDeg: RA.low + (RA.high - RA.low) * random(),
    decDeg: Math.asin(low + (high - low) * random()) / DEGREE,
  };
}

function writeDetections(folder: string, count: number): Gas[] {
  const random = seeded(11);
  const file = new Lines(join(folder, 'hi.csv'), 'name,ra_deg,dec_deg,cz_kms,w50_kms,flux_jykms,snr,reliability');
  const gas: Gas[] = [];
  for (let i = 0; i < count; i++) {
    const { raDeg, decDeg } = place(random);
    const czKms = 1000 + 14_000 * Math.sqrt(random());
    const distance = czKms / H0;
    const logMass = 9.5 + 0.45 * normal(random);
    const flux = 10 ** logMass / (2.356e5 * distance * distance);
    // Stars that go with the gas: log M* = 9 + 1.1 (log M_HI - 9.5), M/L_r 0.75, scatter 1.3 mag.
    const logLight = 9 + 1.1 * (logMass - 9.5) - Math.log10(0.75) + 0.52 * normal(random);
    const rMag = 4.65 - 2.5 * logLight + 5 * Math.log10(distance) + 25;
    gas.push({ raDeg, decDeg, czKms, rMag });
    const numbers = [raDeg.toFixed(6), decDeg.toFixed(6), czKms.toFixed(1), 120, flux.toFixed(4), 10, 0.99];
    file.add(`H${i},${numbers.join(',')}`);
  }
  file.close();
  return gas;
}

function writeCatalogue(
  folder: string,
  { name, band, depth, colour, moving }: (typeof CATALOGUES)[number],
  rows: number,
  gas: readonly Gas[],
  seed: number,
): void {
  const random = seeded(seed);
  const file = new Lines(join(folder, `${name}.csv`), `id,ra,dec,${band}mag${moving > 0 ? ',cz_kms' : ''}`);
  let written = 0;
  const add = (raDeg: number, decDeg: number, magnitude: number, czKms: number) => {
    const cz = moving > 0 ? `,${czKms > 0 ? czKms.toFixed(1) : ''}` : '';
    file.add(`${name}-${written++},${raDeg.toFixed(7)},${decDeg.toFixed(7)},${magnitude.toFixed(3)}${cz}`);
  };
  // The same galaxy is left out of every table or of none, so the draw does not depend on the table.
  const stars = seeded(13);
  for (const { raDeg, decDeg, czKms, rMag } of gas) {
    const has = stars() < WITH_COUNTERPART;
    const east = (OFFSET_ARCSEC * normal(stars)) / 3600;
    const north = (OFFSET_ARCSEC * normal(stars)) / 3600;
    const magnitude = rMag + colour + 0.2 * normal(random);
    if (!has || magnitude > depth || written >= rows) continue;
    add(raDeg + east / Math.cos(decDeg * DEGREE), decDeg + north, magnitude, czKms + 20 * normal(random));
  }
  while (written < rows) {
    const { raDeg, decDeg } = place(random);
    const magnitude = depth + Math.log10(random()) / 0.45;
    add(raDeg, decDeg, magnitude, random() < moving ? 500 + 19_500 * random() : NaN);
  }
  file.close();
}

/**
 * Writes an invented survey: `hi.csv`, four catalogues, and `plan.json`, which leaves out draws and shifted positions.
 *
 * @param folder an existing folder
 * @returns the plan, as written
 */
export function writeSurvey(folder: string, detections: number, rows: number) {
  const gas = writeDetections(folder, detections);
  CATALOGUES.forEach((catalogue, i) => writeCatalogue(folder, catalogue, rows, gas, 20 + i));
  const footprint = {
    type: 'polygons',
    value: [
      [
        [RA.low, DEC.low],
        [180, DEC.low],
        [RA.high, DEC.low],
        [RA.high, DEC.high],
        [180, DEC.high],
        [RA.low, DEC.high],
      ],
    ],
  };
  const plan = {
    survey: { name: 'bench', cosmology: { h0: H0, omegaM: 0.3 } },
    tables: [
      {
        file: 'hi.csv',
        settings: {
          kind: 'hi',
          columns: {
            name: 'name',
            ra: 'ra_deg',
            dec: 'dec_deg',
            velocity: 'cz_kms',
            width50: 'w50_kms',
            flux: 'flux_jykms',
            signalToNoise: 'snr',
            reliability: 'reliability',
          },
          velocity: { convention: 'optical', frame: 'barycentric' },
          beamArcsec: { major: 210, minor: 210 },
        },
      },
      ...CATALOGUES.map(({ name, kind, band, system, depth, moving }) => ({
        file: `${name}.csv`,
        settings: {
          kind,
          columns: {
            name: 'id',
            ra: 'ra',
            dec: 'dec',
            magnitudes: [{ column: `${band}mag`, band }],
            ...(moving > 0 && { velocity: 'cz_kms' }),
          },
          velocity: { convention: 'optical', frame: 'barycentric' },
          bands: [{ name: band, system, depth5Sigma: depth, seeingFwhmArcsec: 1.3 }],
          positionErrorArcsec: 0.3,
          ...(moving > 0 && { redshiftDepth: { band, magnitude: 17.7 } }),
          footprint,
        },
      })),
    ],
    criteria: { robustness: { draws: 0 }, control: { offsetsPerSource: 0 } },
    outputs: ['verdicts.csv', 'summary.json'],
  };
  return plan;
}
