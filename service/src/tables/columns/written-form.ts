/**
 * How a number was written, as one byte beside its value, so that the cell can be shown digit for digit as it stands in
 * the file. 0: the shortest digits that give the value, or nothing.
 */
export type WrittenForm = number;

export const SHORTEST: WrittenForm = 0;
/** A spelling that no other form gives back: the text itself must be kept. */
export const SPELLED: WrittenForm = 255;
/** Forms with decimals are the first of their kind plus the count of these. */
const FIXED = 1;
const PLUS = 41;
const COMMA = 81;
const EXPONENT_UPPER = 121;
const EXPONENT_LOWER = 141;
const WORD = 161;
const MOST_FIXED = 39;
const MOST_EXPONENT = 19;

/** Spellings of "no value" often met. */
const WORDS = [
  'NaN', 'nan', 'NAN', 'null', 'NULL', 'Null', '-', '--', '---', '----', '...', '..', '…', 'n/a', 'N/A', '#N/A', 'na', 'NA',
  'None', 'none', 'nil', 'INDEF', 'undef', '?', '""', 'masked', '-nan', 'missing', '\\N', '(null)', '<NA>',
]; // prettier-ignore
const FORM_OF_WORD = new Map(WORDS.map((word, i) => [word, WORD + i]));

/** Form of a plain decimal fraction: 21.50, +21.50 or 21,50. */
export function fixedForm(decimals: number, plus: boolean, comma: boolean): WrittenForm {
  if (decimals > MOST_FIXED || (plus && comma)) return SPELLED;
  return (plus ? PLUS : comma ? COMMA : FIXED) + decimals;
}

/** Form of one digit, decimals and an exponent of a sign and two digits or three: 2.150E+01. */
export function exponentForm(decimals: number, upper: boolean): WrittenForm {
  return decimals > MOST_EXPONENT ? SPELLED : (upper ? EXPONENT_UPPER : EXPONENT_LOWER) + decimals;
}

/** Form of a word for "no value"; {@link SPELLED} for one seldom met. */
export function wordForm(word: string): WrittenForm {
  return FORM_OF_WORD.get(word) ?? SPELLED;
}

/** The text of a cell; '' for a value that is missing without a word. */
export function writtenText(value: number, form: WrittenForm): string {
  if (form >= WORD) return WORDS[form - WORD] ?? '';
  if (Number.isNaN(value)) return '';
  const sign = Object.is(value, -0) ? '-' : '';
  if (form === SHORTEST) return sign + String(value);
  if (form < PLUS) return sign + value.toFixed(form - FIXED);
  if (form < COMMA) return `+${value.toFixed(form - PLUS)}`;
  if (form < EXPONENT_UPPER) return sign + value.toFixed(form - COMMA).replace('.', ',');
  const upper = form < EXPONENT_LOWER;
  const text = value.toExponential(form - (upper ? EXPONENT_UPPER : EXPONENT_LOWER));
  const [digits, exponent] = text.split('e') as [string, string];
  return `${sign}${digits}${upper ? 'E' : 'e'}${exponent[0]}${exponent.slice(1).padStart(2, '0')}`;
}
