import { ByteWindow } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import { type ReaderLimits, TableError } from '../table.ts';
import { FITS_BLOCK, type FitsHeader, readFitsHeader } from './fits-header.ts';

/** One header-and-data unit of a FITS file; `number` counts from 0 for the primary one. */
export interface FitsHdu {
  number: number;
  header: FitsHeader;
  dataStart: number;
  dataBytes: number;
}

const MAX_HDUS = 10_000;

/** Lists the units of a FITS file; their data are passed over. `notes` says where the list had to end early. */
export async function listHdus(content: Content, limits: ReaderLimits): Promise<{ hdus: FitsHdu[]; notes: string[] }> {
  const hdus: FitsHdu[] = [];
  const notes: string[] = [];
  let window = new ByteWindow(content, 0, limits);
  try {
    while (hdus.length < MAX_HDUS && (await window.need(1))) {
      if (hdus.length > 0 && !(await beginsExtension(window))) {
        if (hdus.length === 1) throw misplaced(1, window.position);
        notes.push(
          `HDU ${hdus.length} does not begin at byte ${window.position} as it should; what follows is left out.`,
        );
        break;
      }
      const hdu = await readHdu(window, hdus, notes, limits);
      if (hdu === undefined) break;
      hdus.push(hdu);
      const next = hdu.dataStart + Math.ceil(hdu.dataBytes / FITS_BLOCK) * FITS_BLOCK;
      if (content.size === null) {
        if (!(await skipQuietly(window, next - window.position))) break;
      } else {
        await window.close();
        if (next >= content.size) break;
        window = new ByteWindow(content, next, limits);
      }
    }
  } finally {
    await window.close();
  }
  return { hdus, notes };
}

async function readHdu(window: ByteWindow, before: FitsHdu[], notes: string[], limits: ReaderLimits) {
  const number = before.length;
  try {
    const header = await readFitsHeader(window, number, limits);
    return { number, header, dataStart: window.position, dataBytes: dataSize(header, number) };
  } catch (error) {
    const hasTable = before.some(({ header }) => /TABLE/.test(header.text('XTENSION') ?? ''));
    if (!(error instanceof TableError) || !hasTable) throw error;
    notes.push(`${error.message} That part of the file is left out.`);
    return undefined;
  }
}

/** A break in the data is told when the rows are read. */
async function skipQuietly(window: ByteWindow, count: number): Promise<boolean> {
  try {
    return await window.skip(count);
  } catch {
    return false;
  }
}

async function beginsExtension(window: ByteWindow): Promise<boolean> {
  await window.need(9);
  return window.buffer.toString('latin1', window.start, window.start + 9) === 'XTENSION=';
}

function misplaced(number: number, byte: number): TableError {
  const message = `HDU ${number} does not begin at byte ${byte}; FITS units begin at multiples of 2880 bytes.`;
  return new TableError('bad-header', message, 'The file was cut or padded: fetch it again, in binary mode.', { byte });
}

/** Bytes of data after a header, without padding (FITS 4.0, section 4.4.1). */
function dataSize(header: FitsHeader, number: number): number {
  const axes = header.count('NAXIS', number, 0);
  if (axes === 0) return 0;
  if (axes > 999) throw new TableError('bad-header', `NAXIS of HDU ${number} is ${axes}.`, 'Export the file again.');
  const groups = header.values.get('GROUPS') === true && header.count('NAXIS1', number) === 0;
  let elements = 1;
  for (let axis = groups ? 2 : 1; axis <= axes; axis++) elements *= header.count(`NAXIS${axis}`, number);
  const bits = Math.abs(header.number('BITPIX') ?? NaN);
  const bytes = (bits / 8) * header.count('GCOUNT', number, 1) * (header.count('PCOUNT', number, 0) + elements);
  if (Number.isSafeInteger(bytes)) return bytes;
  const message = `The sizes in the header of HDU ${number} are impossible (BITPIX, NAXISn, PCOUNT or GCOUNT).`;
  throw new TableError('bad-header', message, 'The header is damaged: export the file again.');
}
