/**
 * Makes the demo's tables: an invented survey ("Halcyon Strip") of about 300 HI detections and the catalogues over
 * the same field, from published number counts and scaling relations, with each case a user must tell apart.
 * `npx tsx testdata/demo/generator/generate.ts [folder]` writes testdata/demo/*; the same seed gives the same tables.
 */
import { writeFileSync } from 'node:fs';
import { pathToFileURL } from 'node:url';
import { gzipSync } from 'node:zlib';
import { areaSqDeg, C_KMS, FIELD, H0, inside, localGroupCorrection } from './field.ts';
import { detect, isCatalogued } from './observe.ts';
import { Random } from './random.ts';
import { tellStories } from './stories.ts';
import { type Source } from './galaxy.ts';
import { makeBackground, makeGalaxies } from './universe.ts';

const SEED = 20_261_201;
/** Where the tables go: beside this folder, or into the one given. */
const FOLDER = process.argv[2] ? pathToFileURL(`${process.argv[2]}/`) : new URL('../', import.meta.url);

type Row = (string | number)[];
const fixed = (value: number, digits: number): string => (Number.isFinite(value) ? value.toFixed(digits) : '');
const lines = (header: string[], rows: Row[], separator = ','): string =>
  [header.join(separator), ...rows.map((row) => row.join(separator))].join('\n') + '\n';

function votable(rows: Row[]): string {
  const fields = [
    ['uid', 'char" arraysize="*', 'meta.id;meta.main', ''],
    ['ra', 'double', 'pos.eq.ra;meta.main', 'deg'],
    ['dec', 'double', 'pos.eq.dec;meta.main', 'deg'],
    ['nuv', 'float', 'phot.mag;em.UV.200-300nm', 'mag'],
    ['e_nuv', 'float', 'stat.error;phot.mag;em.UV.200-300nm', 'mag'],
  ].map(
    ([name, type, ucd, unit]) =>
      `<FIELD name="${name}" datatype="${type}" ucd="${ucd}"${unit ? ` unit="${unit}"` : ''}/>`,
  );
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    '<VOTABLE version="1.4" xmlns="http://www.ivoa.net/xml/VOTable/v1.3"><RESOURCE type="results">',
    '<COOSYS ID="icrs" system="ICRS"/>',
    '<TABLE name="halcyon_nuv"><DESCRIPTION>Near-ultraviolet sources of the Halcyon Strip (invented)</DESCRIPTION>',
    ...fields,
    '<DATA><TABLEDATA>',
    ...rows.map((row) => `<TR>${row.map((cell) => `<TD>${cell}</TD>`).join('')}</TR>`),
    '</TABLEDATA></DATA></TABLE></RESOURCE></VOTABLE>',
    '',
  ].join('\n');
}

function isClear(source: Source, cleared: ReturnType<typeof tellStories>['cleared']): boolean {
  return !cleared.some(({ place, radiusMpc, windowKms }) => {
    const degrees = Math.hypot(
      (source.raDeg - place.raDeg) * Math.cos((place.decDeg * Math.PI) / 180),
      source.decDeg - place.decDeg,
    );
    const apartMpc = (degrees * Math.PI * place.distanceMpc) / 180;
    const placeKms = H0 * place.distanceMpc - localGroupCorrection(place.raDeg, place.decDeg);
    return apartMpc < radiusMpc && Math.abs(source.czKms - placeKms) < windowKms;
  });
}

const random = new Random(SEED);
const stories = tellStories(random);
const ordinary = makeGalaxies(random).filter((galaxy) => isClear(galaxy, stories.cleared));
const sources = [...ordinary, ...stories.sources];
const detections = detect(sources, random);

const deepField = { raMin: FIELD.raMin, raMax: FIELD.raMax, decMin: FIELD.decMin, decMax: FIELD.decMax };
const wideOnly = makeBackground(random, FIELD.wide, FIELD.redshifts.depthR).filter(
  (source) => !inside(source.raDeg, source.decDeg),
);
const behind = makeBackground(random, deepField, FIELD.optical.cutR);
// No distant galaxy stands by chance where a story says that nothing does.
const empty = stories.sources.filter(({ story }) => story.startsWith('dark'));
const CLEAR_ARCSEC = 30;
const isByChance = ({ raDeg, decDeg }: Source): boolean =>
  empty.some(
    (place) =>
      Math.hypot((raDeg - place.raDeg) * Math.cos((decDeg * Math.PI) / 180), decDeg - place.decDeg) * 3600 <
      CLEAR_ARCSEC,
  );
const everything = [...sources, ...behind.filter((source) => !isByChance(source))];

const deep: Row[] = [];
const ultraviolet: Row[] = [];
const infrared: Row[] = [];
const redshifts: Row[] = [];
const position = (source: Source, sigmaArcsec: number): [number, number] => [
  source.raDeg + random.normal(0, sigmaArcsec) / 3600 / Math.cos((source.decDeg * Math.PI) / 180),
  source.decDeg + random.normal(0, sigmaArcsec) / 3600,
];
const magError = (mag: number, depth: number): number => Math.hypot(0.02, 0.2 * 10 ** (0.4 * (mag - depth)));

for (const source of everything.sort((a, b) => a.raDeg - b.raDeg)) {
  if (!Number.isFinite(source.rMag) || !inside(source.raDeg, source.decDeg)) continue;
  const { optical, ultraviolet: uv, infrared: ir } = FIELD;
  const size = source.effectiveRadiusArcsec;
  if (source.rMag < optical.cutR && isCatalogued(source.rMag, optical.depthR, optical.seeing, size, random)) {
    const [ra, dec] = position(source, 0.15 + 0.1 * size);
    const errorR = magError(source.rMag, optical.depthR);
    const errorG = magError(source.gMag, optical.depthG);
    deep.push([
      0,
      fixed(ra, 6),
      fixed(dec, 6),
      fixed(source.gMag + random.normal(0, errorG), 3),
      fixed(errorG, 3),
      fixed(source.rMag + random.normal(0, errorR), 3),
      fixed(errorR, 3),
      fixed(size, 2),
      fixed(0.02 + 0.1 * random.uniform(), 2),
      '0.120',
    ]);
  }
  if (source.raDeg > FIELD.ultravioletRaMin && isCatalogued(source.nuvMag, uv.depth, uv.seeing, size, random)) {
    const [ra, dec] = position(source, 0.9);
    const error = magError(source.nuvMag, uv.depth);
    ultraviolet.push([
      0,
      fixed(ra, 6),
      fixed(dec, 6),
      fixed(source.nuvMag + random.normal(0, error), 3),
      fixed(error, 3),
    ]);
  }
  if (source.w1Mag < ir.cut && isCatalogued(source.w1Mag, ir.depth, ir.seeing, size, random)) {
    const [ra, dec] = position(source, 0.4);
    const error = magError(source.w1Mag, ir.depth);
    infrared.push([0, fixed(ra, 6), fixed(dec, 6), fixed(source.w1Mag + random.normal(0, error), 3), fixed(error, 3)]);
  }
}
for (const source of [...everything, ...wideOnly]) {
  const inWide =
    source.raDeg > FIELD.wide.raMin &&
    source.raDeg < FIELD.wide.raMax &&
    source.decDeg > FIELD.wide.decMin &&
    source.decDeg < FIELD.wide.decMax;
  if (!inWide || !(source.rMag < FIELD.redshifts.depthR)) continue;
  if (source.story.startsWith('contested')) continue;
  if (random.uniform() > 0.97) continue; // fibre losses
  const bad = random.uniform() < 0.004;
  const error = 30;
  const z = (bad ? random.uniform(0.003, 0.2) * C_KMS : source.czKms + random.normal(0, error)) / C_KMS;
  // Nor does a wrong redshift make up a neighbour there.
  if (bad && !isClear({ ...source, czKms: z * C_KMS }, stories.cleared)) continue;
  const [ra, dec] = position(source, 0.15);
  redshifts.push([
    0,
    fixed(ra, 6),
    fixed(dec, 6),
    z.toFixed(6),
    (error / C_KMS).toFixed(6),
    fixed(source.rMag + random.normal(0, 0.03), 2),
    bad ? 3 : 4,
  ]);
}

// Stars of the Milky Way in the deep catalogue (with a stellarity) and the bright ones in a list of their own.
const stars: Row[] = stories.stars.map((star) => [0, fixed(star.raDeg, 6), fixed(star.decDeg, 6), fixed(star.gMag, 2)]);
const area = areaSqDeg(FIELD.raMin, FIELD.raMax, FIELD.decMin, FIELD.decMax);
for (let left = random.poisson(1600 * area); left > 0; left -= 1) {
  const gMag = 21.5 + Math.log10(1 - random.uniform(0, 0.99999)) / 0.28;
  const ra = random.uniform(FIELD.raMin, FIELD.raMax);
  const dec = random.uniform(FIELD.decMin, FIELD.decMax);
  // No bright star on a story: their places are told above.
  if (gMag < 13) {
    if (!stories.cleared.some(({ place }) => Math.hypot((ra - place.raDeg) * 0.97, dec - place.decDeg) < 0.08)) {
      stars.push([0, fixed(ra, 6), fixed(dec, 6), fixed(gMag, 2)]);
    }
  } else if (gMag > 15) {
    deep.push([
      0,
      fixed(ra, 6),
      fixed(dec, 6),
      fixed(gMag + 0.3, 3),
      '0.020',
      fixed(gMag - 0.1, 3),
      '0.020',
      '0.55',
      fixed(0.9 + 0.09 * random.uniform(), 2),
      '0.120',
    ]);
  }
}

const numbered = (rows: Row[], prefix: string): Row[] =>
  rows
    .sort((a, b) => Number(a[1]) - Number(b[1]))
    .map((row, i) => [`${prefix}${String(i + 1).padStart(6, '0')}`, ...row.slice(1)]);

const hi = detections.map((d) => [
  d.name,
  fixed(d.raDeg, 5),
  fixed(d.decDeg, 5),
  fixed(d.czKms, 1),
  Number.isFinite(d.czKms) ? fixed(d.czErrorKms, 1) : '',
  fixed(d.width50Kms, 1),
  fixed(d.fluxJyKms, 3),
  fixed(d.fluxErrorJyKms, 3),
  fixed(d.signalToNoise, 1),
  fixed(d.reliability, 3),
]);
const write = (name: string, text: string): void =>
  writeFileSync(new URL(name, FOLDER), name.endsWith('.gz') ? gzipSync(text, { level: 9 }) : text);

write(
  'halcyon-hi.csv',
  lines(
    [
      'hly_id',
      'ra_deg',
      'dec_deg',
      'cz_kms',
      'e_cz_kms',
      'w50_kms',
      'flux_jykms',
      'e_flux_jykms',
      'snr',
      'reliability',
    ],
    hi,
  ),
);
write(
  'halcyon-deep.csv.gz',
  lines(
    ['gid', 'ra_deg', 'dec_deg', 'g_mag', 'e_g_mag', 'r_mag', 'e_r_mag', 're_arcsec', 'p_star', 'ebv'],
    numbered(deep, 'D'),
  ),
);
write('halcyon-nuv.vot.gz', votable(numbered(ultraviolet, 'U')));
write('halcyon-w1.tsv.gz', lines(['iid', 'ra_deg', 'dec_deg', 'w1_mag', 'e_w1_mag'], numbered(infrared, 'W'), '\t'));
write(
  'halcyon-redshifts.csv.gz',
  lines(['zid', 'ra_deg', 'dec_deg', 'z', 'e_z', 'r_mag', 'z_quality'], numbered(redshifts, 'Z')),
);
write('halcyon-stars.csv', lines(['sid', 'ra_deg', 'dec_deg', 'g_mag'], numbered(stars, 'S')));
write(
  'truth.csv',
  lines(
    ['hly_id', 'story'],
    detections.map((d) => [d.name, d.story]),
  ),
);

const told = [...new Set(detections.map((d) => d.story))].map(
  (story) => `${story} ${detections.filter((d) => d.story === story).length}`,
);
console.log(`${detections.length} detections (${told.join(', ')})`);
console.log(
  `deep ${deep.length}, nuv ${ultraviolet.length}, w1 ${infrared.length}, redshifts ${redshifts.length}, stars ${stars.length}`,
);
