import { ApiError } from '../api-error.ts';

/** A decision that could not be sent yet. */
export interface Waiting {
  /** Also its Idempotency-Key: sent twice, it is done once. */
  readonly key: string;
  readonly userId: string;
  readonly path: string;
  readonly json: unknown;
  readonly ifMatch?: string;
  /** What it is, in words: `Agree with H 12`. */
  readonly what: string;
  readonly at: string;
  /** Why the service refused it when it was sent at last; it then waits for its author. */
  readonly refused?: string;
}

export interface OutboxStore {
  read(): Waiting[];
  write(waiting: readonly Waiting[]): void;
}
export type Send = (waiting: Waiting) => Promise<unknown>;

const isUnreachable = (error: unknown): boolean =>
  error instanceof ApiError && (error.code === 'UNREACHABLE' || error.status === 502 || error.status === 503);

/**
 * Decisions on their way to the service. What cannot be sent is kept in this browser and sent in order when the service is
 * back; what is then refused is kept too, with the reason, until its author looks at it.
 */
export class Outbox {
  #waiting: readonly Waiting[];
  #sending = false;
  readonly #listeners = new Set<() => void>();
  readonly #sent = new Set<(waiting: Waiting) => void>();

  constructor(
    private readonly store: OutboxStore,
    private readonly send: Send,
  ) {
    this.#waiting = store.read();
  }

  get waiting(): readonly Waiting[] {
    return this.#waiting;
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  };

  /** Calls back when something that waited has gone out. */
  onSent(listener: (waiting: Waiting) => void): () => void {
    this.#sent.add(listener);
    return () => this.#sent.delete(listener);
  }

  /**
   * Sends a decision, or keeps it where the service cannot be reached.
   *
   * @returns `sent` with the answer, or `kept`
   * @throws {ApiError} where the service refuses it: then its author is there to mend it
   */
  async submit(entry: Waiting): Promise<{ state: 'sent'; answer: unknown } | { state: 'kept' }> {
    // Behind what waits already: decisions must not overtake each other.
    if (this.#waiting.some((waiting) => !waiting.refused && waiting.userId === entry.userId)) {
      this.#set([...this.#waiting, entry]);
      void this.flush(entry.userId);
      return { state: 'kept' };
    }
    try {
      return { state: 'sent', answer: await this.send(entry) };
    } catch (error) {
      if (!isUnreachable(error)) throw error;
      this.#set([...this.#waiting, entry]);
      return { state: 'kept' };
    }
  }

  /** Sends what waits, in order, until it is all gone or the service is out of reach again. */
  async flush(userId: string): Promise<void> {
    if (this.#sending) return;
    this.#sending = true;
    try {
      for (;;) {
        const next = this.#waiting.find((waiting) => waiting.userId === userId && !waiting.refused);
        if (!next) return;
        try {
          await this.send(next);
          this.discard(next.key);
          this.#sent.forEach((listener) => listener(next));
        } catch (error) {
          // Out of reach, or signed out meanwhile: it waits on.
          if (isUnreachable(error) || (error instanceof ApiError && error.status === 401)) return;
          const refused = error instanceof Error ? error.message : 'It was refused.';
          this.#set(this.#waiting.map((waiting) => (waiting.key === next.key ? { ...waiting, refused } : waiting)));
        }
      }
    } finally {
      this.#sending = false;
    }
  }

  /** Throws something away that waited. */
  discard(key: string): void {
    this.#set(this.#waiting.filter((waiting) => waiting.key !== key));
  }

  #set(waiting: readonly Waiting[]): void {
    this.#waiting = waiting;
    this.store.write(waiting);
    this.#listeners.forEach((listener) => listener());
  }
}
