import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, it } from 'vitest';
import { type AstropyTable, compareWithAstropy } from './compare-with-astropy.ts';

// Answers of real archives and files of real programs: the sample tables of three Debian packages, fetched once a run and
// unpacked without being installed, read here and by astropy and compared. astropy-tables.py does astropy's part, with
// the reader that fits how each file begins.

const PACKAGES = ['python3-pyvo', 'python3-astroquery', 'python3-photutils'];
const PYTHON = '/usr/bin/python3';

const folder = fetched();
afterAll(() => folder && rmSync(folder, { recursive: true, force: true }));
if (folder === undefined) console.log(`Skipped: no astropy, or no Debian packages to be had (${PACKAGES.join(', ')}).`);

/** Folder with the unpacked packages; undefined where they, or astropy, are not to be had. */
function fetched(): string | undefined {
  if (!existsSync(PYTHON)) return undefined;
  const made = mkdtempSync(join(tmpdir(), 'eremite-samples-'));
  const run = (command: string, args: string[]) =>
    execFileSync(command, args, { cwd: made, encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'], timeout: 120_000 });
  try {
    run(PYTHON, ['-c', 'import astropy']);
    run('apt-get', ['download', '-q', ...PACKAGES]);
    for (const name of run('ls', [])
      .split('\n')
      .filter((file) => file.endsWith('.deb')))
      run('dpkg', ['-x', name, '.']);
    return made;
  } catch {
    rmSync(made, { recursive: true, force: true });
    return undefined;
  }
}

/** Logs of a model in prose, and JSON: no tables, though astropy makes something of them. */
const NO_TABLE = /besancon|jplsbdb|nasa_ads|photometry_json/;

/** Tables on which the two readers differ, and why. Each is looked at; a new difference fails the test. */
const EMPTY = 'empty integer cells are missing here; astropy gives 0';
const EXPLAINED: { [file: string]: string } = {
  'astroquery/esa/hubble/tests/data/m31.vot.test#0': EMPTY,
  'astroquery/ipac/irsa/tests/data/Box.xml#0': EMPTY,
  'astroquery/ipac/irsa/tests/data/Cone.xml#0': EMPTY,
  'astroquery/ipac/irsa/tests/data/Cone_coord.xml#0': EMPTY,
  'astroquery/ipac/irsa/tests/data/Polygon.xml#0': EMPTY,
  'astroquery/ipac/ned/tests/data/query_redshifts.xml#0': EMPTY,
  'pyvo/dal/tests/data/sla/dataset.xml#0': EMPTY,
  'astroquery/imcce/tests/data/skybot_query.dat#0':
    'the last comment before the rows names the columns and is taken for the header; astropy, left to guess, takes none',
  'astroquery/splatalogue/tests/data/CO_colons.csv#0':
    'its cells are set apart by colons, which is none of the formats; both readers see something else in it',
  'astroquery/svo_fps/tests/data/svo_fps_WavelengthEff_min=12000_WavelengthEff_max=12100.xml#0':
    'line ends within a cell are kept as they are in the file; astropy gives plain newlines',
  'astroquery/xmatch/tests/data/poslist_duplicates.csv#0':
    'of two columns with one name the second is called ra_2 here and ra_1 by astropy',
  'pyvo/dal/tests/data/query/missingcolumns.xml#0': 'three rows without any column: counted here, dropped by astropy',
};

describe.skipIf(folder === undefined)('sample tables of archives', () => {
  it('are read as astropy reads them, but for differences that are explained', { timeout: 300_000 }, async () => {
    const script = fileURLToPath(new URL('astropy-tables.py', import.meta.url));
    const lines = execFileSync(PYTHON, [script, folder!, '--by-content'], {
      encoding: 'utf8',
      maxBuffer: 256 * 1024 ** 2,
    });
    const records = lines
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line) as AstropyTable)
      .filter(({ error, file }) => error === undefined && !NO_TABLE.test(file));
    const differing = new Map<string, string[]>();
    for (const record of records) {
      const differences = await compareWithAstropy(record);
      const name = `${record.file.replace(/^.*dist-packages\//, '')}#${record.table}`;
      if (differences.length > 0) differing.set(name, differences);
    }
    const agreeing = records.length - differing.size;
    console.log(
      `${agreeing} of ${records.length} sample tables agree (${((100 * agreeing) / records.length).toFixed(1)} %).`,
    );
    for (const [name, differences] of differing) console.log(`  ${name}: ${EXPLAINED[name] ?? differences.join('; ')}`);
    expect([...differing.keys()].sort()).toEqual(Object.keys(EXPLAINED).sort());
  });
});
