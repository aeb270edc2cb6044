import type { LedgerEntry } from '@eremite/shared/contracts/ledger';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import { Injectable } from '@nestjs/common';
import { offsetOf, pageByOffset } from '../../common/paging.ts';
import type { Database } from '../../database/database.ts';
import { canonicalJson, ledgerHash } from './ledger-hash.ts';
import { LedgerRepository } from './ledger.repository.ts';

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
}

/** What a reviewer does: blind reviewers are not told what it came to. */
export const REVIEW_ACTIONS: ReadonlySet<string> = new Set(['agreed with a verdict', 'departed from a verdict']);

@Injectable()
export class LedgerService {
  constructor(private readonly lines: LedgerRepository) {}

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
  }

  /**
   * A page of lines.
   *
   * @param blindTo a reviewer, who is told that others reviewed but not what they said: reviewers stay blind to each other
   */
  async list(surveyId: string, query: ListQuery, blindTo?: string): Promise<List<LedgerEntry>> {
    const offset = offsetOf(query.cursor);
    const order = query.sort === 'number' ? 'oldest' : 'newest';
    const [rows, total] = await Promise.all([
      this.lines.page(surveyId, order, query.limit, offset),
      this.lines.count(surveyId),
    ]);
    const items = rows.map(({ number, at, actor, actorId, action, subject, note, detail, hash }) => {
      const hidden = blindTo !== undefined && actorId !== blindTo && REVIEW_ACTIONS.has(action);
      return {
        number,
        at: at.toISOString(),
        actor,
        action: hidden ? 'reviewed a verdict' : action,
        subject,
        note: hidden ? '' : note,
        detail: hidden ? {} : (detail as Record<string, unknown>),
        hash,
      };
    });
    return pageByOffset(items, total, offset);
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
        if (!fits) return { entries: await this.lines.count(surveyId), intact: false, brokenAt: row.number };
        previousHash = row.hash;
      }
      if (rows.length < 1000) return { entries, intact: true, brokenAt: null };
    }
  }
}
