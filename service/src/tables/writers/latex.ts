import { formatCell, type OutputCell, type OutputColumn, type OutputRow, type OutputRows } from './output-column.ts';
import { utf8Pieces } from './utf8-pieces.ts';

export interface LatexTable {
  caption: string;
  /** For `\ref`. */
  label: string;
  /** Sentences under the table; TeX as it stands, so that they may cite. */
  comments: string;
  /** Column heads in TeX by name, in the order of the layout; columns without one are left out. */
  heads: Readonly<Record<string, string>>;
}

const UNITS: Record<string, string> = {
  'km/s': 'km~s$^{-1}$',
  'Jy.km/s': 'Jy~km~s$^{-1}$',
  solMass: '$M_\\odot$',
  solLum: '$L_\\odot$',
  'log(solMass)': '$\\log M_\\odot$',
  'solMass/solLum': '$M_\\odot/L_\\odot$',
  'solMass/yr': '$M_\\odot$~yr$^{-1}$',
};

/**
 * Writes a table for a journal article: a `deluxetable*` as AASTeX has it. An error stands behind its value, a limit flag
 * before it; a missing value is `\nodata`.
 */
export function writeLatex(columns: OutputColumn[], rows: OutputRows, table: LatexTable): AsyncIterable<Uint8Array> {
  return utf8Pieces(latexTexts(columns, rows, table));
}

async function* latexTexts(columns: OutputColumn[], rows: OutputRows, table: LatexTable): AsyncIterable<string> {
  const shown = Object.keys(table.heads).flatMap((name) => {
    const at = columns.findIndex((column) => column.name === name);
    return at < 0 ? [] : [{ at, ...partners(columns, name) }];
  });
  const aligned = shown.map(({ at }) => (columns[at]!.datatype === 'text' ? 'l' : 'r')).join('');
  const heads = shown.map(({ at }) => `\\colhead{${table.heads[columns[at]!.name]!}}`);
  const units = shown.map(({ at }) => `\\colhead{${unitHead(columns[at]!.unit)}}`);
  yield `\\begin{deluxetable*}{${aligned}}\n\\tabletypesize{\\scriptsize}\n\\tablecaption{${escapeTex(table.caption)}\\label{${table.label}}}\n`;
  yield `\\tablehead{\n${heads.join(' & ')} \\\\\n${units.join(' & ')}\n}\n\\startdata\n`;
  let first = true;
  for await (const row of rows) {
    yield `${first ? '' : ' \\\\\n'}${shown.map((place) => texCell(columns, row, place)).join(' & ')}`;
    first = false;
  }
  yield `\n\\enddata\n\\tablecomments{${table.comments}}\n\\end{deluxetable*}\n`;
}

interface Place {
  at: number;
  errorAt: number;
  flagAt: number;
}

const partners = (columns: OutputColumn[], name: string): Omit<Place, 'at'> => ({
  errorAt: columns.findIndex(({ errorOf }) => errorOf === name),
  flagAt: columns.findIndex(({ limitFlagOf }) => limitFlagOf === name),
});

function texCell(columns: OutputColumn[], row: OutputRow, { at, errorAt, flagAt }: Place): string {
  const value = formatCell(row[at] ?? null, columns[at]!);
  if (value === '') return '\\nodata';
  if (columns[at]!.datatype === 'text' || columns[at]!.datatype === 'boolean') return escapeTex(value);
  const error = errorAt < 0 ? '' : formatCell(row[errorAt] ?? null, columns[errorAt]!);
  if (error !== '' && columns[at]!.decimals === undefined) {
    const decimals = errorDecimals(Number(error));
    return `$${Number(value).toFixed(decimals)}\\pm${Number(error).toFixed(decimals)}$`;
  }
  const flag = flagAt < 0 ? '' : textOf(row[flagAt] ?? null);
  return `$${flag}${power(value)}${error === '' ? '' : `\\pm${power(error)}`}$`;
}

/** Decimals that show two digits of an error, so that 65.0 stands beside 2.9. */
const errorDecimals = (error: number): number => Math.max(0, 1 - Math.floor(Math.log10(error)));
const textOf = (cell: OutputCell): string => (cell === null ? '' : String(cell));
/** Large and small numbers by powers of ten. */
function power(number: string): string {
  const written = Math.abs(Number(number)) >= 1e5 ? Number(number).toExponential() : number;
  return written.replace(/e\+?(-?\d+)$/, '\\times10^{$1}');
}
const unitHead = (unit: string | undefined): string => (unit ? `(${UNITS[unit] ?? escapeTex(unit)})` : '');

const SPECIAL: Record<string, string> = {
  '\\': '\\textbackslash{}',
  '{': '\\{',
  '}': '\\}',
  $: '\\$',
  '&': '\\&',
  '#': '\\#',
  '%': '\\%',
  _: '\\_',
  '^': '\\textasciicircum{}',
  '~': '\\textasciitilde{}',
  '<': '$<$',
  '>': '$>$',
  '±': '$\\pm$',
  '×': '$\\times$',
  σ: '$\\sigma$',
  '\u2212': '$-$',
  '\u2013': '--',
  '\u2014': '---',
  '\u2019': "'",
  '\u201c': '``',
  '\u201d': "''",
  '\u00a0': '~',
};

/** Text that TeX prints as it stands. Letters beyond extended Latin, which the fonts lack, become "?". */
export function escapeTex(text: string): string {
  return text
    .replace(/[\r\n\t]+/g, ' ')
    .replace(
      /[^\x20-\x7e]|[\\{}$&#%_^~<>]/gu,
      (letter) => SPECIAL[letter] ?? (/[\u00a1-\u017f]/.test(letter) ? letter : '?'),
    );
}
