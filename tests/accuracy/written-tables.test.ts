import { execFileSync } from 'node:child_process';
import { createWriteStream, existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { fileURLToPath } from 'node:url';
import { CANDIDATE_COLUMNS } from '@eremite/service/edition/columns/evidence-columns.ts';
import { type TableColumn, tableOf } from '@eremite/service/edition/columns/table-column.ts';
import { SHORTLIST_COLUMNS, type VerdictLine } from '@eremite/service/edition/columns/verdict-columns.ts';
import { FORMAT_FACTS, TABLE_FORMATS, writeTable } from '@eremite/service/tables/writers/write-table.ts';
import { randomStream } from '@eremite/shared/science/robustness/random';
import { afterAll, describe, expect, it } from 'vitest';
import { candidateLine, verdictLine } from './written-lines.ts';

const PYTHON = '/usr/bin/python3';
/** The schema of VOTable 1.4 that Debian's astropy carries. */
const SCHEMA = '/usr/lib/python3/dist-packages/astropy/io/votable/data/VOTable.v1.4.xsd';
const works = (command: string, ...words: string[]): boolean => {
  try {
    execFileSync(command, words, { stdio: 'ignore' });
    return true;
  } catch {
    return false;
  }
};
const hasAstropy = existsSync(PYTHON) && works(PYTHON, '-c', 'import astropy');
const hasXmllint = works('xmllint', '--version') && existsSync(SCHEMA);
if (!hasAstropy) console.log('Skipped: no astropy under /usr/bin/python3 to read the exports back with.');
if (!hasXmllint) console.log('Skipped: no xmllint, or no schema of VOTable 1.4, to validate an export with.');

/** More than are held in memory; the long test has as many as an export may well have. */
const CANDIDATES = process.env['EREMITE_LONG'] ? 100_000 : 12_000;
const folder = mkdtempSync(join(tmpdir(), 'eremite-written-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** Writes the same lines in every format; lines are made anew for each, so that none is held. */
async function write<Line>(columns: readonly TableColumn<Line>[], line: (i: number) => Line, count: number) {
  const place = mkdtempSync(join(folder, 'tables-'));
  for (const format of TABLE_FORMATS) {
    const lines = function* () {
      for (let i = 0; i < count; i++) yield line(i);
    };
    const { columns: shown, rows, description } = tableOf(columns, lines(), 'Invented');
    const table = { name: 'table', title: 'Invented', authors: 'Nobody', description, columns: shown, rows };
    const path = join(place, `table.${FORMAT_FACTS[format].ending}`);
    await pipeline(Readable.from(writeTable(format, table)), createWriteStream(path));
  }
  return place;
}

const readBack = (place: string, ...words: string[]): Record<string, { rows: number; faults: string[] }> => {
  const script = fileURLToPath(new URL('written-tables.py', import.meta.url));
  const text = execFileSync(PYTHON, [script, place, ...words], { encoding: 'utf8', maxBuffer: 1 << 26 });
  return JSON.parse(text) as Record<string, { rows: number; faults: string[] }>;
};
const allFine = (rows: number) =>
  Object.fromEntries(['csv', 'vot', 'fits', 'txt'].map((ending) => [ending, { rows, faults: [] }]));

describe.skipIf(!hasAstropy)('astropy reads back what is exported', () => {
  it('verdicts in CSV, VOTable, FITS and machine-readable form: values, units, nulls, names, descriptions', async () => {
    const stream = randomStream(7, 'lines');
    const random = () => stream.uniform();
    const lines = Array.from({ length: 300 }, (_, i) => verdictLine(i, random));
    const place = await write<VerdictLine>(SHORTLIST_COLUMNS, (i) => lines[i]!, lines.length);
    expect(readBack(place)).toEqual(allFine(300));
  });

  it(`${CANDIDATES} candidates likewise`, async () => {
    const place = await write(CANDIDATE_COLUMNS, candidateLine, CANDIDATES);
    expect(readBack(place)).toEqual(allFine(CANDIDATES));
  }, 600_000);
});

describe('the machine-readable form', () => {
  it('has each value at the bytes its description states, and sign of minus zero degrees', async () => {
    const stream = randomStream(8, 'lines');
    const random = () => stream.uniform();
    const lines = Array.from({ length: 40 }, (_, i) => verdictLine(i, random));
    lines[3]!.item.decDeg = -0.00027;
    const place = await write<VerdictLine>(SHORTLIST_COLUMNS, (i) => lines[i]!, lines.length);
    const text = readFileSync(join(place, 'table.txt'), 'ascii').split('\n');
    const rules = text.flatMap((line, i) => (/^-+$/.test(line) ? [i] : []));
    const places = text.slice(rules[1]! + 1, rules[2]).flatMap((line) => {
      const found = /^\s*(?:(\d+)-\s*)?(\d+) ([AIFE])[\d.]+\s+\S+\s+(\S+)/.exec(line);
      return found ? [{ from: Number(found[1] ?? found[2]), to: Number(found[2]), label: found[4]! }] : [];
    });
    const data = text.slice(rules.at(-1)! + 1).filter((line) => line !== '');
    expect(data).toHaveLength(40);
    const at = (row: number, label: string) => {
      const { from, to } = places.find((place_) => place_.label === label)!;
      return data[row]!.slice(from - 1, to).trim();
    };
    for (const [row, { item, rank }] of lines.entries()) {
      expect(at(row, 'rank')).toBe(String(rank));
      expect(at(row, 'detection')).toBe(item.name.replace('Ærø', 'AEro').replace('Łódź', 'Lodz'));
      expect(at(row, 'ra_deg')).toBe(item.raDeg.toFixed(5));
      expect(at(row, 'p_none')).toBe(item.pNone.toFixed(4));
      expect(at(row, 'p_alone')).toBe(item.pAlone === null ? '' : item.pAlone.toFixed(4));
    }
    expect(at(3, 'dec_deg')).toBe('-0.00027');
    expect(text.slice(0, rules.at(-1)).every((line) => line.length <= 80)).toBe(true);
  });
});

describe.skipIf(!hasXmllint)('a VOTable 1.4 export', () => {
  it('is valid by the schema', async () => {
    const stream = randomStream(9, 'lines');
    const random = () => stream.uniform();
    const lines = Array.from({ length: 50 }, (_, i) => verdictLine(i, random));
    const { columns, rows, description } = tableOf(SHORTLIST_COLUMNS, lines, 'Invented & "quoted" <b>');
    const table = { name: 'table', title: '', authors: '', description, columns, rows };
    const path = join(folder, 'valid.vot');
    await pipeline(Readable.from(writeTable('votable', table, { version: '1.4' })), createWriteStream(path));
    expect(readFileSync(path, 'utf8')).toContain('<VOTABLE version="1.4"');
    expect(() => execFileSync('xmllint', ['--noout', '--schema', SCHEMA, path], { stdio: 'pipe' })).not.toThrow();
  });
});
