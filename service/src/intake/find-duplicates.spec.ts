import { describe, expect, it } from 'vitest';
import { memorySource } from '../tables/bytes/byte-source.ts';
import { readCatalogue } from './read-table.ts';

const HEAD = 'name,ra_deg,dec_deg,cz_kms,w50_kms,snr';
const settings = { kind: 'hi' as const, beamArcsec: { major: 210, minor: 210 } };
const read = (rows: string[], more: object = {}) =>
  readCatalogue(memorySource(Buffer.from([HEAD, ...rows].join('\n'))), { ...settings, ...more });
const rowsOf = async (...given: Parameters<typeof read>) => Array.from((await read(...given)).roles.columns.row);
const remarks = async (...given: Parameters<typeof read>) =>
  (await read(...given)).questions.filter(({ pointer }) => pointer === '/mergeDuplicates');

describe('duplicates in an HI list', () => {
  // Sigma of a beam of 210 arcsec at S/N 12 and 20: hypot(0.6 * 210 / S/N, 10) = 14.5 and 11.8 arcsec; three times
  // their quadratic sum is 56 arcsec.
  const twice = ['a,150,2,3000,80,12', 'b,150.01,2,3030,90,20', 'c,150,3,3000,80,9'];

  it('are told with the first of them, and nothing is done unasked', async () => {
    expect(await rowsOf(twice)).toEqual([1, 2, 3]);
    const [remark] = await remarks(twice);
    expect(remark).toMatchObject({ level: 'warning' });
    expect(remark!.text).toMatch(/One row.*row 1 and row 2 \(36\.0 arcsec and 30\.0 km\/s apart\)/);
  });

  it("are merged on the lead's word: the better row stays, the other is put aside", async () => {
    const reading = await read(twice, { mergeDuplicates: true });
    expect(Array.from(reading.roles.columns.row)).toEqual([2, 3]);
    expect(reading.sidelined).toEqual([
      {
        row: 1,
        line: 2,
        column: null,
        value: 'row 2',
        reason: 'The same source is in another row, which is kept',
      },
    ]);
    expect(reading.check).toMatchObject({ rows: 3, usable: 2, sidelined: 1 });
    expect(await remarks(twice, { mergeDuplicates: true })).toMatchObject([{ level: 'assumed' }]);
  });

  it.each([
    ['too far apart', ['a,150,2,3000,80,12', 'b,150.017,2,3000,80,20']],
    ['of another velocity', ['a,150,2,3000,80,12', 'b,150,2,3041,80,20']],
    ['without a velocity', ['a,150,2,,80,12', 'b,150,2,,80,20']],
  ])('are not rows %s', async (_, rows) => {
    expect(await remarks(rows)).toEqual([]);
  });

  it('are found across the zero of right ascension and within stated errors only', async () => {
    const rows = ['a,359.9999,2,3000,80,12', 'b,0.0001,2,3000,80,20'];
    expect(await remarks(rows)).toHaveLength(1);
    expect(await remarks(rows, { positionErrorArcsec: 0.1 })).toEqual([]);
  });

  it('do not join two sources through a faint row between them', async () => {
    const rows = ['a,150,2,3000,80,30', 'b,150.0125,2,3000,80,5', 'c,150.025,2,3000,80,25'];
    expect(await rowsOf(rows, { mergeDuplicates: true })).toEqual([1, 3]);
  });

  it('are no matter in other catalogues', async () => {
    expect(await remarks(twice, { kind: 'optical' })).toEqual([]);
  });
});
