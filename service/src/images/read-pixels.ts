import type { FitsHdu } from '../tables/readers/fits-hdus.ts';
import type { Content } from '../tables/bytes/content.ts';
import { ByteWindow } from '../tables/bytes/byte-window.ts';
import { type ReaderLimits, TableError } from '../tables/table.ts';

type Read = (view: DataView, at: number) => number;
const READERS: Readonly<Record<number, { bytes: number; read: Read }>> = {
  8: { bytes: 1, read: (view, at) => view.getUint8(at) },
  16: { bytes: 2, read: (view, at) => view.getInt16(at) },
  32: { bytes: 4, read: (view, at) => view.getInt32(at) },
  64: { bytes: 8, read: (view, at) => Number(view.getBigInt64(at)) },
  [-32]: { bytes: 4, read: (view, at) => view.getFloat32(at) },
  [-64]: { bytes: 8, read: (view, at) => view.getFloat64(at) },
};

/**
 * Values of an image in physical units, in the order of the file: stored × BSCALE + BZERO, NaN for BLANK.
 *
 * @param count how many, as many as the axes make; the caller has held it against its limit
 * @throws TableError `bad-header` for an impossible BITPIX or scaling, `truncated` when the data end early
 *
 * Source: FITS standard 4.0, sections 4.4.2 and 5.
 */
export async function readPixels(
  content: Content,
  hdu: FitsHdu,
  count: number,
  limits: ReaderLimits,
): Promise<Float32Array | Float64Array> {
  const { header, number, dataStart } = hdu;
  const bitpix = header.number('BITPIX') ?? NaN;
  const reader = READERS[bitpix];
  if (!reader) {
    const message = `BITPIX of HDU ${number} is ${header.text('BITPIX') ?? 'missing'}, not one of 8, 16, 32, 64, -32, -64.`;
    throw new TableError('bad-header', message, 'The header is damaged: export the image again.', { byte: 0 });
  }
  const scale = scaling(hdu, 'BSCALE', 1);
  const zero = scaling(hdu, 'BZERO', 0);
  const blank = bitpix > 0 ? (header.number('BLANK') ?? NaN) : NaN;
  if (content.size !== null && content.size < dataStart + count * reader.bytes) throw cutShort(content.size);
  const isExactInSingle = bitpix === 8 || bitpix === 16 || bitpix === -32;
  const values =
    isExactInSingle && scale === 1 && Number.isInteger(zero) && Math.abs(zero) <= 2 ** 23
      ? new Float32Array(count)
      : new Float64Array(count);
  const window = new ByteWindow(content, dataStart, limits);
  try {
    for (let done = 0; done < count;) {
      if (!(await window.need(reader.bytes))) throw cutShort(window.at(window.end));
      const here = Math.min(count - done, Math.floor((window.end - window.start) / reader.bytes));
      const view = new DataView(window.buffer.buffer, window.buffer.byteOffset + window.start, here * reader.bytes);
      for (let i = 0; i < here; i++) {
        const stored = reader.read(view, i * reader.bytes);
        const value = stored === blank ? NaN : stored * scale + zero;
        values[done + i] = Number.isFinite(value) ? value : NaN;
      }
      window.start += here * reader.bytes;
      done += here;
    }
  } finally {
    await window.close();
  }
  return values;
}

function scaling({ header, number }: FitsHdu, keyword: string, fallback: number): number {
  const value = header.values.get(keyword) ?? fallback;
  // 2^63, the zero of unsigned 64-bit integers, is kept as text by the header reader.
  const plain = typeof value === 'boolean' ? NaN : Number(value);
  if (Number.isFinite(plain) && !(keyword === 'BSCALE' && plain === 0)) return plain;
  const message = `${keyword} of HDU ${number} is "${value}", which scales nothing.`;
  throw new TableError('bad-header', message, 'The header is damaged: export the image again.', { byte: 0 });
}

const cutShort = (byte: number) =>
  new TableError('truncated', `The image breaks off at byte ${byte}, before its last pixel.`, 'Fetch the file again.', {
    byte,
  });
