const SPELLED: Record<string, string> = {
  '\u2212': '-',
  '\u2013': '-',
  '\u2014': '-',
  '\u00a0': ' ',
  '\u2019': "'",
  '\u00b5': 'u',
  '\u03bc': 'u',
  Æ: 'AE',
  æ: 'ae',
  Œ: 'OE',
  œ: 'oe',
  Ø: 'O',
  ø: 'o',
  Ł: 'L',
  ł: 'l',
  Đ: 'D',
  đ: 'd',
  ð: 'd',
  Þ: 'Th',
  þ: 'th',
  ß: 'ss',
  ı: 'i',
  '±': '+/-',
  '×': 'x',
  '°': 'deg',
  '→': '->',
  α: 'alpha',
  σ: 'sigma',
  Δ: 'Delta',
};

/** Printable ASCII for formats that allow nothing else: accents are dropped, letters spelled, the rest becomes "?". */
export function asciiText(text: string): string {
  // Nearly every cell is plain already, and a table has millions of them.
  if (/^[\x20-\x7e]*$/.test(text)) return text;
  return text
    .normalize('NFD')
    .replace(/[\u0300-\u036f]/g, '')
    .replace(/[^\x20-\x7e]/gu, (letter) => SPELLED[letter] ?? '?');
}
