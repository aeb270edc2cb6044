import { AppError } from './app-error.ts';

/** Strong ETag of a thing's version. */
export const etagOf = (version: string | number): string => `"${version}"`;

/**
 * Holds a change to the state its author saw.
 *
 * @param ifMatch header If-Match; without it the change is taken as it comes
 * @param version of the present state
 * @param current the present state, sent along with the refusal
 * @throws {AppError} CHANGED_MEANWHILE
 */
export function requireMatch(ifMatch: string | undefined, version: string | number, current: unknown): void {
  if (ifMatch === undefined) return;
  requireSeen(ifMatch, version, current);
}

/** The same where a change must say what its author saw: without the header it is refused too. */
export function requireSeen(ifMatch: string | undefined, version: string | number, current: unknown): void {
  if (ifMatch?.trim() === '*') return;
  const seen = (ifMatch ?? '').split(',').map((tag) => tag.trim().replace(/^W\//, ''));
  if (seen.includes(etagOf(version))) return;
  throw new AppError('CHANGED_MEANWHILE', 'Look at the present state and decide again.', undefined, current);
}
