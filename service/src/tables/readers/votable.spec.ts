import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { faultOf, openMemory, readAll } from '../testing/read-all.ts';

const sample = (name: string) => readFileSync(new URL(`../../../../testdata/tables/${name}`, import.meta.url));
const votable = (inside: string) => `<VOTABLE version="1.4"><RESOURCE>${inside}</RESOURCE></VOTABLE>`;
const binary = (fields: string, hex: string, kind = 'BINARY') =>
  votable(
    `<TABLE>${fields}<DATA><${kind}><STREAM encoding="base64">${Buffer.from(hex, 'hex').toString('base64')}</STREAM></${kind}></DATA></TABLE>`,
  );

describe('openVotable', () => {
  it('reads TABLEDATA with a prefix, both kinds of null, arrays, CDATA and two tables', async () => {
    const open = await openMemory(sample('tabledata.vot'));
    const [sources, second] = open.tables;
    expect(sources).toMatchObject({ name: 'sources', description: 'Invented & small', declaredRows: 2, frame: 'ICRS' });
    expect(sources!.columns[1]).toEqual({ name: 'ra', type: 'number', unit: 'deg', ucd: 'pos.eq.ra;meta.main' });
    expect(sources!.columns.map(({ type }) => type)).toEqual(['text', 'number', 'integer', 'text', 'boolean', 'text']);
    expect((await readAll(open)).rows).toEqual([
      ['A < B', 187.5, null, '1 2.5 3', 'true', '5966029325870896512'],
      ['x<y', null, 2464, null, null, null],
    ]);
    expect(second!.name).toBe('second');
    expect((await readAll(open, 1)).rows).toEqual([[7]]);
  });

  it('reads BINARY2 null flags: most significant bit first, the ninth column in the second byte', async () => {
    // Flags 0x80 0x80 and 0x01 0x00, rows of 20 bytes, values k and 10 k: VOTable 1.3, section BINARY2; bytes built by
    // hand, read back with astropy.io.votable 5.2.
    const { rows, fault } = await readAll(await openMemory(sample('binary2-nulls.vot')));
    expect(fault).toBeUndefined();
    expect(rows).toEqual([
      [null, 2, 3, 4, 5, 6, 7, 8, null],
      [10, 20, 30, 40, 50, 60, 70, null, 90],
    ]);
  });

  it('reads BINARY as astropy writes it', async () => {
    const open = await openMemory(sample('binary.vot'));
    expect((await readAll(open)).rows).toEqual([
      ['F1', 1.5, 1],
      ['F2', -2.25, 2],
    ]);
  });

  it('decodes the primitive types big-endian, with a count of four bytes before variable cells', async () => {
    // Encodings computed with astropy 5.2: double 187.5, float 23.2, int -9999, short 99, long 1, NaN, "NGC".
    const fields =
      '<FIELD name="d" datatype="double"/><FIELD name="f" datatype="float"/><FIELD name="i" datatype="int"/>' +
      '<FIELD name="s" datatype="short"/><FIELD name="l" datatype="long"/><FIELD name="n" datatype="double"/>' +
      '<FIELD name="c" datatype="char" arraysize="*"/>';
    const hex =
      '4067700000000000' +
      '41b9999a' +
      'ffffd8f1' +
      '0063' +
      '0000000000000001' +
      '7ff8000000000000' +
      '000000034e4743';
    const { rows } = await readAll(await openMemory(binary(fields, hex)));
    expect(rows).toEqual([[187.5, Math.fround(23.2), -9999, 99, 1, null, 'NGC']]);
  });

  it('decodes bits, booleans, complex numbers, UCS-2 text, arrays and declared nulls', async () => {
    const fields =
      '<FIELD name="bits" datatype="bit" arraysize="10"/><FIELD name="b" datatype="boolean"/>' +
      '<FIELD name="c" datatype="floatComplex"/><FIELD name="u" datatype="unicodeChar" arraysize="3"/>' +
      '<FIELD name="a" datatype="unsignedByte" arraysize="2x2"/><FIELD name="k" datatype="int"><VALUES null="-9"/></FIELD>';
    const hex = 'a040' + '54' + '3f80000040000000' + '00e900410000' + '01020304' + 'fffffff7';
    const { rows } = await readAll(await openMemory(binary(fields, hex)));
    expect(rows).toEqual([['1 0 1 0 0 0 0 0 0 1', 'true', '1 2', 'éA', '1 2 3 4', null]]);
  });

  it('takes the columns of the table it refers to when a table has none', async () => {
    const open = await openMemory(
      votable(
        '<TABLE ID="t"><FIELD name="a" datatype="int"/><DATA><TABLEDATA><TR><TD>1</TD></TR></TABLEDATA></DATA></TABLE>' +
          '<TABLE ref="t"><DATA><TABLEDATA><TR><TD>0x1F</TD></TR></TABLEDATA></DATA></TABLE>',
      ),
    );
    expect((await readAll(open, 1)).rows).toEqual([[31]]);
  });

  it('applies null values told once for several columns, also to elements of arrays', async () => {
    const open = await openMemory(
      votable(
        '<TABLE><FIELD name="a" datatype="int"><VALUES ID="v" null="-9"/></FIELD><FIELD name="b" datatype="int"><VALUES ref="v"/></FIELD>' +
          '<FIELD name="c" datatype="int" arraysize="2"><VALUES null="-9"/></FIELD>' +
          '<DATA><TABLEDATA><TR><TD>-9</TD><TD>-9</TD><TD>1 -9</TD></TR></TABLEDATA></DATA></TABLE>',
      ),
    );
    expect((await readAll(open)).rows).toEqual([[null, null, '1 NaN']]);
  });

  it('sidelines rows with the wrong number of cells and goes on', async () => {
    const rows = '<TR><TD>1</TD></TR><TR><TD>1</TD><TD>2</TD></TR><TR><TD>3</TD></TR>';
    const read = await readAll(
      await openMemory(
        votable(`<TABLE><FIELD name="a" datatype="int"/><DATA><TABLEDATA>${rows}</TABLEDATA></DATA></TABLE>`),
      ),
    );
    expect(read.rows).toEqual([[1], [3]]);
    expect(read.rowNumbers).toEqual([1, 3]);
    expect(read.broken[0]).toMatchObject({ row: 2, reason: 'The row has 2 cells, not 1.' });
  });

  it('never follows a stream kept elsewhere', async () => {
    const table =
      '<TABLE><FIELD name="a" datatype="int"/><DATA><BINARY><STREAM href="http://example.org/x"/></BINARY></DATA></TABLE>';
    expect((await faultOf(votable(table))).code).toBe('external-stream');
  });

  it.each([
    ['entities', '<!DOCTYPE VOTABLE [<!ENTITY a "aaaa"><!ENTITY b "&a;&a;">]><VOTABLE>&b;</VOTABLE>', 'entities'],
    [
      'an external entity',
      '<!DOCTYPE VOTABLE [<!ENTITY a SYSTEM "file:///etc/hostname">]><VOTABLE>&a;</VOTABLE>',
      'entities',
    ],
    ['tags that do not match', '<VOTABLE><RESOURCE></VOTABLE>', 'bad-header'],
    ['a service error', votable('<INFO name="QUERY_STATUS" value="ERROR">no such table</INFO>'), 'not-a-table'],
    ['base64 that is none', binary('<FIELD name="a" datatype="int"/>', '00').replace('AA==', 'A*=='), 'bad-data'],
    ['half a row', binary('<FIELD name="a" datatype="int"/>', '000000010000'), 'truncated'],
    ['an impossible cell', binary('<FIELD name="a" datatype="double" arraysize="*"/>', '7fffffff00'), 'bad-data'],
    [
      'FITS inside',
      votable('<TABLE><FIELD name="a" datatype="int"/><DATA><FITS><STREAM>x</STREAM></FITS></DATA></TABLE>'),
      'unsupported',
    ],
  ])('refuses %s', async (_, text, code) => {
    const fault = await faultOf(text);
    expect(fault.code).toBe(code);
    expect(fault.mend).not.toBe('');
  });

  it('passes on what a service says went wrong', async () => {
    const fault = await faultOf(votable('<INFO name="QUERY_STATUS" value="ERROR">no such table</INFO>'));
    expect(fault.message).toContain('no such table');
  });

  it('delivers all rows and then says that their number is not the promised one', async () => {
    const text = sample('tabledata.vot').toString().replace('nrows="2"', 'nrows="3"');
    const { rows, fault } = await readAll(await openMemory(text));
    expect(rows).toHaveLength(2);
    expect(fault).toMatchObject({ code: 'row-count', rowsRead: 2 });
  });

  it('keeps the head under its limit', async () => {
    const text = votable(`<DESCRIPTION>${'x'.repeat(400_000)}</DESCRIPTION>`);
    expect((await faultOf(text, { maxHeadBytes: 100_000 })).code).toBe('too-large');
  });
});
