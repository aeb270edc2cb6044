import { readFileSync } from 'node:fs';
import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { faultOf, openMemory, readAll } from '../testing/read-all.ts';

const sample = (name: string) => readFileSync(new URL(`../../../../testdata/tables/${name}`, import.meta.url));
const names = (columns: { name: string }[]) => columns.map((column) => column.name);

describe('openDelimited', () => {
  it('reads a semicolon file with decimal commas, units, quotes and a byte-order mark', async () => {
    const open = await openMemory(sample('semicolon-decimal-comma.csv'));
    expect(open.format).toBe('semicolon');
    expect(open.tables[0]!.columns).toEqual([
      { name: 'name', type: 'text' },
      { name: 'ra', type: 'number', unit: 'deg' },
      { name: 'dec', type: 'number', unit: 'deg' },
      { name: 'v', type: 'integer', unit: 'km/s' },
    ]);
    const { rows, lines } = await readAll(open);
    expect(rows).toEqual([
      ['Fern 1', 10.5, -2.25, 1500],
      ['Fern "2"', 11, 0.125, null],
    ]);
    expect(lines).toEqual([3, 4]);
  });

  it('takes names from a # header and leaves numeric marks for the role to judge', async () => {
    const open = await openMemory(sample('hash-header.txt'));
    expect(open.format).toBe('whitespace');
    expect(names(open.tables[0]!.columns)).toEqual(['name', 'ra', 'dec', 'cz']);
    expect((await readAll(open)).rows).toEqual([
      ['F1', 10.5, -2.25, 1500],
      ['F2', 11, 0.125, -99],
      ['F 3', 12, 30, null],
    ]);
  });

  it('keeps long identifiers as text, odd cells with their text, and short rows apart', async () => {
    const open = await openMemory(sample('identifiers-ragged.csv'));
    const { rows, broken, lines, rowNumbers } = await readAll(open);
    expect(rows).toEqual([
      ['1237648720693755918', 150.1, 2.2, 18.25, 'line one\nline two'],
      ['1237648720693755919', 150.2, 2.3, null, 'a "quoted" word'],
    ]);
    expect(lines).toEqual([2, 4]);
    expect(rowNumbers).toEqual([1, 2]);
    expect(broken).toEqual([
      { row: 3, line: 5, reason: 'The row has 4 cells, not 5.', text: '1237648720693755920,150.3,2.4,<22.5' },
    ]);
  });

  it.each([
    [
      'windows-1252.tsv',
      'tsv',
      [
        ['F1', '20°', 1],
        ['F2', '21°', 2],
      ],
    ],
    [
      'utf-16.csv',
      'csv',
      [
        ['F1', 10],
        ['Fü2', 20],
      ],
    ],
  ])('reads %s in its own encoding', async (file, format, rows) => {
    const open = await openMemory(sample(file));
    expect(open.format).toBe(format);
    expect((await readAll(open)).rows).toEqual(rows);
  });

  it('reads cells that are not UTF-8 as Windows-1252 where encodings are mixed', async () => {
    const start = `name,v\n${'é,1\n'.repeat(100_000)}`;
    const open = await openMemory(Buffer.concat([Buffer.from(start), Buffer.from('20\xb0,2\n', 'latin1')]));
    const { rows } = await readAll(open);
    expect(rows[0]).toEqual(['é', 1]);
    expect(rows.at(-1)).toEqual(['20°', 2]);
  });

  it('keeps odd cells of a number column word for word', async () => {
    const lines = Array.from({ length: 2_000 }, (_, i) => String(i));
    const late = ['<22.5', 'Infinity', '9007199254740993', '00042', '\u22125', 'n/a', '1e999'];
    const { rows } = await readAll(await openMemory(`v,w\n${[...lines, ...late].map((v) => `${v},1`).join('\n')}\n`));
    expect(rows.slice(-7).map(([cell]) => cell)).toEqual([
      '<22.5',
      'Infinity',
      '9007199254740993',
      '00042',
      -5,
      null,
      '1e999',
    ]);
  });

  it('types a column by rows from all over the file', async () => {
    const body = Array.from({ length: 60_000 }, (_, i) => `${i},${i < 40_000 ? '' : '0.5'}`).join('\n');
    const open = await openMemory(`id,z\n${body}\n`);
    expect(open.tables[0]!.columns[1]!.type).toBe('number');
  });

  it('makes names unique and says so; numbers columns when there is no header', async () => {
    const twice = await openMemory('a,a,,b\n1,2,3,4\n');
    expect(names(twice.tables[0]!.columns)).toEqual(['a', 'a_2', 'column_3', 'b']);
    expect(twice.tables[0]!.notes).toHaveLength(2);
    const bare = await openMemory('1,2\n3,4\n');
    expect(names(bare.tables[0]!.columns)).toEqual(['column_1', 'column_2']);
    expect((await readAll(bare)).rows).toEqual([
      [1, 2],
      [3, 4],
    ]);
  });

  it('takes names and units from numbered comments, as source-extraction software writes them', async () => {
    const open = await openMemory(
      '#   1 NUMBER  Running number\n#   2 X_WORLD  Position [deg]\n#   3 FLUX\n 1 10.5 3.2 3.3\n 2 11.5 4.2 4.3\n',
    );
    expect(open.tables[0]!.columns.map(({ name, unit }) => [name, unit])).toEqual([
      ['NUMBER', undefined],
      ['X_WORLD', 'deg'],
      ['FLUX', undefined],
      ['FLUX_1', undefined],
    ]);
  });

  it('reads CR line ends, trailing delimiters and bars at both ends', async () => {
    expect((await readAll(await openMemory('a,b\r1,2\r3,4\r'))).rows).toEqual([
      [1, 2],
      [3, 4],
    ]);
    expect((await readAll(await openMemory('a,b,\n1,2,\n3,4,\n'))).rows).toEqual([
      [1, 2],
      [3, 4],
    ]);
    expect((await readAll(await openMemory('|a|b|\n|--|--|\n|1|2|\n|3|4|\n'))).rows).toEqual([
      [1, 2],
      [3, 4],
    ]);
  });

  it('gives the same rows whatever the size of the pieces, plain or gzipped', async () => {
    const text = `id,name,v\n${Array.from({ length: 300 }, (_, i) => `${i},"n ""${i}""\n",${i / 7}`).join('\r\n')}\r\n`;
    const whole = await readAll(await openMemory(text));
    expect(whole.rows).toHaveLength(300);
    for (const pieceBytes of [1, 7, 1000]) {
      expect((await readAll(await openMemory(text, {}, { pieceBytes }))).rows).toEqual(whole.rows);
    }
    expect(await readAll(await openMemory(gzipSync(text)))).toEqual(whole);
  });

  it('cuts chunks that number their rows through', async () => {
    const open = await openMemory('a\n1\n2\n3\n4\n5\n', { chunkRows: 2 });
    const firsts: number[] = [];
    for await (const chunk of open.rows(0)) firsts.push(chunk.firstRow, chunk.rows);
    expect(firsts).toEqual([1, 2, 3, 2, 5, 1]);
  });

  it('reads words for "no value" in number columns as missing (trade practice, from memory)', async () => {
    const words = ['NaN', 'null', '--', 'INDEF', 'N/A', '...', '…', '---', 'none', '-'];
    const numbers = Array.from({ length: 200 }, (_, i) => `${i}.5,1`);
    const { rows } = await readAll(
      await openMemory(`v,w\n${[...numbers, ...words.map((word) => `${word},1`)].join('\n')}\n`),
    );
    expect(rows.slice(200).map(([cell]) => cell)).toEqual(words.map(() => null));
  });

  it.each([
    ['NUL bytes', 'a,b\n1,2\n3,\0\n', 'nul-byte'],
    ['prose', 'this is prose\nand not at all a table\nof any kind\nbut words one after another\n', 'not-a-table'],
    ['comments alone', '# nothing\n# here\n', 'empty'],
    ['a workbook', 'PK\x03\x04rest', 'unsupported'],
    ['a web page', '<!DOCTYPE html><html></html>', 'unsupported'],
  ])('refuses %s with a code and a mend', async (_, text, code) => {
    const fault = await faultOf(text);
    expect(fault.code).toBe(code);
    expect(fault.mend).not.toBe('');
  });

  it('delivers the rows before a NUL byte and says how many', async () => {
    const { rows, fault } = await readAll(await openMemory('a,b\n1,2\n3,\0\n'));
    expect(rows).toEqual([[1, 2]]);
    expect(fault).toMatchObject({ code: 'nul-byte', byte: 10, rowsRead: 1 });
  });

  it('stops at a line longer than the limit, with its number', async () => {
    const fault = await faultOf(`a,b\n1,2\n${'x'.repeat(5000)},1\n`, { maxLineLength: 1000 });
    expect(fault).toMatchObject({ code: 'line-too-long', line: 3, rowsRead: 1 });
    expect((await faultOf('x'.repeat(400_000))).code).toBe('line-too-long');
  });

  it('refuses more columns than the limit', async () => {
    expect((await faultOf(`${'a,'.repeat(6000)}b\n`)).code).toBe('too-many-columns');
  });
});
