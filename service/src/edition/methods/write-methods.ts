import { escapeTex } from '../../tables/writers/latex.ts';
import type { EditionHead } from '../edition-head.ts';
import { allParameters } from './all-parameters.ts';
import { methodsSentences, type Sentence } from './methods-sentences.ts';
import { bibtexOf, REFERENCES, type ReferenceKey } from './references.ts';

/** The paragraph as plain text, with citations by author and year. */
export function methodsParagraph(head: EditionHead, entries: number): string {
  return methodsSentences(head, entries)
    .map(({ text, cites }) => {
      const works = cites.map((key) => `${REFERENCES[key].short} ${REFERENCES[key].year}`).join('; ');
      return `${text}${works ? ` (${works})` : ''}.`;
    })
    .join(' ');
}

/** The same in TeX with `\citep`, ready to be pasted, and below it every parameter as a comment. */
export function methodsTex(head: EditionHead, entries: number): string {
  const sentences = methodsSentences(head, entries).map(({ text, cites }) => `${texSentence(text)}${citep(cites)}.`);
  const parameters = allParameters(head.criteria.settings).map(
    ({ key, value, unit, source }) => `% ${key} = ${value}${unit ? ` ${unit}` : ''} (${source})`,
  );
  return [
    `% Methods paragraph of edition ${head.number} of ${asComment(head.survey.name)}; the works it cites are in the .bib file.`,
    ...sentences,
    '',
    '% Every parameter of the criteria:',
    ...parameters.map(asComment),
    '',
  ].join('\n');
}

/** Plain text: the paragraph, then every parameter with its value, unit and source. */
export function methodsText(head: EditionHead, entries: number): string {
  const lines = allParameters(head.criteria.settings).map(
    ({ key, title, value, unit, source }) =>
      `${key.padEnd(36)} ${value}${unit ? ` ${unit}` : ''}  [${title}; ${source}]`,
  );
  return `${methodsParagraph(head, entries)}\n\nEvery parameter of criteria ${head.criteria.number}\n\n${lines.join('\n')}\n`;
}

/** BibTeX of all works the paragraph cites. */
export function methodsBib(head: EditionHead, entries: number): string {
  return bibtexOf(citedBy(methodsSentences(head, entries)));
}

export const citedBy = (sentences: readonly Sentence[]): ReferenceKey[] => sentences.flatMap(({ cites }) => cites);
const citep = (cites: readonly ReferenceKey[]): string => (cites.length > 0 ? ` \\citep{${cites.join(',')}}` : '');
const asComment = (text: string): string => text.replace(/[\r\n]+/g, ' ');

const SYMBOLS: readonly [RegExp, string][] = [
  [/km\/s\/Mpc/g, 'km~s$^{-1}$~Mpc$^{-1}$'],
  [/km\/s/g, 'km~s$^{-1}$'],
  [/H0 =/g, '$H_0$ ='],
  [/Omega\\_m =/g, '$\\Omega_m$ ='],
  [
    /M\\_HI = 2\.356e5 D\\textasciicircum\{\}2 S \/ \(1\+z\)\\textasciicircum\{\}2/g,
    '$M_\\mathrm{HI} = 2.356\\times10^5\\,D^2 S/(1+z)^2$',
  ],
  [
    /log M\* = ([\d.-]+) \+ ([\d.-]+) \(log M\\_HI - ([\d.]+)\)/g,
    '$\\log M_* = $1 + $2\\,(\\log M_\\mathrm{HI} - $3)$',
  ],
  [/phi\* = ([\d.]+) h\\textasciicircum\{\}3 Mpc\\textasciicircum\{\}-3/g, '$\\phi_* = $1\\,h^3$~Mpc$^{-3}$'],
  [/M\* - 5 log h = (-?[\d.]+)/g, '$M_* - 5\\log h = $1$'],
  [/alpha = (-?[\d.]+)/g, '$\\alpha = $1$'],
  [/M\\_r = (-?[\d.]+)/g, '$M_r = $1$'],
  [/(\d)per cent/g, '$1 per cent'],
];

function texSentence(text: string): string {
  return SYMBOLS.reduce(
    (tex, [pattern, symbol]) => tex.replace(pattern, (...found) => fill(symbol, found)),
    escapeTex(text),
  );
}

/** `$1` to `$9` are groups; any other `$` is TeX's. */
function fill(symbol: string, found: readonly unknown[]): string {
  return symbol.replace(/\$([1-9])/g, (whole, n: string) =>
    typeof found[Number(n)] === 'string' ? (found[Number(n)] as string) : whole,
  );
}
