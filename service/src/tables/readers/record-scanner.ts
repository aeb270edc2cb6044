const TAB = 9;
const LINE_FEED = 10;
const RETURN = 13;
const SPACE = 32;
const QUOTE = 34;

/** How a text table separates its cells: by one character, or by runs of blanks. */
export type Delimiter = ',' | ';' | '\t' | '|' | 'blank';

/**
 * Splits delimited text (RFC 4180) into cells, record by record, without copying. Kinder than the RFC where files are
 * worse: blanks around cells are dropped, a quote that never closes or closes inside a word is an ordinary character,
 * and lines end with LF, CR LF or CR.
 */
export class RecordScanner {
  /** Cells of the record last scanned: cell i is `bytes[starts[i] .. ends[i]]`. */
  count = 0;
  starts = new Int32Array(64);
  ends = new Int32Array(64);
  /** 1 where a quoted cell holds doubled quotes. */
  doubled = new Uint8Array(64);
  /** Line ends inside and after the record last scanned. */
  newlines = 0;
  private readonly delimiter: number;
  private readonly blank: boolean;
  private close = 0;
  private after = 0;

  constructor(
    delimiter: Delimiter,
    private readonly maxCellLength: number,
  ) {
    this.blank = delimiter === 'blank';
    this.delimiter = this.blank ? SPACE : delimiter.charCodeAt(0);
  }

  /**
   * Scans the record that begins at `start`. `last` says that nothing follows `end`.
   * @returns index after the record and its line end, or -1 when it is cut off and more bytes must be read.
   */
  scan(bytes: Uint8Array, start: number, end: number, last: boolean): number {
    this.count = 0;
    this.newlines = 0;
    return this.blank ? this.scanBlank(bytes, start, end, last) : this.scanDelimited(bytes, start, end, last);
  }

  private scanDelimited(bytes: Uint8Array, start: number, end: number, last: boolean): number {
    const delimiter = this.delimiter;
    let i = start;
    for (;;) {
      while (i < end && (bytes[i] === SPACE || (bytes[i] === TAB && delimiter !== TAB))) i++;
      const quoted = i < end && bytes[i] === QUOTE ? this.findClose(bytes, i + 1, end, last) : 0;
      if (quoted < 0) return -1;
      if (quoted > 0) {
        this.push(i + 1, this.close, quoted - 1);
        i = this.after;
      } else {
        const from = i;
        for (; i < end; i++) {
          const byte = bytes[i]!;
          if (byte === delimiter || byte === LINE_FEED || byte === RETURN) break;
        }
        let to = i;
        while (to > from && bytes[to - 1] === SPACE) to--;
        this.push(from, to, 0);
      }
      if (i >= end) return last ? end : -1;
      if (bytes[i] !== delimiter) return this.endLine(bytes, i, end, last);
      i++;
    }
  }

  private scanBlank(bytes: Uint8Array, start: number, end: number, last: boolean): number {
    let i = start;
    for (;;) {
      while (i < end && (bytes[i] === SPACE || bytes[i] === TAB)) i++;
      if (i >= end) return last ? end : -1;
      if (bytes[i] === LINE_FEED || bytes[i] === RETURN) return this.endLine(bytes, i, end, last);
      const quoted = bytes[i] === QUOTE ? this.findClose(bytes, i + 1, end, last) : 0;
      if (quoted < 0) return -1;
      if (quoted > 0) {
        this.push(i + 1, this.close, quoted - 1);
        i = this.after;
        continue;
      }
      const from = i;
      for (; i < end; i++) {
        const byte = bytes[i]!;
        if (byte === SPACE || byte === TAB || byte === LINE_FEED || byte === RETURN) break;
      }
      if (i >= end && !last) return -1;
      this.push(from, i, 0);
    }
  }

  private endLine(bytes: Uint8Array, at: number, end: number, last: boolean): number {
    this.newlines++;
    if (bytes[at] === LINE_FEED) return at + 1;
    if (at + 1 >= end) return last ? end : -1;
    return bytes[at + 1] === LINE_FEED ? at + 2 : at + 1;
  }

  private push(start: number, end: number, doubled: number): void {
    const cell = this.count++;
    if (cell === this.starts.length) this.grow();
    this.starts[cell] = start;
    this.ends[cell] = end;
    this.doubled[cell] = doubled;
  }

  private grow(): void {
    const size = this.starts.length * 2;
    const larger = <T extends Int32Array | Uint8Array>(from: T, to: T): T => (to.set(from), to);
    this.starts = larger(this.starts, new Int32Array(size));
    this.ends = larger(this.ends, new Int32Array(size));
    this.doubled = larger(this.doubled, new Uint8Array(size));
  }

  /** Looks for the quote that closes a cell: 0 none, 1 found, 2 found past doubled quotes, -1 not known yet. */
  private findClose(bytes: Uint8Array, from: number, end: number, last: boolean): number {
    let found = 1;
    let newlines = 0;
    const limit = Math.min(end, from + this.maxCellLength);
    for (let i = from; i < limit; i++) {
      const byte = bytes[i]!;
      if (byte === LINE_FEED || (byte === RETURN && bytes[i + 1] !== LINE_FEED)) newlines++;
      if (byte !== QUOTE) continue;
      if (bytes[i + 1] === QUOTE && i + 1 < end) {
        found = 2;
        i++;
        continue;
      }
      let next = i + 1;
      while (next < end && (bytes[next] === SPACE || (bytes[next] === TAB && this.delimiter !== TAB))) next++;
      if (next >= end && !last) return -1;
      const follower = next < end ? bytes[next]! : LINE_FEED;
      const spaced = this.blank && (next > i + 1 || next >= end);
      if (!spaced && follower !== this.delimiter && follower !== LINE_FEED && follower !== RETURN) return 0;
      this.newlines += newlines;
      this.close = i;
      this.after = next;
      return found;
    }
    return last || limit < end ? 0 : -1;
  }
}
