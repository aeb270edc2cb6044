import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { type AstropyTable, compareWithAstropy } from './compare-with-astropy.ts';

// Every sample table in astropy's own test folders (io.votable, io.fits, io.ascii) that astropy itself can read, read by
// both and compared: rows, column names, units, nulls in each column, first and last row. astropy-tables.py does
// astropy's part with its reader for the format of each file.

const PYTHON = '/usr/bin/python3';

function astropyFolder(): string | undefined {
  if (!existsSync(PYTHON)) return undefined;
  try {
    const code = 'import astropy, os; print(os.path.dirname(astropy.__file__))';
    return execFileSync(PYTHON, ['-c', code], { encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'] }).trim();
  } catch {
    return undefined;
  }
}

/** Photometry listings with a head of #N, #U, #F lines and continued rows: none of the formats read here. */
const OTHER_FORMAT = /daophot/;

/** Files on which the two readers differ, and why. Each is looked at; a new difference fails the test. */
const EXPLAINED: { [file: string]: string } = {
  'gemini.xml#0': 'empty integer cells are missing here; astropy 5.2 gives 0',
  'names.xml#0': 'the file promises 18949 rows and has one: read, then told; astropy does not compare',
  'no_field_not_empty_table.xml#0': 'three rows without any column: counted here, dropped by astropy',
  'regression.xml#0':
    'text longer and numbers larger than declared are kept here and cut by astropy; base64 cells are kept as text',
  'regression.xml#1': 'as above',
  'ascii.fits#0': 'cells equal to TNULL are missing here; astropy gives 0',
  'bars_at_ends.txt#0': "astropy's fixed-width reader cuts the last column, which is 12.5",
  'commented_header.dat#0':
    'of two comments with three words each the last is taken for the header, astropy is told the first',
  'fixed_width_2_line.txt#0': 'single quotes do not hold blanks together here, so a row with such a cell is sidelined',
  'simple.txt#0': 'single quotes again',
  'nls1_stackinfo.dbout#0':
    'read by its bars here; astropy has no reader that takes its head without being told the places',
  'no_data_sextractor.dat#0': 'comments without any row are refused with a clear error',
  'no_data_without_header.dat#0': 'comments without any row are refused with a clear error',
  'simple_csv_missing.csv#0': 'a row with too few cells is sidelined here; astropy fills it up',
};

const folder = astropyFolder();
if (folder === undefined) console.log('Skipped: no astropy under /usr/bin/python3 to compare the table readers with.');

describe.skipIf(folder === undefined)('sample tables of astropy', () => {
  it('are read alike, but for differences that are explained', async () => {
    const script = fileURLToPath(new URL('astropy-tables.py', import.meta.url));
    const lines = execFileSync(PYTHON, [script, folder!], { encoding: 'utf8', maxBuffer: 64 * 1024 ** 2 })
      .trim()
      .split('\n');
    const records = lines
      .map((line) => JSON.parse(line) as AstropyTable)
      .filter(({ error, file }) => error === undefined && !OTHER_FORMAT.test(file));
    const differing = new Map<string, string[]>();
    for (const record of records) {
      const differences = await compareWithAstropy(record);
      const name = `${record.file.replace(/^.*\/tests\/data\//, '')}#${record.table}`;
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
