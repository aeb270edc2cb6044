/** Whether the line at `start` is a comment: a # first, or after blanks. */
export function isComment(bytes: Uint8Array, start: number, end: number): boolean {
  let i = start;
  while (i < end && (bytes[i] === 32 || bytes[i] === 9)) i++;
  return bytes[i] === 35 && i < end;
}
