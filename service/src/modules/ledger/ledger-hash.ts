import { createHash } from 'node:crypto';
import { canonicalJson } from '../../edition/canonical-json.ts';

export { canonicalJson };

export interface LedgerLine {
  readonly surveyId: string;
  readonly number: number;
  readonly at: Date;
  readonly actorId: string | null;
  readonly actor: string;
  readonly action: string;
  readonly subject: string;
  readonly note: string;
  readonly detail: unknown;
  readonly previousHash: string;
}

/** sha256 (hex) over a line and the hash before it; the first line's previous hash is empty. */
export function ledgerHash(line: LedgerLine): string {
  const covered = [
    line.previousHash,
    line.surveyId,
    line.number,
    line.at.toISOString(),
    line.actorId,
    line.actor,
    line.action,
    line.subject,
    line.note,
    line.detail,
  ];
  return createHash('sha256').update(canonicalJson(covered)).digest('hex');
}
