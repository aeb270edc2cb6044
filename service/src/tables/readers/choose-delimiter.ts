import Papa from 'papaparse';
import type { Delimiter } from './record-scanner.ts';

const CANDIDATES: Delimiter[] = ['\t', ';', ',', '|', 'blank'];
const SAMPLE_ROWS = 200;
/** Share of sampled rows that must have the same number of cells. */
const ENOUGH = 0.6;

/** Cells of the first records of some text; comment lines and empty lines are left out. */
export function sampleRecords(text: string, delimiter: Delimiter): string[][] {
  if (delimiter === 'blank') {
    const lines = text.split(/\r\n|\n|\r/).filter((line) => line.trim() !== '' && !/^\s*#/.test(line));
    return lines.slice(0, SAMPLE_ROWS).map((line) => line.match(/"[^"]*"(?=\s|$)|\S+/g) ?? []);
  }
  const options = { delimiter, comments: '#', skipEmptyLines: true as const, preview: SAMPLE_ROWS };
  return Papa.parse<string[]>(text, options).data;
}

/** The delimiter under which most rows have the same number of cells; undefined when none makes a table of the text. */
export function chooseDelimiter(text: string): Delimiter | undefined {
  const body = text.replace(/^[ \t]+#.*$/gm, '');
  let best: { delimiter: Delimiter; share: number } | undefined;
  for (const delimiter of CANDIDATES) {
    const records = sampleRecords(body, delimiter);
    const { cells, share } = commonWidth(records);
    if (cells > 1 && share >= ENOUGH && share > (best?.share ?? 0) + 0.15) best = { delimiter, share };
  }
  if (best !== undefined) return best.delimiter;
  const lines = sampleRecords(text, 'blank');
  const single = lines.filter((cells) => cells.length === 1).length;
  return lines.length > 0 && single >= lines.length * 0.9 ? ',' : undefined;
}

/** The most frequent number of cells a row, and the share of rows that have it. */
export function commonWidth(records: { length: number }[]): { cells: number; share: number } {
  const counts = new Map<number, number>();
  for (const { length } of records) counts.set(length, (counts.get(length) ?? 0) + 1);
  let cells = 0;
  let most = 0;
  for (const [length, count] of counts)
    if (count > most || (count === most && length > cells)) [cells, most] = [length, count];
  return { cells, share: records.length === 0 ? 0 : most / records.length };
}
