import type { ATTACHMENT_TYPES } from '@eremite/shared/contracts/attachment';

type MediaType = (typeof ATTACHMENT_TYPES)[number];
const MAGIC: readonly [MediaType, readonly number[]][] = [
  ['image/png', [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]],
  ['image/jpeg', [0xff, 0xd8, 0xff]],
  ['application/pdf', [...'%PDF-'].map((c) => c.charCodeAt(0))],
  ['application/fits', [...'SIMPLE  ='].map((c) => c.charCodeAt(0))],
];

/** Whether bytes are UTF-8 text without control characters; a last character may be cut. */
function isText(bytes: Uint8Array): boolean {
  if (bytes.some((byte) => byte < 32 && byte !== 9 && byte !== 10 && byte !== 13)) return false;
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(bytes, { stream: true });
    return true;
  } catch {
    return false;
  }
}

/**
 * What a file is, by its first bytes: names lie. Undefined where it is none of the kinds that may go with a note.
 *
 * @param bytes the whole file, or its beginning
 */
export function attachmentType(bytes: Uint8Array, fileName: string): MediaType | undefined {
  const found = MAGIC.find(([, magic]) => magic.every((byte, i) => bytes[i] === byte));
  if (found) return found[0];
  if (bytes.length === 0 || !isText(bytes)) return undefined;
  return /\.csv$/i.test(fileName) ? 'text/csv' : 'text/plain';
}
