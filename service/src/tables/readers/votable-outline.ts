import { ByteWindow } from '../bytes/byte-window.ts';
import type { Content } from '../bytes/content.ts';
import { type ReaderLimits, TableError } from '../table.ts';

export type VotableSerialisation = 'TABLEDATA' | 'BINARY' | 'BINARY2' | 'FITS' | 'NONE';

/** Where the rows of one table stand in the file. */
export interface VotableData {
  serialisation: VotableSerialisation;
  /** Offset of the first byte after the start tag of TABLEDATA or STREAM. */
  start: number;
  /** Attributes of the STREAM tag as text. */
  streamTag: string;
}

export interface VotableOutline {
  /** The document with its rows left out, well-formed even when the file breaks off. */
  skeleton: string;
  /** One for each TABLE, in document order. */
  data: VotableData[];
}

const LESS = 0x3c;
const NO_DATA: VotableData = { serialisation: 'NONE', start: 0, streamTag: '' };
const MARKERS: [string, string][] = [
  ['<!--', '-->'],
  ['<![CDATA[', ']]>'],
  ['<?', '?>'],
];
const MAX_TABLES = 10_000;

/**
 * Walks through a VOTable once, keeping its markup but none of its rows, which are found again by their place.
 * @throws TableError when it is not well-formed (with the byte), defines entities, or its head is over the limit.
 */
export async function outlineVotable(content: Content, limits: ReaderLimits): Promise<VotableOutline> {
  const window = new ByteWindow(content, 0, limits);
  try {
    return await new Outliner(window, limits).run();
  } finally {
    await window.close();
  }
}

class Outliner {
  private readonly kept: string[] = [];
  private keptBytes = 0;
  private readonly open: string[] = [];
  private readonly data: VotableData[] = [];

  constructor(
    private readonly window: ByteWindow,
    private readonly limits: ReaderLimits,
  ) {}

  async run(): Promise<VotableOutline> {
    try {
      while (await this.step());
    } catch (error) {
      // A break inside the rows leaves a readable head; reading the rows will meet the break and tell.
      if (!(error instanceof TableError) || !this.mayContinue(error)) throw error;
    }
    while (this.open.length > 0) this.kept.push(`</${this.open.pop()}>`);
    return { skeleton: this.kept.join(''), data: this.data };
  }

  private mayContinue(error: TableError): boolean {
    const last = this.data.at(-1);
    const breaks = error.code === 'truncated' || error.code === 'bad-data' || error.code === 'expansion';
    return breaks && last !== undefined && last.serialisation !== 'NONE';
  }

  /** Takes the text up to the next tag, and that tag. */
  private async step(): Promise<boolean> {
    const { window } = this;
    const less = await this.find('<', 0);
    if (less < 0) {
      if (this.open.length > 0) throw this.truncated();
      return false;
    }
    this.keep(less);
    await window.need(9);
    for (const [from, to] of MARKERS) {
      if (window.buffer.toString('latin1', window.start, window.start + from.length) === from) {
        const stop = await this.find(to, from.length);
        if (stop < 0) throw this.truncated();
        if (from === '<![CDATA[') this.keepText(window.buffer.toString('utf8', window.start, window.start + stop + 3));
        window.start += stop + 3;
        if (from === '<?') window.start--;
        return true;
      }
    }
    if (window.buffer[window.start + 1] === 0x21) return this.doctype();
    return this.tag();
  }

  private async doctype(): Promise<boolean> {
    const stop = await this.find('>', 0);
    const text = this.window.buffer.toString('latin1', this.window.start, this.window.start + Math.max(stop, 0));
    if (text.includes('[') || /<!ENTITY/i.test(text)) {
      throw new TableError(
        'entities',
        'The document defines entities of its own (DOCTYPE); they are never expanded.',
        'Remove the DOCTYPE with its brackets and upload again.',
        { byte: this.window.position },
      );
    }
    if (stop < 0) throw this.truncated();
    this.window.start += stop + 1;
    return true;
  }

  private async tag(): Promise<boolean> {
    const { window } = this;
    const stop = await this.tagEnd();
    const text = window.buffer.toString('utf8', window.start, window.start + stop);
    const name = /^<\/?([^\s/>]+)/.exec(text)?.[1];
    if (name === undefined) throw this.malformed(`"${text.slice(0, 40)}" is not a tag`);
    const local = name.replace(/^.*:/, '');
    if (text.startsWith('</')) {
      if (this.open.pop() !== name) throw this.malformed(`the closing tag ${name} closes nothing that is open`);
      this.keep(stop);
      return true;
    }
    this.keep(stop);
    const closed = text.endsWith('/>');
    if (!closed) this.open.push(name);
    if (this.open.length > 200) throw this.malformed('elements are nested more than 200 deep');
    if (local === 'TABLE') {
      this.data.push(NO_DATA);
      if (this.data.length > MAX_TABLES) throw this.malformed(`it has more than ${MAX_TABLES} tables`);
    }
    if (local === 'BINARY' || local === 'BINARY2' || local === 'FITS') this.setData(local, '');
    if (local === 'TABLEDATA' && !closed) {
      this.setData('TABLEDATA', '');
      await this.skipRows('TABLEDATA');
    }
    if (local === 'STREAM') {
      this.setData(this.data.at(-1)?.serialisation ?? 'NONE', text);
      if (!closed) await this.skipRows('STREAM');
    }
    return true;
  }

  private setData(serialisation: VotableSerialisation, streamTag: string): void {
    if (this.data.length === 0) return;
    this.data[this.data.length - 1] = { serialisation, start: this.window.position, streamTag };
  }

  /** Moves to the tag that closes the rows. */
  private async skipRows(local: string): Promise<void> {
    const { window } = this;
    for (;;) {
      const { buffer, start, end } = window;
      const found = buffer.subarray(0, end).indexOf(`${local}`, start);
      if (found >= 0) {
        let slash = found - 1;
        while (slash > start && found - slash < 80 && buffer[slash] !== 0x2f && buffer[slash] !== 0x3e) slash--;
        const prefix = buffer.toString('latin1', slash + 1, found);
        const closes = buffer[slash] === 0x2f && buffer[slash - 1] === LESS && /^([\w.-]+:)?$/.test(prefix);
        window.start = closes ? slash - 1 : found + local.length;
        if (closes) return;
        continue;
      }
      window.start = Math.max(start, end - 128);
      if (!(await window.more())) throw this.truncated();
    }
  }

  /** Length of the tag at the window's start; a ">" in an attribute does not end it. */
  private async tagEnd(): Promise<number> {
    const { window } = this;
    let quote = 0;
    for (let length = 1; ; length++) {
      if (window.start + length >= window.end && !(await this.grow())) throw this.truncated();
      const byte = window.buffer[window.start + length]!;
      if (quote !== 0) quote = byte === quote ? 0 : quote;
      else if (byte === 0x22 || byte === 0x27) quote = byte;
      else if (byte === 0x3e) return length + 1;
      else if (byte === LESS) throw this.malformed('a tag begins inside another');
    }
  }

  /** Distance from the window's start to some characters, -1 when they never come. */
  private async find(characters: string, from: number): Promise<number> {
    const { window } = this;
    for (let looked = from; ;) {
      const found = window.buffer.subarray(0, window.end).indexOf(characters, window.start + looked);
      if (found >= 0) return found - window.start;
      looked = Math.max(from, window.end - window.start - characters.length + 1);
      if (!(await this.grow())) return -1;
    }
  }

  private async grow(): Promise<boolean> {
    if (this.window.end - this.window.start > this.limits.maxHeadBytes) throw this.headTooLong();
    return this.window.more();
  }

  private keep(length: number): void {
    const { window } = this;
    this.keepText(window.buffer.toString('utf8', window.start, window.start + length));
    window.start += length;
  }

  private keepText(text: string): void {
    this.keptBytes += text.length;
    if (this.keptBytes > this.limits.maxHeadBytes) throw this.headTooLong();
    this.kept.push(text);
  }

  private headTooLong(): TableError {
    return new TableError(
      'too-large',
      `What comes before the rows is longer than the limit of ${this.limits.maxHeadBytes} bytes.`,
      'Remove comments and unneeded descriptions from the file.',
      { byte: this.window.position },
    );
  }

  private truncated(): TableError {
    const inside = this.open.at(-1) ?? 'the document';
    const byte = this.window.at(this.window.end);
    return new TableError('truncated', `The VOTable breaks off inside ${inside} (byte ${byte}).`, 'Fetch it again.', {
      byte,
    });
  }

  private malformed(what: string): TableError {
    const byte = this.window.position;
    const message = `The VOTable is not well-formed XML: ${what} (byte ${byte}).`;
    return new TableError('bad-header', message, 'Export or fetch the table again.', { byte });
  }
}
