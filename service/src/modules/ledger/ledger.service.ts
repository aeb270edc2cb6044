import type { LedgerEntry, LedgerExportQuery, LedgerQuery } from '@eremite/shared/contracts/ledger';
import type { List } from '@eremite/shared/contracts/list';
import { Injectable } from '@nestjs/common';
import { offsetOf, pageByOffset } from '../../common/paging.ts';
import type { Database } from '../../database/database.ts';
import { LedgerFeed } from './ledger-feed.ts';
import { canonicalJson, ledgerHash } from './ledger-hash.ts';
import { type LedgerRow, LedgerRepository } from './ledger.repository.ts';

export interface LedgerAppend {
  readonly surveyId: string;
  readonly actor: { readonly id: string | null; readonly name: string };
  /** What was done, as a short verb phrase: `survey created`. */
  readonly action: string;
  /** To what: a name a person recognises. */
  readonly subject: string;
  readonly note?: string;
  readonly detail?: Record<string, unknown>;
}

export interface LedgerVerification {
  readonly entries: number;
  readonly intact: boolean;
  /** The first line whose hash does not fit. */
  readonly brokenAt: number | null;
  readonly lastHash: string;
}

/** What a reviewer does: blind reviewers are not told what it came to. */
export const REVIEW_ACTIONS: ReadonlySet<string> = new Set([
  'agreed with a verdict',
  'departed from a verdict',
  'took a review back',
  'accepted a counterpart',
  'rejected a counterpart',
  'took an override back',
  'cleared a doubt',
  'confirmed a doubt',
  'took a word on a doubt back',
  'remarked',
  'asked a colleague',
]);
/** What she is told in its place. */
export const MASKED_ACTION = 'reviewed a verdict';
const EXPORT_BLOCK = 1000;

@Injectable()
export class LedgerService {
  constructor(
    private readonly lines: LedgerRepository,
    private readonly feed: LedgerFeed,
  ) {}

  /**
   * Writes a line. Give the transaction that makes the change, so that both happen or neither does.
   *
   * @param db the open transaction; without it the line gets one of its own
   */
  async append(entry: LedgerAppend, db?: Database): Promise<void> {
    if (!db) return this.lines.db.transaction((tx) => this.append(entry, tx));
    await this.lines.lock(entry.surveyId, db);
    const last = await this.lines.last(entry.surveyId, db);
    const line = {
      surveyId: entry.surveyId,
      number: (last?.number ?? 0) + 1,
      at: new Date(),
      actorId: entry.actor.id,
      actor: entry.actor.name,
      action: entry.action,
      subject: entry.subject,
      note: entry.note ?? '',
      // As the database will hand it back: -0, undefined and dates do not survive JSON.
      detail: JSON.parse(canonicalJson(entry.detail ?? {})) as Record<string, unknown>,
      previousHash: last?.hash ?? '',
    };
    await this.lines.insert({ ...line, hash: ledgerHash(line) }, db);
    this.feed.wake(entry.surveyId);
  }

  /**
   * A page of lines.
   *
   * @param blindTo a reviewer, who is told that others reviewed but not what they said: reviewers stay blind to each other
   */
  async list(surveyId: string, query: LedgerQuery, blindTo?: string): Promise<List<LedgerEntry>> {
    const offset = offsetOf(query.cursor);
    const order = query.sort === 'number' ? 'oldest' : 'newest';
    const filter = { ...query, blindTo, hidden: [...REVIEW_ACTIONS] };
    const [rows, total] = await Promise.all([
      this.lines.page(surveyId, order, query.limit, offset, filter),
      this.lines.count(surveyId, filter),
    ]);
    return pageByOffset(
      rows.map((row) => toEntry(row, blindTo)),
      total,
      offset,
    );
  }

  /** Whole lines from the first on, with all that their hashes cover; hidden ones are left as they are told. */
  async *whole(surveyId: string, query: LedgerExportQuery, blindTo?: string): AsyncGenerator<LedgerRow> {
    const filter = { ...query, blindTo, hidden: [...REVIEW_ACTIONS] };
    for (let offset = 0; ; offset += EXPORT_BLOCK) {
      const rows = await this.lines.page(surveyId, 'oldest', EXPORT_BLOCK, offset, filter);
      for (const row of rows)
        yield isHidden(row, blindTo) ? { ...row, ...MASK, subject: row.subject.split(':')[0]! } : row;
      if (rows.length < EXPORT_BLOCK) return;
    }
  }

  async facets(surveyId: string, blindTo?: string) {
    const { actors, actions } = await this.lines.facets(surveyId);
    const told = blindTo ? [...actions.filter((action) => !REVIEW_ACTIONS.has(action))] : actions;
    return { actors, actions: told };
  }

  /** Recomputes the chain from the first line on. */
  async verify(surveyId: string): Promise<LedgerVerification> {
    let previousHash = '';
    let entries = 0;
    for (;;) {
      const rows = await this.lines.page(surveyId, 'oldest', 1000, entries);
      for (const row of rows) {
        entries += 1;
        const fits = row.number === entries && row.previousHash === previousHash && row.hash === ledgerHash(row);
        if (!fits) {
          const all = await this.lines.count(surveyId);
          return { entries: all, intact: false, brokenAt: row.number, lastHash: previousHash };
        }
        previousHash = row.hash;
      }
      if (rows.length < 1000) return { entries, intact: true, brokenAt: null, lastHash: previousHash };
    }
  }
}

const MASK = { action: MASKED_ACTION, note: '', detail: {} };
const isHidden = ({ actorId, action }: LedgerRow, blindTo: string | undefined): boolean =>
  blindTo !== undefined && actorId !== blindTo && REVIEW_ACTIONS.has(action);

function toEntry(row: LedgerRow, blindTo: string | undefined): LedgerEntry {
  const { number, at, actor, action, subject, note, detail, hash } = row;
  const line = {
    number,
    at: at.toISOString(),
    actor,
    action,
    subject,
    note,
    detail: detail as LedgerEntry['detail'],
    hash,
  };
  if (!isHidden(row, blindTo)) return line;
  // The object of an override stands after the colon of its subject.
  return { ...line, ...MASK, subject: subject.split(':')[0]! };
}
