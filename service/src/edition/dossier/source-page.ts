import { finderChartSvg } from '@eremite/shared/drawing/finder-chart';
import { limitsChartSvg } from '@eremite/shared/drawing/limits-chart';
import { surroundingsStripSvg } from '@eremite/shared/drawing/surroundings-strip';
import { SCREENING_CAUTION } from '@eremite/shared/contracts/words';
import type { DossierInput, DossierSource } from './dossier-input.ts';
import { AMBER, INK, MUTED, type Pen } from './pen.ts';
import { placeSvg } from './place-svg.ts';
import { sourceNumbers } from './source-numbers.ts';

const LEFT = 40;
const WIDTH = 515;
const GAP = 14;
const HALF = (WIDTH - GAP) / 2;
const BOTTOM = 806;

/** One source on one page: charts above, what speaks for and against below. What does not fit says that it is cut. */
export function sourcePage(pen: Pen, source: DossierSource, { head, coverages }: DossierInput): void {
  const { detail, rank, words } = source;
  const { verdict } = detail;
  const evidence = { detail, settings: head.criteria.settings, coverages };
  const right = LEFT + HALF + GAP;
  pen.text(`${rank}`, { x: LEFT, y: 32, width: 30 }, { face: 'mono-bold', size: 15, colour: AMBER });
  pen.text(verdict.name, { x: LEFT + 32, y: 32, width: 330, height: 20 }, { face: 'mono-bold', size: 15 });
  pen.text(
    `${head.survey.name}, edition ${head.number}`,
    { x: LEFT + 370, y: 38, width: 145, height: 10 },
    { size: 8, colour: MUTED },
  );
  const { settled } = verdict;
  const word = settled ? `Settled: ${settled.starlight}, ${settled.surroundings}` : 'Not settled';
  let top =
    pen.text(`${word}. Computed: ${verdict.headline}.`, { x: LEFT, y: 52, width: WIDTH, height: 22 }, { size: 9 }) + 4;
  pen.rule(LEFT, top, WIDTH);
  top += 6;

  const finder = placeSvg(pen.document, pen.fonts, finderChartSvg(evidence, { size: 430, idPrefix: `finder${rank}` }), {
    x: LEFT,
    y: top,
    width: HALF,
    maxHeight: 330,
  });
  const numbers = numbersTable(pen, source, { x: right, y: top, width: HALF });
  let y = Math.max(top + finder, numbers) + 6;
  const strip = placeSvg(pen.document, pen.fonts, surroundingsStripSvg(evidence, { width: 470, height: 220 }), {
    x: LEFT,
    y,
    width: HALF,
    maxHeight: 125,
  });
  const limits = placeSvg(pen.document, pen.fonts, limitsChartSvg(evidence, { width: 460 }), {
    x: right,
    y,
    width: HALF,
    maxHeight: 125,
  });
  y += Math.max(strip, limits) + 6;

  const grounds = verdict.grounds.map(({ text, weight }) => ({
    text: `${weight === 'against' ? '–' : weight === 'for' ? '+' : '·'} ${text}`,
  }));
  list(pen, 'Grounds', grounds, { x: LEFT, y, width: HALF, height: BOTTOM - y });
  const doubts = detail.doubts
    .filter(({ grade }) => grade !== 'clear')
    .map(({ name, grade, sentence }) => ({ text: `${name}, ${grade}: ${sentence}` }));
  const clear = detail.doubts.filter(({ grade }) => grade === 'clear').map(({ name }) => name);
  if (clear.length > 0) doubts.push({ text: `Clear: ${clear.join(', ')}.` });
  const half = (BOTTOM - y) / 2;
  const below = list(pen, 'Doubts', doubts, { x: right, y, width: HALF, height: half });
  list(pen, 'Decisions', decisions(words), { x: right, y: below + 6, width: HALF, height: BOTTOM - below - 6 });
  pen.text(SCREENING_CAUTION, { x: LEFT, y: 812, width: WIDTH, height: 10 }, { size: 7, colour: MUTED });
}

function numbersTable(
  pen: Pen,
  source: DossierSource,
  { x, y, width }: { x: number; y: number; width: number },
): number {
  let at = pen.heading('Numbers', { x, y, width });
  for (const [name, value] of sourceNumbers(source)) {
    pen.text(name, { x, y: at, width: 88, height: 10 }, { size: 7.6, colour: MUTED });
    at = pen.text(value, { x: x + 90, y: at, width: width - 90, height: 19 }, { face: 'mono', size: 6.8 }) + 1.4;
  }
  return at;
}

function decisions({ reason, nullResult, said, overrides, doubtWords }: DossierSource['words']): { text: string }[] {
  const day = (at: string) => at.slice(0, 10);
  return [
    ...(reason ? [{ text: `On the list because: ${reason}` }] : []),
    ...(nullResult ? [{ text: `If nothing is found: ${nullResult}` }] : []),
    ...said.map(({ as, by, at, outcome, starlight, surroundings, note }) => ({
      text: `${as === 'settled' ? 'Settled' : 'Review'} by ${by}, ${day(at)}: ${outcome === 'verdict' ? `${starlight}, ${surroundings}` : outcome}${note ? `. ${note}` : ''}`,
    })),
    ...overrides.map(({ action, objectName, catalogueName, by, at, note, withdrawnAt }) => ({
      text: `${by}, ${day(at)}, ${action}s ${objectName} of ${catalogueName}${withdrawnAt ? ` (taken back ${day(withdrawnAt)})` : ''}: ${note}`,
    })),
    ...doubtWords.map(({ by, at, doubt, word, note }) => ({ text: `${by}, ${day(at)}, ${doubt} ${word}: ${note}` })),
  ];
}

/** Sentences under a heading, as many as fit. @returns where they end */
function list(
  pen: Pen,
  title: string,
  items: readonly { text: string }[],
  { x, y, width, height }: { x: number; y: number; width: number; height: number },
): number {
  const style = { size: 7.4, colour: INK };
  let at = pen.heading(title, { x, y, width });
  if (items.length === 0) return pen.text('None.', { x, y: at, width }, { ...style, colour: MUTED });
  const end = y + height - 10;
  for (const [i, { text }] of items.entries()) {
    const left = items.length - i;
    const need = pen.height(text, width, style);
    if (at + need > end && (left > 1 || end - at < 9)) {
      return pen.text(
        `… and ${left} more in the archive of the edition`,
        { x, y: at, width, height: 9 },
        { ...style, colour: MUTED },
      );
    }
    at = pen.text(text, { x, y: at, width, height: Math.max(9, end + 8 - at) }, style) + 1.5;
  }
  return at;
}
