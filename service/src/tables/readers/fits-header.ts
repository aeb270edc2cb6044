import type { ByteWindow } from '../bytes/byte-window.ts';
import { type ReaderLimits, TableError } from '../table.ts';

export const FITS_BLOCK = 2880;
const CARD = 80;

export type FitsValue = string | number | boolean;

/** The cards of one FITS header that carry a value; the first of a repeated keyword counts. */
export class FitsHeader {
  readonly values = new Map<string, FitsValue>();
  readonly comments = new Map<string, string>();

  text(keyword: string): string | undefined {
    const value = this.values.get(keyword);
    return value === undefined ? undefined : String(value).trim();
  }

  number(keyword: string): number | undefined {
    const value = this.values.get(keyword);
    return typeof value === 'number' ? value : undefined;
  }

  /** A size or count. @throws TableError when it is absent without a fallback, negative or no whole number. */
  count(keyword: string, hdu: number, fallback?: number): number {
    const value = this.values.get(keyword) ?? fallback;
    if (typeof value === 'number' && Number.isSafeInteger(value) && value >= 0) return value;
    const what = value === undefined ? 'is missing' : `is "${value}", which is no count`;
    throw new TableError('bad-header', `${keyword} of HDU ${hdu} ${what}.`, 'The header is damaged: export it again.');
  }
}

/**
 * Reads the header at the window's start and moves past its last block (FITS 4.0, section 4).
 * @throws TableError `truncated` when END never comes, `bad-header` at bytes that are not ASCII text.
 */
export async function readFitsHeader(window: ByteWindow, hdu: number, limits: ReaderLimits): Promise<FitsHeader> {
  const header = new FitsHeader();
  const begin = window.position;
  let long: string | undefined;
  for (let card = 0; ; card++) {
    if (!(await window.need(CARD))) {
      const byte = window.at(window.end);
      const message = `The header of HDU ${hdu} breaks off before END (byte ${byte}).`;
      throw new TableError('truncated', message, 'Fetch the file again.', { byte });
    }
    const text = window.buffer.toString('latin1', window.start, window.start + CARD);
    if (/[^\x20-\x7e]/.test(text)) {
      const byte = window.position;
      const message = `Card ${card + 1} of HDU ${hdu} (byte ${byte}) is not ASCII text, so this is no FITS header.`;
      throw new TableError('bad-header', message, 'Fetch the file again, in binary mode.', { byte });
    }
    window.start += CARD;
    const keyword = text.slice(0, 8).trimEnd();
    if (keyword === 'END') break;
    if (window.position - begin > limits.maxHeadBytes) {
      const message = `The header of HDU ${hdu} is longer than the limit of ${limits.maxHeadBytes} bytes.`;
      throw new TableError('too-large', message, 'Remove its HISTORY and COMMENT cards.', { byte: window.position });
    }
    long = keepCard(header, keyword, text, long);
  }
  const over = (window.position - begin) % FITS_BLOCK;
  if (over > 0) await window.skip(FITS_BLOCK - over);
  return header;
}

/** Takes one card; answers the keyword whose string goes on in a CONTINUE card. */
function keepCard(header: FitsHeader, keyword: string, text: string, long: string | undefined): string | undefined {
  const continues = keyword === 'CONTINUE' && long !== undefined;
  if (!continues && text.slice(8, 10) !== '= ') return undefined;
  const { value, comment } = parseValue(text.slice(continues ? 8 : 10));
  if (value === undefined) return undefined;
  const target = continues ? long : keyword;
  if (continues) header.values.set(target, String(header.values.get(target)).slice(0, -1) + String(value));
  else if (header.values.has(target)) return undefined;
  else header.values.set(target, value);
  if (comment !== '' && !continues) header.comments.set(target, comment);
  return typeof value === 'string' && value.endsWith('&') ? target : undefined;
}

function parseValue(text: string): { value: FitsValue | undefined; comment: string } {
  const quoted = /^\s*'((?:[^']|'')*)'\s*(?:\/\s*(.*))?/.exec(text);
  if (quoted) return { value: quoted[1]!.replaceAll("''", "'").trimEnd(), comment: (quoted[2] ?? '').trim() };
  const slash = text.indexOf('/');
  const word = (slash < 0 ? text : text.slice(0, slash)).trim();
  const comment = slash < 0 ? '' : text.slice(slash + 1).trim();
  if (word === '') return { value: undefined, comment };
  if (word === 'T' || word === 'F') return { value: word === 'T', comment };
  const number = Number(word.replace(/[dD]/, 'e'));
  // Whole numbers that a double cannot hold stay text, so that a 64-bit TNULL keeps its digits.
  const exact = Number.isFinite(number) && (!/^[+-]?\d+$/.test(word) || Number.isSafeInteger(number));
  return { value: exact ? number : word, comment };
}
