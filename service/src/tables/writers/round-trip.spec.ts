import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { openMemory, readAll } from '../testing/read-all.ts';
import { guardText, writeCsv } from './csv.ts';
import { writeFits } from './fits.ts';
import { writeJson } from './json.ts';
import { writeMrt } from './mrt.ts';
import type { OutputColumn, OutputRow } from './output-column.ts';
import { writeVotable } from './votable.ts';

const columns: OutputColumn[] = [
  { name: 'name', datatype: 'text', ucd: 'meta.id;meta.main', description: 'Name' },
  { name: 'ra', datatype: 'double', unit: 'deg', ucd: 'pos.eq.ra;meta.main', description: 'Right ascension' },
  { name: 'n', datatype: 'integer', description: 'A number' },
  { name: 'flag', datatype: 'boolean' },
  {
    name: 'note',
    datatype: 'text',
    description: 'A note that is long enough to be broken into several lines of a description',
  },
];
const table = { name: 'invented', description: 'Invented & "small" <table>', frame: 'ICRS' };

const finite = fc.double({ noNaN: true, noDefaultInfinity: true }).map((value) => value + 0);
const letters = (from: { unit: 'grapheme' | 'grapheme-ascii' }) => fc.string({ ...from, maxLength: 12 });
const rowsWith = (text: fc.Arbitrary<string>) =>
  fc.array(
    fc.tuple(
      text.map((rest) => `N${rest}`),
      fc.option(finite),
      fc.option(fc.maxSafeInteger().filter((value) => Math.abs(value) < 9e15)),
      fc.option(fc.boolean()),
      fc.option(text.map((rest) => `a${rest}z`)),
    ),
    { minLength: 1, maxLength: 8 },
  );

async function bytesOf(pieces: AsyncIterable<Uint8Array>): Promise<Buffer> {
  const held: Uint8Array[] = [];
  for await (const piece of pieces) held.push(piece);
  return Buffer.concat(held);
}

/** Cells as a reader gives them back. */
const readBack = (rows: OutputRow[]) =>
  rows.map((row) => row.map((cell) => (typeof cell === 'boolean' ? String(cell) : cell)));
/** CSV has no types: a column without values is text, so only the spelling is compared. */
const spelled = (rows: OutputRow[]) =>
  rows.map((row) =>
    row.map((cell) =>
      typeof cell === 'string' || typeof cell === 'number'
        ? String(Number(cell) || cell)
        : cell === null
          ? null
          : String(cell),
    ),
  );

const names = async (bytes: Buffer) => (await openMemory(bytes)).tables[0]!.columns.map(({ name }) => name);

describe('writing a table and reading it back', () => {
  it('keeps every cell in CSV', async () => {
    await fc.assert(
      fc.asyncProperty(
        rowsWith(letters({ unit: 'grapheme' }).filter((text) => !text.includes('\0'))),
        fc.boolean(),
        async (rows, unitsRow) => {
          const bytes = await bytesOf(writeCsv(columns, rows, { unitsRow, comments: ['Invented'] }));
          const { rows: read, broken } = await readAll(await openMemory(bytes));
          expect(broken).toEqual([]);
          const shown = unitsRow && !rows.some(([, ra]) => ra !== null) ? read.slice(1) : read;
          expect(spelled(shown)).toEqual(spelled(rows));
        },
      ),
      { numRuns: 150 },
    );
  });

  it('keeps every cell in VOTable', async () => {
    await fc.assert(
      fc.asyncProperty(rowsWith(letters({ unit: 'grapheme' }).filter((text) => !text.includes('\0'))), async (rows) => {
        const bytes = await bytesOf(writeVotable(columns, rows, table));
        const open = await openMemory(bytes);
        expect(open.tables[0]).toMatchObject({ name: 'invented', description: table.description, frame: 'ICRS' });
        const { rows: read, fault } = await readAll(open);
        expect(fault).toBeUndefined();
        expect(read).toEqual(readBack(rows));
      }),
      { numRuns: 150 },
    );
  });

  it('keeps every cell in FITS', async () => {
    await fc.assert(
      fc.asyncProperty(rowsWith(letters({ unit: 'grapheme-ascii' })), async (rows) => {
        const bytes = await bytesOf(writeFits(columns, rows, table));
        expect(bytes.length % 2880).toBe(0);
        const open = await openMemory(bytes);
        expect(open.tables[0]).toMatchObject({ name: 'invented', frame: 'ICRS', declaredRows: rows.length });
        expect((await readAll(open)).rows).toEqual(readBack(rows).map((row) => row.map(trimmed)));
      }),
      { numRuns: 150 },
    );
  });

  it('keeps every cell in the machine-readable form', async () => {
    await fc.assert(
      fc.asyncProperty(rowsWith(letters({ unit: 'grapheme-ascii' })), async (rows) => {
        const bytes = await bytesOf(writeMrt(columns, rows, { ...table, title: 'Invented', authors: 'Nobody' }));
        const head = bytes.toString().split('\n').slice(0, 20);
        expect(head.every((line) => line.length <= 80 || line.startsWith('N'))).toBe(true);
        const open = await openMemory(bytes);
        expect(open.tables[0]!.columns[1]).toMatchObject({ name: 'ra', type: 'number', unit: 'deg' });
        expect((await readAll(open)).rows).toEqual(readBack(rows).map((row) => row.map(trimmed)));
      }),
      { numRuns: 150 },
    );
  });

  it('keeps every cell in JSON', async () => {
    await fc.assert(
      fc.asyncProperty(rowsWith(letters({ unit: 'grapheme' })), async (rows) => {
        const text = (await bytesOf(writeJson(columns, rows, table))).toString();
        expect((JSON.parse(text) as { rows: unknown }).rows).toEqual(rows);
      }),
      { numRuns: 50 },
    );
  });

  it('keeps names, units and descriptions where the format has room', async () => {
    const rows: OutputRow[] = [['F1', 10.5, 3, true, 'x']];
    for (const pieces of [
      writeCsv(columns, rows),
      writeVotable(columns, rows, table),
      writeFits(columns, rows, table),
    ]) {
      expect(await names(await bytesOf(pieces))).toEqual(['name', 'ra', 'n', 'flag', 'note']);
    }
    const open = await openMemory(await bytesOf(writeVotable(columns, rows, table)));
    expect(open.tables[0]!.columns[1]).toEqual({
      name: 'ra', type: 'number', unit: 'deg', ucd: 'pos.eq.ra;meta.main', description: 'Right ascension',
    }); // prettier-ignore
  });

  it('writes no rows as a table without rows', async () => {
    for (const pieces of [writeCsv(columns, []), writeVotable(columns, [], table), writeFits(columns, [], table)]) {
      const { rows, fault } = await readAll(await openMemory(await bytesOf(pieces)));
      expect([rows, fault]).toEqual([[], undefined]);
    }
  });
});

function trimmed<Cell>(cell: Cell): Cell | string {
  return typeof cell === 'string' ? cell.trim() : cell;
}

describe('writeCsv', () => {
  it('guards text that a spreadsheet would run, and never a number', () => {
    expect(['=1+1', '+cmd', '-x', '@a', '\t=1'].map(guardText)).toEqual(["'=1+1", "'+cmd", "'-x", "'@a", "'\t=1"]);
    expect(['-12.5', '+3', '-1e5', 'plain', 'a=b'].map(guardText)).toEqual(['-12.5', '+3', '-1e5', 'plain', 'a=b']);
  });

  it('rounds to the decimals asked for and leaves missing cells empty', async () => {
    const one: OutputColumn[] = [
      { name: 'v', datatype: 'double', decimals: 2 },
      { name: 'w', datatype: 'double' },
    ];
    const text = (
      await bytesOf(
        writeCsv(one, [
          [1.2345, NaN],
          [null, Infinity],
        ]),
      )
    ).toString();
    expect(text).toBe('v,w\r\n1.23,\r\n,\r\n');
  });
});
