import { AsyncLocalStorage } from 'node:async_hooks';
import { Worker } from 'node:worker_threads';
import { workerUrl } from '../common/worker-url.ts';
import { Mutex } from './mutex.ts';
import type { PgliteAnswer, PgliteRequest, PgliteStart } from './pglite-messages.ts';

interface Waiting {
  resolve(value: never): void;
  reject(error: Error): void;
}
interface Rows {
  rows: never[];
  affectedRows?: number;
}
interface Options {
  rowMode?: 'array' | 'object';
  parsers?: Record<number, unknown>;
}

/** An error of the database, with its SQLSTATE in `code` as the other driver has it. */
export class PgliteError extends Error {
  override readonly name = 'PgliteError';
}

/** What runs inside a transaction: the same calls, which no one else can come between. */
export interface PgliteTransaction {
  query(sql: string, params?: unknown[], options?: Options): Promise<Rows>;
  exec(sql: string): Promise<Rows[]>;
}

/**
 * The built-in database, which lives in a thread of its own. There is one session, so whoever is in a transaction has
 * it alone.
 */
export class PgliteProxy implements PgliteTransaction {
  readonly #worker: Worker;
  readonly #waiting = new Map<number, Waiting>();
  readonly #turn = new Mutex();
  readonly #inside = new AsyncLocalStorage<{ open: boolean }>();
  readonly ready: Promise<void>;
  #next = 0;
  #gone: Error | undefined;

  constructor(start: PgliteStart) {
    this.#worker = new Worker(workerUrl('pglite'), { workerData: start });
    this.ready = new Promise((resolve, reject) =>
      this.#waiting.set(this.#next++, { resolve: resolve as () => void, reject }),
    );
    this.#worker.on('message', (answer: PgliteAnswer) => this.#receive(answer));
    this.#worker.on('error', (error) => this.#fail(error as Error));
    this.#worker.on('exit', () => this.#fail(new Error('the database is closed')));
  }

  query(sql: string, params: unknown[] = [], options: Options = {}): Promise<Rows> {
    return this.#alone(() => this.#query(sql, params, options));
  }

  exec(sql: string): Promise<Rows[]> {
    return this.#alone(() => this.#ask<Rows[]>({ op: 'exec', sql }));
  }

  transaction<T>(work: (transaction: PgliteTransaction) => Promise<T>): Promise<T> {
    const state = { open: true };
    return this.#alone(async () => {
      await this.#ask({ op: 'exec', sql: 'begin' });
      const inside: PgliteTransaction = {
        query: (sql, params = [], options = {}) => this.#within(state, () => this.#query(sql, params, options)),
        exec: (sql) => this.#within(state, () => this.#ask<Rows[]>({ op: 'exec', sql })),
      };
      try {
        const result = await this.#inside.run(state, () => work(inside));
        state.open = false;
        await this.#ask({ op: 'exec', sql: 'commit' });
        return result;
      } catch (error) {
        state.open = false;
        await this.#ask({ op: 'exec', sql: 'rollback' });
        throw error;
      }
    });
  }

  copyIn(sql: string, bytes: Uint8Array<ArrayBuffer>): Promise<number> {
    return this.#alone(() => this.#ask<number>({ op: 'copyIn', sql, bytes }, [bytes.buffer]));
  }

  copyOut(sql: string): Promise<ArrayBuffer> {
    return this.#alone(() => this.#ask<ArrayBuffer>({ op: 'copyOut', sql }));
  }

  /** The whole data directory as an archive. */
  dump(): Promise<ArrayBuffer> {
    return this.#alone(() => this.#ask<ArrayBuffer>({ op: 'dump' }));
  }

  async close(): Promise<void> {
    if (this.#gone) return;
    await this.#turn.run(() => this.#ask({ op: 'close' }));
    await this.#worker.terminate();
  }

  #query(sql: string, params: unknown[], { rowMode = 'object', parsers = {} }: Options): Promise<Rows> {
    // Functions cannot cross threads; the only parsers Drizzle asks for are "leave it as text".
    return this.#ask<Rows>({ op: 'query', sql, params, rowMode, rawTypes: Object.keys(parsers).map(Number) });
  }

  #alone<T>(work: () => Promise<T>): Promise<T> {
    if (this.#inside.getStore()?.open) {
      return Promise.reject(new Error('inside a transaction use its own handle: the outer one would wait for ever'));
    }
    return this.#turn.run(work);
  }

  #within<T>(state: { open: boolean }, work: () => Promise<T>): Promise<T> {
    return state.open ? work() : Promise.reject(new Error('the transaction is over; something was not awaited'));
  }

  #ask<T>(request: PgliteRequest, transfer: ArrayBuffer[] = []): Promise<T> {
    if (this.#gone) return Promise.reject(this.#gone);
    return new Promise<T>((resolve, reject) => {
      const id = this.#next++;
      this.#waiting.set(id, { resolve, reject });
      this.#worker.postMessage({ id, request }, transfer);
    });
  }

  #receive(answer: PgliteAnswer): void {
    const waiting = this.#waiting.get(answer.id);
    this.#waiting.delete(answer.id);
    if ('error' in answer) waiting?.reject(Object.assign(new PgliteError(answer.error.message), answer.error.fields));
    else waiting?.resolve(answer.value as never);
  }

  #fail(error: Error): void {
    this.#gone = error;
    for (const waiting of this.#waiting.values()) waiting.reject(error);
    this.#waiting.clear();
  }
}
