import { createHash } from 'node:crypto';

/** JSON with sorted keys, so that equal values give equal text after a round trip through the database. */
export function canonicalJson(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map((item) => canonicalJson(item ?? null)).join(',')}]`;
  if (typeof value === 'object' && value !== null) {
    const entries = Object.entries(value)
      .filter(([, item]) => item !== undefined)
      .sort(([a], [b]) => (a < b ? -1 : 1));
    return `{${entries.map(([key, item]) => `${JSON.stringify(key)}:${canonicalJson(item)}`).join(',')}}`;
  }
  return JSON.stringify(value) ?? 'null';
}

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
