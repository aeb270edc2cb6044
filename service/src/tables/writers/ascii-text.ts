const SPELLED: Record<string, string> = {
  '\u2212': '-',
  '\u2013': '-',
  '\u2014': '-',
  '\u00a0': ' ',
  '\u2019': "'",
  '\u00b5': 'u',
  '\u03bc': 'u',
};

/** Printable ASCII for formats that allow nothing else: accents are dropped, what has no ASCII form becomes "?". */
export function asciiText(text: string): string {
  return text
    .normalize('NFD')
    .replace(/[\u0300-\u036f]/g, '')
    .replace(/[^\x20-\x7e]/gu, (letter) => SPELLED[letter] ?? '?');
}
