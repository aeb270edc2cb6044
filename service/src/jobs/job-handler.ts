export interface JobContext {
  readonly id: string;
  /** Aborted when someone cancels or the service stops; look at it between units of work. */
  readonly signal: AbortSignal;
  /** @param fraction share of the work done, 0 to 1 */
  progress(fraction: number, message?: string): void;
}

/** What a module registers to have its long work done. */
export interface JobHandler<Payload = unknown, Result = unknown> {
  readonly kind: string;
  run(payload: Payload, context: JobContext): Promise<Result>;
  /**
   * Tidies up after a process that died in the middle; the job is then put back. Without it an interrupted job fails
   * and says so.
   */
  recover?(payload: Payload, context: { id: string }): Promise<void>;
  /** Told once when the job ended in failure or was cancelled, so that what it stood for can say so too. */
  ended?(payload: Payload, outcome: { id: string; state: 'failed' | 'cancelled'; error: string }): Promise<void>;
}
