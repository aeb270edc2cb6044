import { closeSync, openSync, writeSync } from 'node:fs';
import { guardText } from '../tables/writers/csv.ts';

const PIECE = 1 << 20;

/** Text of a CSV cell: quoted where it must be, guarded against being run as a formula. */
function textCell(text: string): string {
  const guarded = guardText(text);
  return /[",\r\n]|^[\s#]|\s$/.test(guarded) ? `"${guarded.replaceAll('"', '""')}"` : guarded;
}

/** Nine decimals, or eight significant digits of what is smaller; missing is empty. */
function numberCell(value: number): string {
  if (!Number.isFinite(value)) return '';
  const size = Math.abs(value);
  if (size >= 1e-3 && size < 1e6) return String(Math.round(value * 1e9) / 1e9);
  return Number.isInteger(value) ? String(value) : String(Number(value.toPrecision(8)));
}

export type Cell = string | number | null;

/** A CSV file written line by line (RFC 4180, UTF-8, CR LF). */
export class CsvFile {
  private readonly handle: number;
  private text: string;
  lines = 0;

  constructor(path: string, header: readonly string[]) {
    this.handle = openSync(path, 'w');
    this.text = `${header.join(',')}\r\n`;
  }

  add(cells: readonly Cell[]): void {
    let line = '';
    for (let i = 0; i < cells.length; i++) {
      const cell = cells[i]!;
      if (i > 0) line += ',';
      if (typeof cell === 'string') line += textCell(cell);
      else if (cell !== null) line += numberCell(cell);
    }
    this.text += `${line}\r\n`;
    this.lines++;
    if (this.text.length > PIECE) this.flush();
  }

  private flush(): void {
    writeSync(this.handle, this.text);
    this.text = '';
  }

  close(): void {
    this.flush();
    closeSync(this.handle);
  }
}
