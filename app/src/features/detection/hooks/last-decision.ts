/** The last review given in this sitting, for undoing it after the page has moved on. */
export interface LastDecision {
  readonly userId: string;
  readonly reviewId: string;
  readonly detectionId: string;
  readonly name: string;
}
const KEY = 'eremite.last-decision';

export function remember(decision: LastDecision | null): void {
  try {
    if (decision) sessionStorage.setItem(KEY, JSON.stringify(decision));
    else sessionStorage.removeItem(KEY);
  } catch {
    // Without it there is nothing to undo by key; the history still takes back.
  }
}

/** @param userId another person's is not undone */
export function recall(userId: string): LastDecision | null {
  try {
    const kept = JSON.parse(sessionStorage.getItem(KEY) ?? 'null') as LastDecision | null;
    return kept?.userId === userId ? kept : null;
  } catch {
    return null;
  }
}

let underWay = 0;
/** Counts a decision that is being sent while one goes on already: what it came to cannot be undone before it is known. */
export async function whileUnderWay<T>(work: Promise<T>): Promise<T> {
  underWay += 1;
  try {
    return await work;
  } finally {
    underWay -= 1;
  }
}
export const isUnderWay = (): boolean => underWay > 0;
