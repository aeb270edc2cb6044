import { describe, expect, it } from 'vitest';
import { scoreTables, type TestTable, textsOf } from './testing/score-tables.ts';

const HI = {
  kind: 'hi',
  name: 'gas',
  columns: {
    name: 'id',
    ra: 'ra',
    dec: 'dec',
    velocity: 'cz',
    width50: 'w',
    flux: 's',
    signalToNoise: 'snr',
    reddening: 'ebv',
  },
  velocity: { convention: 'optical', frame: 'barycentric' },
  beamArcsec: { major: 45, minor: 45, angleDeg: 0 },
};
const HEADER = 'id,ra,dec,cz,w,s,snr,ebv';
const GALAXIES = {
  kind: 'optical',
  name: 'galaxies',
  columns: { name: 'id', ra: 'ra', dec: 'dec', velocity: 'cz', magnitudes: [{ column: 'r', band: 'r' }] },
  velocity: { convention: 'optical', frame: 'barycentric' },
  bands: [{ name: 'r', system: 'AB', depth5Sigma: 24, seeingFwhmArcsec: 1.2 }],
  footprint: { type: 'circles', value: [[150, 2, 3]] },
};
/** A thin sheet of faint galaxies, none within two arcmin of the detections at (150, 2). */
const SHEET = Array.from(
  { length: 300 },
  (_, i) =>
    `g${i},${(148.9 + 0.02 * (i % 100)).toFixed(3)},${(1.1 + 0.31 * Math.floor(i / 100)).toFixed(3)},,${20 + (i % 4)}`,
);
const galaxies = (extra: readonly string[] = [], settings: object = {}): TestTable => ({
  lines: ['id,ra,dec,cz,r', ...SHEET, ...extra],
  settings: { ...GALAXIES, ...settings },
});

async function scoreRow(row: string, table = galaxies(), hi: object = {}) {
  const result = await scoreTables([{ lines: [HEADER, row], settings: { ...HI, ...hi } }, table]);
  const [one] = result.scored;
  return { ...result, one: one!, item: one!.item, texts: textsOf(one!), detail: one!.detail() };
}
const gradeOf = ({ doubts }: { doubts: { name: string; grade: string }[] }, name: string) =>
  doubts.find((doubt) => doubt.name === name)!.grade;
const GOOD = 'good,150,2,3000,60,8,20,0.02';
const numbersOf = (value: unknown): number[] =>
  typeof value === 'number'
    ? [value]
    : value && typeof value === 'object'
      ? Object.values(value).flatMap((each) => numbersOf(each))
      : [];

describe('a detection with a bad or missing number', () => {
  it('is dark where all is well, so that the cases below show the effect of the one number', async () => {
    const { item } = await scoreRow(GOOD);
    expect(item.starlight).toBe('dark');
  });

  it.each([
    ['flux zero', 'x,150,2,3000,60,0,20,0.02'],
    ['flux negative', 'x,150,2,3000,60,-3,20,0.02'],
  ])('states no mass and calls nothing dark: %s', async (_case, row) => {
    const { item, texts, warnings } = await scoreRow(row);
    expect([item.starlight, item.fluxJyKms, item.logHiMass]).toEqual(['cannot tell', null, null]);
    expect(texts.join()).toContain('No HI flux above zero is given');
    expect(warnings[0]!.join()).toMatch(/One cell of "?s"? hold/);
  });

  it.each([
    ['width zero', 'x,150,2,3000,0,8,20,0.02'],
    ['width negative', 'x,150,2,3000,-60,8,20,0.02'],
  ])('takes it as missing, and says what follows: %s', async (_case, row) => {
    const { item, texts, warnings } = await scoreRow(row);
    expect(item.width50Kms).toBeNull();
    expect(texts.join()).toContain('No line width is given');
    expect(warnings[0]!.join()).toMatch(/One cell of "?w"? hold/);
  });

  it.each([
    ['S/N zero', 'x,150,2,3000,60,8,0,0.02'],
    ['S/N negative', 'x,150,2,3000,60,8,-4,0.02'],
    ['S/N missing', 'x,150,2,3000,60,8,,0.02'],
  ])('assumes a position error, says so, and cannot test for a spurious line: %s', async (_case, row) => {
    const { item, texts, detail } = await scoreRow(row);
    expect(item.signalToNoise).toBeNull();
    expect(texts.join()).toContain('assumed to be 20 arcsec: no signal-to-noise ratio is given');
    expect(texts.join()).toContain('a spurious line cannot be tested');
    expect(gradeOf(detail, 'spurious line')).toBe('not testable here');
  });

  it('assumes a position error and cannot test for blends without a beam', async () => {
    const { texts, detail } = await scoreRow(GOOD, galaxies(), { beamArcsec: null });
    expect(texts.join()).toContain('neither a position error nor a beam is given');
    expect(gradeOf(detail, 'blend')).toBe('not testable here');
    expect(detail.beamArcsec).toBeNull();
  });

  it('has no optical test at E(B-V) 5', async () => {
    const { item, texts, detail } = await scoreRow('x,150,2,3000,60,8,20,5');
    expect([item.starlight, item.power]).toEqual(['cannot tell', null]);
    expect(texts.join()).toContain('E(B-V) is 5.00 mag, over 0.3: dust hides the r band');
    expect(gradeOf(detail, 'extinction')).not.toBe('clear');
  });

  it('keeps a negative velocity as one, withholds what needs a distance, and doubts a cloud', async () => {
    const { item, texts, detail } = await scoreRow('x,150,2,-300,60,8,20,0.02');
    expect([item.velocityKms, item.distanceMpc, item.logHiMass]).toEqual([-300, null, null]);
    expect(item.surroundings).toBe('cannot tell');
    expect(texts.join()).toContain('Quantities in kpc and solar masses are withheld');
    expect(gradeOf(detail, 'cloud')).toBe('serious');
  });

  it.each([
    GOOD,
    'x,150,2,,,,,',
    'x,150,2,-300,60,0,20,5',
    'x,150,2,3000,0,-3,0,-1',
    'x,150,2,1e9,60,8,20,0.02',
    'x,150,89.9999,3000,60,8,20,0.02',
  ])('has no number that is not finite anywhere, and no NaN in a sentence: %s', async (row) => {
    const { item, detail, texts } = await scoreRow(row);
    expect(numbersOf([item, detail]).filter((number) => !Number.isFinite(number))).toEqual([]);
    expect([...texts, item.headline, ...detail.doubts.map(({ sentence }) => sentence)].join()).not.toMatch(
      /NaN|Infinity|undefined/,
    );
  });
});

describe('a catalogue with something missing', () => {
  it('makes no claim of a silence whose depth nobody stated', async () => {
    const bands = [{ name: 'r', system: 'AB', depth5Sigma: null }];
    const { item, texts, notes } = await scoreRow(GOOD, galaxies([], { bands }));
    expect([item.starlight, item.power]).toEqual(['cannot tell', null]);
    expect(texts.join()).toContain('states no depth in r');
    expect(notes.join()).toContain('no depth is stated for r; its silence there counts for nothing');
  });

  it('asks for the system of its magnitudes, and takes the usual one of the band until told', async () => {
    const bands = [{ name: 'r', depth5Sigma: 24, seeingFwhmArcsec: 1.2 }];
    const { warnings, detail } = await scoreRow(GOOD, galaxies([], { bands }));
    expect(warnings[1]!.join()).toMatch(/AB/);
    expect(detail.limits[0]!.system).toBe('AB');
  });
});

describe('a survey inside a cluster', () => {
  /** Four hundred redshifts about (150, 2) within 1500 km/s of 6900 km/s, and as many spread over the field behind. */
  const CLUSTER = Array.from({ length: 800 }, (_, i) => {
    const inside = i < 400;
    const reach = inside ? 0.04 + 0.3 * ((i * 0.618034) % 1) : 1.5 * ((i * 0.618034) % 1);
    const angle = i * 2.399963;
    const cz = inside ? 6900 + 1500 * (2 * ((i * 0.7548777) % 1) - 1) : 20_000 + 40_000 * ((i * 0.7548777) % 1);
    return `c${i},${150 + reach * Math.cos(angle)},${2 + reach * Math.sin(angle)},${cz.toFixed(0)},${16.5 + (i % 10) / 10}`;
  });
  const GROUPS: TestTable = {
    lines: ['id,ra,dec,cz,sigma', 'the cluster,150,2,6900,800'],
    settings: {
      kind: 'groups',
      columns: { name: 'id', ra: 'ra', dec: 'dec', velocity: 'cz', velocityDispersion: 'sigma' },
    },
  };
  const beside = `host,150.0014,2,6930,16.8`;
  const detection = 'x,150,2,6900,100,2,20,0.02';

  it('weighs a concordant velocity by how many others there share it', async () => {
    const table = galaxies([...CLUSTER, beside]);
    const weigh = async (learnVelocities: boolean) => {
      const { scored } = await scoreTables([{ lines: [HEADER, detection], settings: HI }, table], {
        counterpart: { learnVelocities },
      });
      return scored[0]!.item.counterpart!.probability;
    };
    const [asked, measured] = [await weigh(false), await weigh(true)];
    expect(measured / (1 - measured)).toBeLessThan(asked / (1 - asked));
  });

  it('calls its detections in a cluster where a table of groups says so, and never alone', async () => {
    const { scored } = await scoreTables([{ lines: [HEADER, detection], settings: HI }, galaxies(CLUSTER), GROUPS]);
    expect(scored[0]!.item.surroundings).toBe('in a cluster');
    const bare = await scoreTables([{ lines: [HEADER, detection], settings: HI }, galaxies(CLUSTER)]);
    expect(bare.scored[0]!.item.surroundings).toBe('accompanied');
  });
});
