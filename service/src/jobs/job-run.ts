import type { JobContext, JobHandler } from './job-handler.ts';
import type { JobRow, JobsRepository } from './jobs.repository.ts';

/** Also how soon a wish to cancel is heard that reached another process; a beat reads one row and writes one. */
const BEAT_MS = 700;
/** Progress reaches the database at most this often. */
const REPORT_MS = 250;

/** One job in hand in this process: its signal, its progress, its heartbeat. */
export class JobRun {
  readonly #controller = new AbortController();
  readonly #timer: NodeJS.Timeout;
  #fraction = 0;
  #message = '';
  #lastReport = 0;
  #pending: Promise<void> = Promise.resolve();
  #end!: () => void;
  readonly ended = new Promise<void>((resolve) => (this.#end = resolve));
  abortedFor: 'cancelled' | 'stopping' | undefined;

  constructor(
    private readonly row: JobRow,
    private readonly jobs: JobsRepository,
    private readonly changed: () => void,
  ) {
    this.#timer = setInterval(() => this.#report(), BEAT_MS);
  }

  begin(handler: JobHandler): Promise<unknown> {
    const context: JobContext = {
      id: this.row.id,
      signal: this.#controller.signal,
      progress: (fraction, message) => {
        this.#fraction = Math.min(1, Math.max(0, fraction));
        if (message !== undefined) this.#message = message;
        if (Date.now() - this.#lastReport >= REPORT_MS) this.#report();
      },
    };
    return handler.run(this.row.payload, context);
  }

  abort(reason: 'cancelled' | 'stopping'): void {
    this.abortedFor ??= reason;
    this.#controller.abort(new Error(reason));
  }

  close(): void {
    clearInterval(this.#timer);
    void this.#pending.finally(this.#end);
  }

  #report(): void {
    this.#lastReport = Date.now();
    this.#pending = this.#pending
      .then(() => this.jobs.beat(this.row.id, this.#fraction, this.#message))
      .then((cancel) => {
        if (cancel) this.abort('cancelled');
        this.changed();
      })
      // A missed beat is made up for by the next; an abandoned job is found by its age.
      .catch(() => undefined);
  }
}
