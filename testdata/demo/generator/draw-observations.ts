/**
 * Draws the demo's images and spectra: what the tables of the Halcyon Strip would look like for its telling cases.
 * `npx tsx testdata/demo/generator/draw-observations.ts [folder]` reads testdata/demo/* and writes observations/*; the
 * same tables give the same files.
 */
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { pathToFileURL } from 'node:url';
import { gunzipSync, gzipSync } from 'node:zlib';
import { fitsImage } from './fits-image.ts';
import { Random } from './random.ts';
import { tellStories } from './stories.ts';

/** The seed of generate.ts: its stories come out first, so they are the same here. */
const SEED = 20_261_201;
const HERE = new URL('../', import.meta.url);
const OUT = process.argv[2] ? pathToFileURL(`${process.argv[2]}/`) : new URL('observations/', HERE);
const ZERO_POINT = 30;
/** Share of a star's light that the instrument spreads widely. Choice. */
const WING_SHARE = 0.03;
/** Counts of noise that a stored step is: coarse enough to pack well, fine enough to lose nothing. */
const STEPS_PER_SIGMA = 4;

const CASES = [
  'HLY J0307+1407',
  'HLY J0311+1318',
  'HLY J0306+1410',
  'HLY J0313+1434',
  'HLY J0308+1330',
  'HLY J0309+1326',
  'HLY J0305+1414',
  'HLY J0309+1437',
  'HLY J0303+1436',
  'HLY J0304+1432',
];

interface Thing {
  raDeg: number;
  decDeg: number;
  mag: number;
  /** Effective radius, arcsec; 0 is a star. */
  size: number;
}

interface Band {
  name: string;
  pixels: number;
  pixelArcsec: number;
  seeingArcsec: number;
  depth5Sigma: number;
  things: Thing[];
}

type Cells = Record<string, string>;
function rows(text: string, separator = ','): Cells[] {
  const [head, ...lines] = text
    .trim()
    .split('\n')
    .map((line) => line.split(separator));
  return lines.map((line) => Object.fromEntries(head!.map((name, i) => [name, line[i] ?? ''])));
}
const read = (name: string) => {
  const bytes = readFileSync(new URL(name, HERE));
  return (name.endsWith('.gz') ? gunzipSync(bytes) : bytes).toString('utf8');
};

const detections = rows(read('halcyon-hi.csv'));
const truth = new Map(rows(read('truth.csv')).map(({ hly_id, story }) => [hly_id!, story!]));
const { sources, stars } = tellStories(new Random(SEED));
const deep: Thing[] = rows(read('halcyon-deep.csv.gz')).map((row) => ({
  raDeg: Number(row['ra_deg']),
  decDeg: Number(row['dec_deg']),
  mag: Number(row['r_mag']),
  size: Number(row['p_star']) > 0.5 ? 0 : Number(row['re_arcsec']),
}));
const infrared: Thing[] = rows(read('halcyon-w1.tsv.gz'), '\t').map((row) => ({
  raDeg: Number(row['ra_deg']),
  decDeg: Number(row['dec_deg']),
  mag: Number(row['w1_mag']),
  size: 0,
}));
const bright: Thing[] = stars.map(({ raDeg, decDeg, gMag }) => ({ raDeg, decDeg, mag: gMag, size: 0 }));
/** Story galaxies too faint for the table are drawn all the same: an eye may see what a catalogue lost. */
const lost: Thing[] = sources
  .filter(({ rMag }) => Number.isFinite(rMag))
  .filter(
    ({ raDeg, decDeg }) => !deep.some((other) => Math.hypot(other.raDeg - raDeg, other.decDeg - decDeg) < 4 / 3600),
  )
  .map(({ raDeg, decDeg, rMag, effectiveRadiusArcsec }) => ({ raDeg, decDeg, mag: rMag, size: effectiveRadiusArcsec }));

const BANDS: Band[] = [
  {
    name: 'r',
    pixels: 192,
    pixelArcsec: 0.8,
    seeingArcsec: 1.6,
    depth5Sigma: 24.4,
    things: [...deep, ...lost, ...bright],
  },
  { name: 'W1', pixels: 60, pixelArcsec: 2.75, seeingArcsec: 6.1, depth5Sigma: 16.9, things: [...infrared, ...bright] },
];

/** Noise of a pixel such that a point source of the depth stands five times above it in its optimal aperture. */
function noiseOf({ depth5Sigma, seeingArcsec, pixelArcsec }: Band): number {
  const sigmaPixels = seeingArcsec / 2.35482 / pixelArcsec;
  return 10 ** (0.4 * (ZERO_POINT - depth5Sigma)) / (5 * Math.sqrt(4 * Math.PI * sigmaPixels ** 2));
}

function draw(band: Band, raDeg: number, decDeg: number, random: Random): Buffer {
  const { pixels, pixelArcsec, seeingArcsec, things, name } = band;
  const noise = noiseOf(band);
  const values = Float64Array.from({ length: pixels * pixels }, () => random.normal(0, noise));
  const half = (pixels * pixelArcsec) / 2;
  const cosine = Math.cos((decDeg * Math.PI) / 180);
  for (const thing of things) {
    const east = (thing.raDeg - raDeg) * cosine * 3600;
    const north = (thing.decDeg - decDeg) * 3600;
    const flux = 10 ** (0.4 * (ZERO_POINT - thing.mag));
    const core = seeingArcsec / 2.35482;
    // Bright light reaches far: out to where its wings are lost in the noise.
    const wings = ((WING_SHARE * flux * pixelArcsec ** 2) / (2 * Math.PI * 9 * core ** 2) / (0.1 * noise)) ** (1 / 3);
    const reach = Math.max(6 * core, 6 * thing.size, 3 * core * wings);
    if (!Number.isFinite(flux) || Math.abs(east) > half + reach || Math.abs(north) > half + reach) continue;
    addThing(values, band, { east, north, flux, core, size: thing.size, reach });
  }
  const header = { BUNIT: 'adu', FILTER: name, MAGZERO: ZERO_POINT, TELESCOP: 'invented' };
  return fitsImage({ pixels, pixelArcsec, raDeg, decDeg }, values, noise / STEPS_PER_SIGMA, header);
}

interface Spot {
  east: number;
  north: number;
  flux: number;
  core: number;
  size: number;
  reach: number;
}

/** A star is a Gaussian with faint wings; a galaxy an exponential disc whose centre the seeing rounds off. */
function addThing(values: Float64Array, { pixels, pixelArcsec }: Band, spot: Spot): void {
  const { east, north, flux, core, size, reach } = spot;
  const middle = (pixels - 1) / 2;
  const [x0, y0] = [middle - east / pixelArcsec, middle + north / pixelArcsec];
  const span = reach / pixelArcsec;
  // Effective radius of an exponential disc over its scale length.
  const scale = Math.hypot(size / 1.678, core);
  const area = pixelArcsec ** 2;
  for (let y = Math.max(0, Math.ceil(y0 - span)); y < Math.min(pixels, y0 + span); y++) {
    for (let x = Math.max(0, Math.ceil(x0 - span)); x < Math.min(pixels, x0 + span); x++) {
      const r = Math.hypot(x - x0, y - y0) * pixelArcsec;
      const wing = WING_SHARE / (2 * Math.PI * (3 * core) ** 2) / (1 + (r / (3 * core)) ** 2) ** 1.5;
      const profile =
        size > 0
          ? Math.exp(-Math.sqrt(r * r + core * core) / scale) / (2 * Math.PI * scale ** 2)
          : ((1 - WING_SHARE) * Math.exp(-0.5 * (r / core) ** 2)) / (2 * Math.PI * core ** 2) + wing;
      values[y * pixels + x]! += flux * area * profile;
    }
  }
}

const CHANNEL_KMS = 5;

/** A line of the table's velocity, width, flux and signal: horned where wide, one channel where it is spurious. */
function spectrum(row: Cells, random: Random): string {
  const [cz, w50, flux, snr] = ['cz_kms', 'w50_kms', 'flux_jykms', 'snr'].map((name) => Number(row[name]));
  const isSpurious = truth.get(row['hly_id']!) === 'spurious line';
  const half = w50! / 2;
  const shape = (v: number): number => {
    if (w50! < 110 || isSpurious) return Math.exp(-4 * Math.LN2 * ((v - cz!) / w50!) ** 2);
    const inside = 1 / (1 + Math.exp((Math.abs(v - cz!) - half) / 6));
    return inside * (0.45 + 0.75 * ((v - cz! - 0.06 * half) / half) ** 2);
  };
  const count = 2 * Math.ceil((half + 320) / CHANNEL_KMS) + 1;
  const velocities = Array.from({ length: count }, (_, i) => cz! + (i - (count - 1) / 2) * CHANNEL_KMS);
  const sum = velocities.reduce((total, v) => total + shape(v) * CHANNEL_KMS, 0);
  const peak = (flux! * 1000) / sum;
  const noise = (flux! * 1000) / (snr! * CHANNEL_KMS * Math.sqrt((1.5 * w50!) / CHANNEL_KMS));
  const slope = random.normal(0, noise / 600);
  const lines = velocities.map((v) => {
    const value = peak * shape(v) + 0.2 * noise + slope * (v - cz!) + random.normal(0, noise);
    return `${v.toFixed(1)},${value.toFixed(3)}`;
  });
  return ['cz_bary (km/s),flux (mJy)', ...lines].join('\n') + '\n';
}

mkdirSync(OUT, { recursive: true });
for (const name of CASES) {
  const row = detections.find(({ hly_id }) => hly_id === name)!;
  const random = new Random([...name].reduce((hash, letter) => Math.imul(hash, 31) + letter.charCodeAt(0), SEED) >>> 0);
  const file = name.replace(' ', '_');
  const [ra, dec] = [Number(row['ra_deg']), Number(row['dec_deg'])];
  for (const band of BANDS) {
    writeFileSync(new URL(`${file}_${band.name}.fits.gz`, OUT), gzipSync(draw(band, ra, dec, random), { level: 9 }));
  }
  writeFileSync(new URL(`${file}_line.csv`, OUT), spectrum(row, random));
}
