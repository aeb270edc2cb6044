import type { SettingsQuestion } from '@eremite/shared/contracts/intake';

interface Seen {
  count: number;
  row: number;
  line: number | null;
  value: string;
}

/**
 * Counts what happened to cells that could not be used as they stand, with the first of each kind, so that a table of
 * a million bad cells is one sentence.
 */
export class CellTally {
  private readonly bad = new Map<string, Seen>();
  private readonly missing = new Map<string, Seen>();

  /** A cell that is no value of its role; it counts as missing. */
  refuse(column: string, why: string, row: number, line: number | null, value: string): void {
    note(this.bad, `${column}\n${why}`, row, line, value);
  }

  /** A number recognised as a mark for "missing" because the role cannot have it. */
  mark(column: string, row: number, line: number | null, value: string): void {
    note(this.missing, column, row, line, value);
  }

  /** One sentence a kind, in order of appearance. */
  questions(): SettingsQuestion[] {
    const sentences: SettingsQuestion[] = [];
    for (const [key, { count, row, line, value }] of this.bad) {
      const [column, why] = key.split('\n') as [string, string];
      const cells = count === 1 ? 'One cell' : `${count.toLocaleString('en')} cells`;
      const first = `${count === 1 ? 'it is' : 'the first is'} "${cut(value)}" in ${place(row, line)}`;
      sentences.push({ level: 'warning', pointer: '/columns', text: `${cells} of "${column}" ${why}; ${first}.` });
    }
    for (const [column, { count, row, line, value }] of this.missing) {
      const cells = count === 1 ? 'One cell' : `${count.toLocaleString('en')} cells`;
      const text = `${cells} of "${column}" hold a number outside what can be measured and are taken as missing, such as ${cut(value)} in ${place(row, line)}.`;
      sentences.push({ level: 'assumed', pointer: '/missing', text });
    }
    return sentences;
  }
}

/** "row 7 (line 9)" for a text file, "row 7" for a binary one. */
export function place(row: number, line: number | null): string {
  return line === null ? `row ${row}` : `row ${row} (line ${line})`;
}

const cut = (text: string): string => (text.length > 60 ? `${text.slice(0, 57)}…` : text);

function note(map: Map<string, Seen>, key: string, row: number, line: number | null, value: string): void {
  const seen = map.get(key);
  if (seen) seen.count++;
  else map.set(key, { count: 1, row, line, value });
}
