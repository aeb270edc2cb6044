import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { faultOf, openMemory, readAll } from '../testing/read-all.ts';

const table = `a,b\n${Array.from({ length: 200_000 }, (_, i) => `${i},${Math.sin(i)}`).join('\n')}\n`;

describe('gunzip', () => {
  it('stops a bomb long before it is unpacked', async () => {
    const bomb = gzipSync(Buffer.concat([Buffer.from('a,b\n'), Buffer.alloc(40 * 1024 ** 2, '1,2\n')]));
    expect((await faultOf(bomb)).code).toBe('expansion');
  }, 30_000);

  it('holds unpacked bytes to the limit on file size', async () => {
    expect((await faultOf(gzipSync(table), { maxBytes: 3_000_000 })).code).toBe('too-large');
  });

  it('delivers the rows before the end of a packed file that is cut off', async () => {
    const packed = gzipSync(table);
    const { rows, fault } = await readAll(await openMemory(packed.subarray(0, packed.length / 2)));
    expect(rows.length).toBeGreaterThan(50_000);
    expect(fault).toMatchObject({ code: 'truncated', rowsRead: rows.length });
  });

  it('says that damaged data are damaged', async () => {
    const packed = Buffer.from(gzipSync(table));
    packed.fill(0xff, 500_000, 500_050);
    expect((await faultOf(packed)).code).toBe('bad-data');
  });
});
