import { AppError } from './app-error.ts';

/** Deeper than any request of this interface; what walks a body calls itself for each level. */
const DEEPEST = 64;
const [QUOTE, BACKSLASH, LETTER_U] = [0x22, 0x5c, 0x75];

/**
 * Refuses JSON that would parse but harm what comes after: nesting without end, and the character NUL, which the
 * database cannot store. Looks at the bytes, so that nothing is built before it is known to be harmless.
 *
 * @param bytes UTF-8; whether it is JSON at all is for the parser to say
 * @throws {AppError} VALIDATION_FAILED
 */
export function guardJson(bytes: Uint8Array): void {
  let depth = 0;
  let inString = false;
  for (let i = 0; i < bytes.length; i += 1) {
    const byte = bytes[i]!;
    if (inString) {
      if (byte === QUOTE) inString = false;
      else if (byte === BACKSLASH) {
        i += 1;
        if (bytes[i] === LETTER_U && isZeros(bytes, i + 1)) {
          throw new AppError('VALIDATION_FAILED', 'The character NUL (\\u0000) cannot be stored; leave it out.');
        }
      }
    } else if (byte === QUOTE) inString = true;
    else if (byte === 0x7b || byte === 0x5b) {
      depth += 1;
      if (depth > DEEPEST) throw new AppError('VALIDATION_FAILED', `The JSON is nested more than ${DEEPEST} deep.`);
    } else if (byte === 0x7d || byte === 0x5d) depth -= 1;
  }
}

function isZeros(bytes: Uint8Array, from: number): boolean {
  for (let i = from; i < from + 4; i += 1) if (bytes[i] !== 0x30) return false;
  return true;
}
