import type { Moved } from '@eremite/shared/contracts/evidence-moved';
import type { SettledRow } from './shortlists.repository.ts';

/** Why a detection may not be handed on yet, for its lead; null when it may. */
export function notReady(settled: Pick<SettledRow, 'outcome' | 'moved' | 'runNumber'> | undefined): string | null {
  if (!settled) return 'not settled: the lead has not given the last word on it';
  if (settled.outcome !== 'verdict') return `settled as ${settled.outcome}, not with a verdict`;
  if (settled.moved === null || settled.moved === undefined) return null;
  const what = (settled.moved as Moved[]).map(({ what: name, from, to }) => `${name} ${from} → ${to}`).join('; ');
  return `its evidence moved since it was settled on run ${settled.runNumber}${what ? ` (${what})` : ''}; settle it again`;
}
