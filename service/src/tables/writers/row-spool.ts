import { createReadStream } from 'node:fs';
import { type FileHandle, mkdtemp, open, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import type { OutputRow, OutputRows } from './output-column.ts';

/** Rows of a block; a block is a line of the file. */
const BLOCK = 1000;
/** Blocks held before a file is begun: most tables never need one. */
const HELD_BLOCKS = 8;

/**
 * Rows kept to be read a second time, for formats whose head tells numbers and widths. What is more than a few
 * thousand rows lies in a temporary file, so that memory stays bounded whatever the size. Close it when done.
 */
export class RowSpool {
  #count = 0;
  #block: OutputRow[] = [];
  readonly #held: OutputRow[][] = [];
  #folder: string | undefined;
  #file: FileHandle | undefined;

  /**
   * Takes all rows in.
   *
   * @param see called with each row as it comes, to measure it
   */
  static async of(rows: OutputRows, see: (row: OutputRow) => void): Promise<RowSpool> {
    const spool = new RowSpool();
    try {
      for await (const row of rows) {
        see(row);
        spool.#block.push(row);
        if (spool.#block.length === BLOCK) await spool.#put();
      }
      await spool.#put();
    } catch (error) {
      await spool.close();
      throw error;
    }
    return spool;
  }

  get count(): number {
    return this.#count;
  }

  /** Blocks of rows in the order they came. NaN comes back as null: both mean missing. */
  async *blocks(): AsyncIterable<OutputRow[]> {
    yield* this.#held;
    if (!this.#folder) return;
    const lines = createInterface({ input: createReadStream(this.#path()), crlfDelay: Infinity });
    for await (const line of lines) yield JSON.parse(line) as OutputRow[];
  }

  /** Removes the file, if there is one. */
  async close(): Promise<void> {
    await this.#file?.close();
    if (this.#folder) await rm(this.#folder, { recursive: true, force: true });
    this.#file = undefined;
    this.#folder = undefined;
  }

  async #put(): Promise<void> {
    const block = this.#block;
    if (block.length === 0) return;
    this.#block = [];
    this.#count += block.length;
    if (this.#held.length < HELD_BLOCKS) {
      this.#held.push(block);
      return;
    }
    this.#folder ??= await mkdtemp(join(tmpdir(), 'eremite-rows-'));
    this.#file ??= await open(this.#path(), 'wx');
    await this.#file.write(`${JSON.stringify(block)}\n`);
  }

  #path(): string {
    return join(this.#folder!, 'rows');
  }
}
