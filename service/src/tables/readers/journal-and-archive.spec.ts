import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { memorySource } from '../bytes/byte-source.ts';
import { faultOf, openMemory, readAll } from '../testing/read-all.ts';

const sample = (name: string) => readFileSync(new URL(`../../../../testdata/tables/${name}`, import.meta.url));

describe('openMrt', () => {
  // The same cells as astropy 5.2's reader gives; the sign column makes -00 00 01 negative.
  it('reads columns by their places, with blank and declared nulls and the sign of the declination', async () => {
    const open = await openMemory(sample('byte-by-byte.txt'));
    expect(open.format).toBe('mrt');
    expect(open.tables[0]!.columns.at(-1)).toEqual({
      name: 'gmag', type: 'number', unit: 'mag', nullMark: '99.99', description: 'SDSS g magnitude',
    }); // prettier-ignore
    const { rows, lines } = await readAll(open);
    expect(rows).toEqual([
      ['HI001', 1, 39, 30, '+', 43, 28, 30, 2464, 22.15],
      ['HI002', 12, 30, 49.4, '-', 0, 0, 1, null, null],
    ]);
    expect(lines).toEqual([20, 21]);
  });

  it('passes over notes', async () => {
    const { rows } = await readAll(await openMemory(sample('byte-by-byte-notes.txt')));
    expect(rows).toEqual([
      ['HI001', 24.875, 2464],
      ['HI002', 188.25, null],
    ]);
  });

  it('reads a data file by its ReadMe, chosen by name and pattern', async () => {
    const block = (file: string, label: string) =>
      `Byte-by-byte Description of file: ${file}\n${'-'.repeat(40)}\n   Bytes Format Units Label Explanations\n` +
      `${'-'.repeat(40)}\n   1-  3 I3 --- ${label} A number\n${'-'.repeat(40)}\n`;
    const readMe = memorySource(Buffer.from(`${block('a.dat', 'A')}\n${block('b*.dat', 'B')}(End)\n`));
    const open = await openMemory('  1\n 22\n', {}, { name: 'b2.dat', readMe });
    expect(open.tables[0]!.columns[0]!.name).toBe('B');
    expect((await readAll(open)).rows).toEqual([[1], [22]]);
    await expect(openMemory('1\n', {}, { name: 'c.dat', readMe })).rejects.toMatchObject({ code: 'bad-header' });
    expect((await faultOf(`${block('a.dat', 'A')}\n${block('b*.dat', 'B')}(End)\n`)).message).toContain(
      'a.dat, b*.dat',
    );
  });

  it('sidelines a line that is longer than its description', async () => {
    const { rows, broken } = await readAll(
      await openMemory(`${sample('byte-by-byte-notes.txt')}HI003 100.000 1234 more\n`),
    );
    expect(rows).toHaveLength(2);
    expect(broken[0]).toMatchObject({ row: 3, text: 'HI003 100.000 1234 more' });
  });
});

describe('openIpac', () => {
  it('reads names, types, units and nulls between bars', async () => {
    const open = await openMemory(sample('nulls.ipac'));
    expect(open.format).toBe('ipac');
    expect(open.tables[0]!.columns[2]).toEqual({ name: 'cz', type: 'integer', unit: 'km/s', nullMark: '-999' });
    expect((await readAll(open)).rows).toEqual([
      ['Fern 1', 10.5, 1500],
      [null, null, null],
    ]);
  });
});

describe('openEcsv', () => {
  it('reads units, descriptions, types and the frame from its head', async () => {
    const open = await openMemory(sample('columns.ecsv'));
    expect(open.format).toBe('ecsv');
    expect(open.tables[0]!.frame).toBe('icrs');
    expect(open.tables[0]!.columns).toEqual([
      { name: 'name', type: 'text', description: 'Name, as listed' },
      { name: 'ra', type: 'number', unit: 'deg' },
      { name: 'source_id', type: 'text' },
      { name: 'member', type: 'boolean' },
    ]);
    expect((await readAll(open)).rows).toEqual([
      ['Fern 1', 10.5, '5966029325870896512', 'True'],
      [null, null, '5966021186907903360', 'False'],
    ]);
  });

  it('reads arrays, in block style too', async () => {
    const head =
      "# %ECSV 1.0\n# ---\n# delimiter: ','\n# datatype:\n# -\n#   name: a\n#   datatype: string\n#   subtype: 'int32[2,2]'\n# -\n#   name: b\n#   datatype: float32\n";
    const open = await openMemory(`${head}a,b\n"[[1,2],[null,4]]",2.5\n`);
    expect(open.tables[0]!.columns[0]!.arraySize).toBe('2x2');
    expect((await readAll(open)).rows).toEqual([['1 2 NaN 4', 2.5]]);
  });

  it('refuses a header row that does not fit', async () => {
    expect((await faultOf(String(sample('columns.ecsv')).replace('name ra source_id', 'name source_id'))).code).toBe(
      'bad-header',
    );
  });
});
