import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makeUniverse, planOf, writePlan } from '../../testdata/plan/universe.ts';

const COMMAND = join(import.meta.dirname, '../../service/dist/plan.js');
const root = mkdtempSync(join(tmpdir(), 'eremite-plan-'));
afterAll(() => rmSync(root, { recursive: true, force: true }));

function carryOut(name: string, plan: unknown, universe = makeUniverse(), env: Record<string, string> = {}) {
  const folder = join(root, name);
  const path = writePlan(folder, plan, universe);
  const out = join(folder, 'out');
  const { status, stderr, stdout } = spawnSync(process.execPath, [COMMAND, path, '--out', out], {
    encoding: 'utf8',
    env: { ...process.env, ...env },
  });
  return { status, stderr, stdout, out };
}

type Row = Record<string, string>;
function table(folder: string, name: string): Row[] {
  const [header, ...lines] = readFileSync(join(folder, name), 'utf8').trimEnd().split('\r\n');
  const columns = header!.split(',');
  return lines.map((line) => Object.fromEntries(line.split(',').map((cell, i) => [columns[i]!, cell])));
}
const byName = (rows: Row[], name: string) => rows.find(({ detection }) => detection === name)!;

describe('a plan over a field deep enough for a claim', () => {
  let verdicts: Row[];
  let out: string;
  beforeAll(() => {
    const run = carryOut('deep', planOf(26.5));
    expect(run.stderr).toContain('100 % done');
    expect(run.status).toBe(0);
    out = run.out;
    verdicts = table(out, 'verdicts.csv');
  });

  it.each([
    ['ordinary', 'starlit'],
    ['faint host', 'nearly dark'],
    ['two hosts', 'contested'],
    ['empty and alone', 'dark'],
    ['empty with neighbour', 'dark'],
    ['uncovered', 'cannot tell'],
    ['slow cloud', 'cannot tell'],
    ['without velocity', 'cannot tell'],
    ['without flux', 'cannot tell'],
    ['behind', 'contested'],
    ['crowded beam', 'confused'],
  ])('finds "%s" %s', (name, word) => expect(byName(verdicts, name)['starlight']).toBe(word));

  it.each([
    ['empty and alone', 'alone'],
    ['empty with neighbour', 'accompanied'],
    ['uncovered', 'cannot tell'],
    ['slow cloud', 'cannot tell'],
    ['without velocity', 'cannot tell'],
    ['crowded beam', 'accompanied'],
  ])('finds the surroundings of "%s" %s', (name, word) => expect(byName(verdicts, name)['surroundings']).toBe(word));

  it('keeps the input order, and every detection', () => {
    expect(verdicts.map(({ detection }) => detection)).toEqual(Object.keys(makeUniverse().cases));
  });

  it('has the columns that scripts rely on', () => {
    const head = (name: string) => readFileSync(join(out, name), 'utf8').split('\r\n', 1)[0];
    expect(head('verdicts.csv')).toBe(
      'detection,starlight,p_none,p_missed,p_spurious,power,counterpart,counterpart_probability,surroundings,p_alone,nearest_name,nearest_kpc,nearest_dv_kms,count_1mpc_500kms,distance_mpc,doubts',
    );
    expect(head('candidates.csv')).toBe(
      'detection,catalogue,row,separation_arcsec,position_angle_deg,separation_kpc,dv_kms,p_chance,likelihood_ratio,probability',
    );
    expect(head('neighbours.csv')).toBe('detection,catalogue,row,separation_arcsec,separation_kpc,dv_kms');
  });

  it('gives probabilities that add to one with those of the objects', () => {
    const candidates = table(out, 'candidates.csv');
    for (const row of verdicts) {
      // No two candidates of this field are one object, so that the rows may be added.
      const objects = candidates.filter(({ detection }) => detection === row['detection']);
      const sum = objects.reduce((total, { probability }) => total + Number(probability), 0);
      expect(sum + Number(row['p_none']) + Number(row['p_missed']) + Number(row['p_spurious'])).toBeCloseTo(1, 6);
    }
  });

  it('names the host and says how far it is', () => {
    const row = byName(verdicts, 'ordinary');
    expect(row['counterpart']).toBe('host of ordinary');
    expect(Number(row['counterpart_probability'])).toBeGreaterThan(0.99);
    const candidate = table(out, 'candidates.csv').find(({ row: name }) => name === 'host of ordinary')!;
    expect(Number(candidate['separation_arcsec'])).toBeCloseTo(1.2, 2);
    expect(Number(candidate['dv_kms'])).toBeCloseTo(12 / (1 + 2900 / 299_792.458), 6);
  });

  it('gives the best object of a detection whose redshift disagrees, but not the word starlit', () => {
    expect(byName(verdicts, 'behind')['counterpart']).toBe('far galaxy');
  });

  it('finds the same neighbours as a search by hand', () => {
    const universe = makeUniverse();
    const rows = ['galaxies.csv', 'fine.csv', 'coarse.csv'].flatMap((file) => {
      const [, ...lines] = universe.files[file]!.trimEnd().split('\n');
      return lines
        .map((line) => line.split(','))
        .map((cells) => {
          const cz = file === 'galaxies.csv' ? cells[5]! : cells[3]!;
          return { name: cells[0]!, ra: Number(cells[1]), dec: Number(cells[2]), cz: cz === '' ? NaN : Number(cz) };
        });
    });
    const degree = Math.PI / 180;
    for (const verdict of verdicts) {
      if (verdict['distance_mpc'] === '') {
        expect(verdict['count_1mpc_500kms']).toBe('');
        continue;
      }
      const me = rows.find(({ name }) => name === verdict['detection'])!;
      const candidate = table(out, 'candidates.csv').find(({ detection }) => detection === me.name);
      // Angular-diameter distance, from kpc and arcsec of any candidate or neighbour of the detection.
      const scale = candidate ?? table(out, 'neighbours.csv').find(({ detection }) => detection === me.name);
      if (!scale) continue;
      const distance =
        Number(scale['separation_kpc']) / 1000 / (Number(scale['separation_arcsec']) / 206_264.80624709636);
      const own = Number(verdict['counterpart_probability']) >= 0.5 ? verdict['counterpart'] : '';
      const inside = rows.filter(({ name, ra, dec, cz }) => {
        if (name === me.name || name === own) return false;
        const dv = (cz - me.cz) / (1 + me.cz / 299_792.458);
        const h =
          Math.sin(((dec - me.dec) * degree) / 2) ** 2 +
          Math.cos(dec * degree) * Math.cos(me.dec * degree) * Math.sin(((ra - me.ra) * degree) / 2) ** 2;
        return Math.abs(dv) <= 500 && distance * 2 * Math.asin(Math.sqrt(h)) <= 1;
      });
      expect(Number(verdict['count_1mpc_500kms']), me.name).toBe(inside.length);
      const listed = table(out, 'neighbours.csv').filter(({ detection }) => detection === me.name);
      expect(listed.map(({ row }) => row).sort()).toEqual(inside.map(({ name }) => name).sort());
    }
  });

  it('writes what was assumed, the counts and the control into the summary', () => {
    const summary = JSON.parse(readFileSync(join(out, 'summary.json'), 'utf8'));
    expect(summary.counts.detections).toBe(11);
    expect(summary.counts.starlight.dark).toBe(2);
    expect(summary.tables[2].assumed.join(' ')).toContain('ICRS');
    expect(summary.control.positionsKept).toBeGreaterThan(0);
    expect(summary.control.chanceFraction).toBeLessThan(0.3);
    expect(summary.caution).toContain('not a discovery');
  });

  it('leaves the same bytes a second time', () => {
    const again = carryOut('deep-again', planOf(26.5)).out;
    for (const name of ['verdicts.csv', 'candidates.csv', 'neighbours.csv', 'summary.json']) {
      expect(readFileSync(join(again, name)).equals(readFileSync(join(out, name))), name).toBe(true);
    }
    expect(readdirSync(out).sort()).toEqual(['candidates.csv', 'neighbours.csv', 'summary.json', 'verdicts.csv']);
  });

  it('leaves the same bytes with one, two and three threads', () => {
    const universe = makeUniverse();
    // Enough detections for several units of work, for learning and for shifted positions.
    const more = Array.from({ length: 1100 }, (_, i) => {
      const [ra, dec] = [150.2 + ((i * 0.0731) % 7.6), 0.2 + ((i * 0.0517) % 5.6)];
      return [`more-${i}`, ra.toFixed(5), dec.toFixed(5), 2000 + ((i * 37) % 7000), 120, 2, 12].join(',');
    });
    universe.files['fine.csv'] += `${more.join('\n')}\n`;
    const plan = planOf(26.5, { criteria: { robustness: { draws: 100 }, control: { offsetsPerSource: 4 } } });
    const outs = ['1', '2', '3'].map((threads) => {
      const {
        status,
        stderr,
        out: folder,
      } = carryOut(`threads-${threads}`, plan, universe, { EREMITE_THREADS: threads });
      expect(status, stderr).toBe(0);
      return folder;
    });
    const { counts, control, notes } = JSON.parse(readFileSync(join(outs[0]!, 'summary.json'), 'utf8'));
    expect([counts.detections, control.positionsKept > 1000, notes.length > 1]).toEqual([1111, true, true]);
    for (const name of ['verdicts.csv', 'candidates.csv', 'neighbours.csv', 'summary.json']) {
      const [one, two, three] = outs.map((folder) => readFileSync(join(folder, name)));
      expect([two!.equals(one!), three!.equals(one!)], name).toEqual([true, true]);
    }
  });

  it('does not mind the order of the rows of a catalogue', () => {
    const universe = makeUniverse();
    const [header, ...lines] = universe.files['galaxies.csv']!.trimEnd().split('\n');
    universe.files['galaxies.csv'] = `${[header, ...lines.reverse()].join('\n')}\n`;
    const turned = table(carryOut('turned', planOf(26.5), universe).out, 'verdicts.csv');
    turned.forEach((row, i) => {
      for (const [column, cell] of Object.entries(row)) {
        const before = verdicts[i]![column]!;
        if (before === '' || Number.isNaN(Number(before))) expect(cell).toBe(before);
        else expect(Number(cell)).toBeCloseTo(Number(before), 6);
      }
    });
  });
});

describe('a plan over a field that cannot bear a claim', () => {
  it.each([
    ['too shallow', planOf(17)],
    ['of no stated depth', planOf(null)],
    ['of unknown coverage', planOf(26.5, {}, { footprint: { type: 'unknown' } })],
  ])('%s calls nothing dark, and a plain host starlit all the same', (name, plan) => {
    const verdicts = table(carryOut(name, plan).out, 'verdicts.csv');
    const words = verdicts.map(({ starlight }) => starlight);
    expect(words).not.toContain('dark');
    expect(words).not.toContain('nearly dark');
    expect(byName(verdicts, 'ordinary')['starlight']).toBe('starlit');
    expect(byName(verdicts, 'empty and alone')['starlight']).toBe('cannot tell');
    expect(byName(verdicts, 'empty with neighbour')['surroundings']).toBe('accompanied');
  });
  it('leaves the power empty where no depth is stated', () => {
    const verdicts = table(carryOut('empty power', planOf(null)).out, 'verdicts.csv');
    expect(byName(verdicts, 'empty and alone')['power']).toBe('');
  });
  it('raises the power with the depth', () => {
    const powers = [20, 22, 24, 26].map((depth) => {
      const { out } = carryOut(`depth ${depth}`, planOf(depth));
      return Number(byName(table(out, 'verdicts.csv'), 'empty and alone')['power']);
    });
    expect(powers).toEqual([...powers].sort((a, b) => a - b));
    expect(powers[3]! - powers[0]!).toBeGreaterThan(0.05);
  });
});

describe('the cells of a plan', () => {
  it('are guarded against formulas, numbers untouched', () => {
    const universe = makeUniverse();
    universe.files['fine.csv'] = universe.files['fine.csv']!.replace('ordinary,', '=1+2,');
    const text = readFileSync(join(carryOut('formula', planOf(26.5), universe).out, 'verdicts.csv'), 'utf8');
    expect(text).toContain("\r\n'=1+2,starlit,");
    expect(text).toMatch(/,-\d/);
  });
  it('bear the row number where a table has no names', () => {
    const plan = planOf(26.5);
    (plan.tables[0]!.settings.columns as Record<string, unknown>)['name'] = null;
    const verdicts = table(carryOut('nameless', plan).out, 'verdicts.csv');
    expect(verdicts.slice(0, 3).map(({ detection }) => detection)).toEqual(['1', '2', '3']);
  });
});

describe('a bad plan', () => {
  const refused = (name: string, plan: unknown, universe = makeUniverse()) => {
    const run = carryOut(name, plan, universe);
    expect(run.status, run.stderr).toBe(2);
    expect(existsSync(run.out)).toBe(false);
    return run.stderr;
  };
  it('names every table that is missing', () => {
    const plan = planOf(26);
    plan.tables[0]!.file = 'nowhere.csv';
    plan.tables[2]!.file = 'neither.csv';
    const said = refused('missing', plan);
    expect(said.trim().split('\n')).toHaveLength(2);
    expect(said).toContain('/tables/0/file');
    expect(said).toContain('neither.csv');
  });
  it('names a column that does not exist', () => {
    const plan = planOf(26);
    (plan.tables[0]!.settings.columns as Record<string, unknown>)['ra'] = 'ra_degrees';
    expect(refused('column', plan)).toContain('ra_degrees');
  });
  it('names a key of the criteria it does not know', () => {
    expect(refused('key', planOf(26, { criteria: { position: { radius: 3 } } }))).toContain('/criteria/position');
  });
  it('needs detections', () => {
    const plan = planOf(26);
    expect(refused('no hi', { ...plan, tables: plan.tables.slice(2) })).toContain('"hi"');
  });
  it('that is no JSON says so', () => {
    const path = join(root, 'broken.json');
    writeFileSync(path, '{"tables": [');
    const run = spawnSync(process.execPath, [COMMAND, path, '--out', join(root, 'never')], { encoding: 'utf8' });
    expect(run.status).toBe(2);
    expect(run.stderr).toContain('not valid JSON');
    expect(existsSync(join(root, 'never'))).toBe(false);
  });
  it('without a folder for its outputs says how it is called', () => {
    const run = spawnSync(process.execPath, [COMMAND, 'x.json'], { encoding: 'utf8' });
    expect(run.status).toBe(2);
    expect(run.stderr).toContain('--out');
  });
});
