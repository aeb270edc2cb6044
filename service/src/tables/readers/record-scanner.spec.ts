import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { RecordScanner } from './record-scanner.ts';

function scanAll(text: string): string[][] {
  const bytes = Buffer.from(text);
  const scanner = new RecordScanner(',', 1024);
  const records: string[][] = [];
  for (let at = 0; at < bytes.length;) {
    at = scanner.scan(bytes, at, bytes.length, true);
    const cells = Array.from({ length: scanner.count }, (_, i) => {
      return bytes.toString('utf8', scanner.starts[i], scanner.ends[i]).replaceAll('""', '"');
    });
    records.push(cells);
  }
  return records;
}

describe('RecordScanner', () => {
  it('splits well-formed CSV as papaparse does', () => {
    const cell = fc.string({ unit: fc.constantFrom('a', '7', ' ', ',', '"', '\n', '.', 'é'), maxLength: 6 });
    const table = fc.array(
      fc.array(
        cell.map((text) => `x${text}x`),
        { minLength: 2, maxLength: 4 },
      ),
      { minLength: 1, maxLength: 5 },
    );
    fc.assert(
      fc.property(table, (rows) => {
        const text = Papa.unparse(rows, { newline: '\n' });
        expect(scanAll(text)).toEqual(Papa.parse(text, { delimiter: ',', newline: '\n' }).data);
      }),
      { numRuns: 500 },
    );
  });

  it('answers -1 for a record cut off at any place, and the same record once it is whole', () => {
    const bytes = Buffer.from('ab,"c ""d""\ne",f\r\n');
    const scanner = new RecordScanner(',', 1024);
    for (let end = 0; end < bytes.length; end++) expect(scanner.scan(bytes, 0, end, false)).toBe(-1);
    expect(scanner.scan(bytes, 0, bytes.length, false)).toBe(bytes.length);
    expect([scanner.count, scanner.newlines]).toEqual([3, 2]);
  });

  it('takes a quote that closes inside a word or never for an ordinary character', () => {
    expect(scanAll('5"2,"a"b,"c')).toEqual([['5"2', '"a"b', '"c']]);
  });
});
