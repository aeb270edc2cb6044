import type { Preview } from '@eremite/shared/contracts/preview';

/** Whether a previewed detection would get another verdict than it has. */
export const isMoved = ({ verdict: now, before }: Preview['items'][number]): boolean =>
  before !== null && (before.starlight !== now.starlight || before.surroundings !== now.surroundings);
