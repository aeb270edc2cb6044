import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { fileSource } from '@eremite/service/tables/bytes/byte-source.ts';
import { openTable } from '@eremite/service/tables/open-table.ts';
import { readAll, type ReadCell } from '@eremite/service/tables/testing/read-all.ts';

// Every sample table in astropy's own test folders (io.votable, io.fits, io.ascii) that astropy itself can read, read by
// both and compared: rows, column names, units, nulls in each column, first and last row. astropy-tables.py does
// astropy's part with its reader for the format of each file.

type Cell = number | string | boolean | null | { array: Cell[] };

interface Record {
  file: string;
  table: number;
  error?: string;
  readMe?: string;
  rows: number;
  columns: { name: string; unit: string | null }[];
  nulls: number[] | null;
  first?: Cell[];
  last?: Cell[];
}

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
      .map((line) => JSON.parse(line) as Record)
      .filter(({ error, file }) => error === undefined && !OTHER_FORMAT.test(file));
    const differing = new Map<string, string[]>();
    for (const record of records) {
      const differences = await compare(record);
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

async function compare(record: Record): Promise<string[]> {
  const differences: string[] = [];
  try {
    const options = record.readMe === undefined ? {} : { readMe: await fileSource(record.readMe) };
    const open = await openTable(await fileSource(record.file), {}, options);
    const facts = open.tables[record.table];
    if (facts === undefined) return [`no table ${record.table}`];
    const { rows, broken, fault } = await readAll(open, record.table);
    if (fault !== undefined) differences.push(`ends in: ${fault.message}`);
    if (rows.length !== record.rows)
      differences.push(`${rows.length} rows (${broken.length} broken), not ${record.rows}`);
    const names = facts.columns.map(({ name }) => name.replace(/^column_/, 'col'));
    const theirs = record.columns.map(({ name }) => name);
    if (names.join('|') !== theirs.join('|')) differences.push(`columns ${names.join(',')} not ${theirs.join(',')}`);
    for (const [i, column] of facts.columns.entries()) {
      const unit = record.columns[i]?.unit ?? null;
      if (unitKey(column.unit ?? null) !== unitKey(unit))
        differences.push(`unit of ${column.name} ${column.unit} not ${unit}`);
      const nulls = rows.filter((row) => isNull(row[i]!)).length;
      if (record.nulls && nulls !== record.nulls[i])
        differences.push(`${nulls} nulls in ${column.name}, not ${record.nulls[i]}`);
      for (const [label, ours, their] of [
        ['first', rows[0], record.first],
        ['last', rows.at(-1), record.last],
      ] as const) {
        if (ours === undefined || their === undefined || same(ours[i]!, their[i] ?? null)) continue;
        differences.push(`${label} ${column.name} ${JSON.stringify(ours[i])} not ${JSON.stringify(their[i])}`);
      }
    }
  } catch (error) {
    differences.push(`not read: ${(error as Error).message}`);
  }
  return differences;
}

function isNull(cell: ReadCell): boolean {
  return cell === null || (typeof cell === 'string' && /^(\[?\s*((NaN|null)[\s,]*)*\]?)$/.test(cell.trim()));
}

function same(ours: ReadCell, theirs: Cell): boolean {
  if (theirs === null) return isNull(ours);
  if (typeof theirs === 'boolean')
    return String(ours).toLowerCase() === String(theirs) || Number(ours) === Number(theirs);
  if (typeof theirs === 'object') return sameArray(ours, theirs.array);
  if (typeof ours === 'number' || typeof theirs === 'number') {
    const number = typeof ours === 'number' ? ours : Number(String(ours).replace(/^\+?inf.*/i, 'Infinity'));
    // A 32-bit column written as decimal text keeps the decimals as they are written.
    return number === Number(theirs) || Math.fround(number) === theirs || String(ours).trim() === String(theirs);
  }
  return String(ours).trim() === theirs || sameNumberWord(String(ours), theirs);
}

/** Infinities are spelled in many ways. */
function sameNumberWord(ours: string, theirs: string): boolean {
  const sign = (text: string) => /^([+-]?)inf(inity)?$/i.exec(text.trim())?.[1]?.replace('+', '');
  return sign(ours) !== undefined && sign(ours) === sign(theirs);
}

function sameArray(ours: ReadCell, theirs: Cell[]): boolean {
  const text = String(ours ?? '');
  const items = text.startsWith('[')
    ? (JSON.parse(text) as Cell[]).flat(9).map(String)
    : text.split(/[\s,]+/).filter((item) => item !== '');
  const flat = theirs.flatMap(function flatten(cell): Cell[] {
    return cell !== null && typeof cell === 'object' ? cell.array.flatMap(flatten) : [cell];
  });
  if (items.length !== flat.length) return flat.every((cell) => cell === null) || items.join('') === flat.join('');
  return flat.every((cell, i) => {
    const item = items[i]!;
    if (cell === null || cell === 'None') return /^(nan|null|)$/i.test(item);
    if (typeof cell === 'boolean') return item.toLowerCase() === String(cell) || item === (cell ? '1' : '0');
    // 32-bit elements are written with the digits they need, not with those of a double.
    return item === String(cell) || Math.abs(Number(item) - Number(cell)) <= 1e-6 * Math.abs(Number(cell));
  });
}

/** One spelling for km/s, km.s-1, "km s**-1", [K] and the like: factors with their powers, in order. */
function unitKey(unit: string | null): string {
  if (unit === null || /^-*$/.test(unit.trim())) return '';
  const powers = new Map<string, number>();
  let sign = 1;
  const spelled = unit
    .toLowerCase()
    .replaceAll('pixel', 'pix')
    .replace(/^\[(.*)\]$/, 'dex $1')
    .replace(/^dex\((.*)\)$/, 'dex $1')
    .replace(/0\.1\s*(?=[np]m)/, 'tenth ')
    .replace(/\s*\/\s*/g, ' / ')
    .replace(/\*\*|\^/g, '');
  for (const part of spelled.split(/[\s.*]+/)) {
    if (part === '/') sign = -1;
    const [, name, power] = /^\(?([^\d()-]+)\(?([+-]?\d+)?\)*$/.exec(part) ?? [];
    if (part === '/' || name === undefined) continue;
    powers.set(name, (powers.get(name) ?? 0) + sign * Number(power ?? 1));
    sign = 1;
  }
  return [...powers]
    .map(([name, power]) => name + power)
    .sort()
    .join(' ');
}
