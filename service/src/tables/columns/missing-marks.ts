/**
 * Words that stand for "no value" in a column of numbers. Numeric marks (-99, 99.99, -9999) are left as numbers: only
 * the role of a column tells whether 99 is a missing magnitude or a width of 99 km/s.
 */
const MISSING_WORDS = new Set(
  [
    '',
    'nan',
    '-nan',
    '+nan',
    'null',
    '(null)',
    '\\n',
    '-',
    '--',
    '---',
    '----',
    '...',
    '..',
    '…',
    'n/a',
    '#n/a',
    'na',
  ].concat(['<na>', 'none', 'nil', 'indef', 'undef', 'missing', '?', '""', 'masked']),
);

/** Whether a cell of a number column says in words that there is no value. */
export function isMissingWord(cell: string): boolean {
  return cell.length <= 8 && MISSING_WORDS.has(cell.trim().toLowerCase());
}
