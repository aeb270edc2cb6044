import { Injectable, Logger, type OnModuleDestroy } from '@nestjs/common';
import { LedgerRepository } from './ledger.repository.ts';

/** Looks again this often for what other processes wrote. */
const LOOK_MS = 1500;
/** A line is appended a moment before its transaction ends. */
const COMMIT_MS = 40;

/**
 * Tells listeners that a survey's ledger has grown. One look serves all listeners of all surveys, so that open pages cost one
 * query together, and lines of other processes are found too.
 */
@Injectable()
export class LedgerFeed implements OnModuleDestroy {
  readonly #log = new Logger(LedgerFeed.name);
  readonly #listeners = new Map<string, Set<() => void>>();
  readonly #known = new Map<string, number>();
  #timer: NodeJS.Timeout | undefined;
  #looking = false;
  #stopped = false;

  constructor(private readonly lines: LedgerRepository) {}

  /** Calls back when lines were added, until the returned function is called. */
  listen(surveyId: string, listener: () => void): () => void {
    const listeners = this.#listeners.get(surveyId) ?? new Set();
    this.#listeners.set(surveyId, listeners.add(listener));
    this.#schedule(LOOK_MS);
    return () => {
      listeners.delete(listener);
      if (listeners.size > 0 || this.#listeners.get(surveyId) !== listeners) return;
      this.#listeners.delete(surveyId);
      this.#known.delete(surveyId);
      if (this.#listeners.size === 0) clearTimeout(this.#timer);
    };
  }

  /** Says that a line is being written: listeners need not wait for the next look. */
  wake(surveyId: string): void {
    if (this.#listeners.has(surveyId)) this.#schedule(COMMIT_MS);
  }

  /** The service is stopping: streams end, and their readers ask again elsewhere. */
  get isStopped(): boolean {
    return this.#stopped;
  }

  onModuleDestroy(): void {
    this.#stopped = true;
    clearTimeout(this.#timer);
    const all = [...this.#listeners.values()].flatMap((listeners) => [...listeners]);
    this.#listeners.clear();
    for (const listener of all) listener();
  }

  #schedule(milliseconds: number): void {
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => void this.#look(), milliseconds);
    this.#timer.unref();
  }

  async #look(): Promise<void> {
    if (this.#looking) return this.#schedule(COMMIT_MS);
    this.#looking = true;
    try {
      const last = await this.lines.lastNumbers([...this.#listeners.keys()]);
      for (const [surveyId, number] of last) {
        if (this.#known.get(surveyId) === number) continue;
        this.#known.set(surveyId, number);
        for (const listener of this.#listeners.get(surveyId) ?? []) listener();
      }
    } catch (error) {
      this.#log.warn(error instanceof Error ? error.message : String(error));
    } finally {
      this.#looking = false;
      if (this.#listeners.size > 0) this.#schedule(LOOK_MS);
    }
  }
}
