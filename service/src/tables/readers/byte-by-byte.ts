import type { ColumnFacts } from '../table.ts';
import { uniqueNames } from './column-names.ts';

/** One "Byte-by-byte Description" (Standards for Astronomical Catalogues, CDS, section 3). */
export interface ByteByByte {
  /** File names or patterns (`*`, `?`) it describes. */
  files: string[];
  columns: ColumnFacts[];
  starts: number[];
  ends: number[];
  notes: string[];
  /** Index of the rule that closes it; -1 when the text breaks off before. */
  endLine: number;
}

const TITLE = /^\s*Byte-by-byte Description of file[s]?\s*[:(]?\s*(.*)$/i;
const COLUMN = /^\s{0,12}(\d+)\s*(?:-\s*(\d+))?\s+([AIFED])\d*(?:\.\d+)?\s+(\S+)\s+(\S+)(?:\s+(.*))?$/i;
/** Range, then "?" with an optional null value, then what is said. */
const NULL_MARK = /^\s*(?:[[\]]\S*[[\]])?\s*\?(?:=(\S*))?[-+]?=?\s*(.*)$/;

interface Entry {
  start: number;
  end: number;
  format: string;
  unit: string;
  label: string;
  explanation: string;
}

/** Whether a line is a rule of the description: at least twenty dashes or equals signs and nothing else. */
export function isRule(line: string): boolean {
  return /^\s*(-{20,}|={20,})\s*$/.test(line);
}

/** Whether some text holds a byte-by-byte description. */
export function hasByteByByte(text: string): boolean {
  return /^\s*Byte-by-byte Description of file/im.test(text) && /^\s*Bytes\s+Format\s+Units\s+Label/im.test(text);
}

/** All descriptions of a ReadMe or of the head of a machine-readable table, given as lines. */
export function readByteByByte(lines: string[]): ByteByByte[] {
  const found: ByteByByte[] = [];
  for (let at = 0; at < lines.length; at++) {
    const files: string[] = [];
    for (let title = TITLE.exec(lines[at]!); title !== null; title = TITLE.exec(lines[++at] ?? '')) {
      files.push(...title[1]!.split(/[,\s]+/).filter((name) => name !== ''));
    }
    if (files.length === 0) continue;
    while (at < lines.length && !/^\s*Bytes\s+Format/i.test(lines[at]!)) at++;
    at += 2;
    const entries: Entry[] = [];
    for (; at < lines.length && !isRule(lines[at]!); at++) addLine(entries, lines[at]!);
    found.push(describe(files, entries, at < lines.length ? at : -1));
  }
  return found;
}

function addLine(entries: Entry[], line: string): void {
  const parts = COLUMN.exec(line);
  const last = entries.at(-1);
  if (parts === null) {
    if (last !== undefined && line.trim() !== '') last.explanation += ` ${line.trim()}`;
    return;
  }
  const [, first, until, format, unit, label, explanation] = parts;
  entries.push({
    start: Number(first) - 1,
    end: Number(until ?? first),
    format: format!.toUpperCase(),
    unit: unit!,
    label: label!,
    explanation: explanation ?? '',
  });
}

function describe(files: string[], entries: Entry[], endLine: number): ByteByByte {
  // Columns labelled "---" hold separators such as "=" or ":", not data.
  const kept = entries.filter((entry) => !/^-+$/.test(entry.label) && entry.end > entry.start);
  const notes: string[] = [];
  const names = uniqueNames(
    kept.map((entry) => entry.label),
    notes,
  );
  return {
    files,
    columns: kept.map((entry, i) => columnFacts(entry, names[i]!)),
    starts: kept.map((entry) => entry.start),
    ends: kept.map((entry) => entry.end),
    notes,
    endLine,
  };
}

function columnFacts({ format, unit, explanation }: Entry, name: string): ColumnFacts {
  const isWhole = format === 'I';
  const type = format === 'A' ? 'text' : isWhole ? 'integer' : 'number';
  const facts: ColumnFacts = { name, type };
  if (!/^-+$/.test(unit)) facts.unit = unit;
  const mark = NULL_MARK.exec(explanation);
  const description = (mark === null ? explanation : mark[2]!).trim();
  if (description !== '') facts.description = description;
  const nullMark = mark?.[1]?.replace(/^"(.*)"$/, '$1');
  if (nullMark) facts.nullMark = nullMark;
  return facts;
}
