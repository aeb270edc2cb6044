/** Thrown when a search would find more than its limit: criteria that select nearly everything are refused. */
export class HitLimitError extends Error {
  override readonly name = 'HitLimitError';

  /**
   * @param limit most hits the caller allows
   * @param about estimate of the hits the whole search would give
   */
  constructor(
    readonly limit: number,
    readonly about: number,
  ) {
    super(`the search would give about ${about.toExponential(1)} pairs, more than the limit of ${limit}`);
  }
}

/** Hits a search may return unless told otherwise: 20 bytes each while it runs. */
export const DEFAULT_HIT_LIMIT = 50_000_000;
