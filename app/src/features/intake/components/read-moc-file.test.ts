import { File as NodeFile } from 'node:buffer';
import { expect, it } from 'vitest';
import { readMocFile } from './read-moc-file.ts';

// The file of the test's document cannot be read; Node's is the same and can.
const aFile = (parts: (string | Uint8Array)[], name: string) => new NodeFile(parts, name) as unknown as File;

it('hands a MOC in text on as it is, and a FITS file in base64', async () => {
  expect(await readMocFile(aFile(['6/1 2\n'], 'a.txt'))).toEqual({ value: '6/1 2' });
  const fits = await readMocFile(aFile(['SIMPLE  =                    T', new Uint8Array([0, 255])], 'a.fits'));
  expect(fits).toEqual({
    value: { fits: Buffer.from('SIMPLE  =                    T\0\xff', 'latin1').toString('base64') },
  });
});

it('refuses a file that is too large to send, with the mend', async () => {
  const large = aFile([new Uint8Array(4 * 1024 ** 2)], 'large.fits');
  expect(await readMocFile(large)).toEqual({ fault: expect.stringMatching(/4 MB.*degrade/) });
});
