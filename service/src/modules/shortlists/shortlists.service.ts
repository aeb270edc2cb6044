import type { PutShortlistRequest, Shortlist } from '@eremite/shared/contracts/shortlist';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { requireMatch } from '../../common/etag.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { priorityOf } from '../../edition/priority-of.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { RunsService } from '../runs/runs.service.ts';
import { VerdictsService } from '../runs/verdicts.service.ts';
import { notReady } from './not-ready.ts';
import { ShortlistsRepository } from './shortlists.repository.ts';

/** The lead's ordered pick of one run's detections. */
@Injectable()
export class ShortlistsService {
  constructor(
    private readonly shortlists: ShortlistsRepository,
    private readonly runs: RunsService,
    private readonly verdicts: VerdictsService,
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
  ) {}

  async get(user: SignedInUser, surveyId: string): Promise<Shortlist> {
    await this.access.survey(user, surveyId, 'read');
    const head = await this.shortlists.find(surveyId);
    if (!head?.runId) return { runId: null, runNumber: null, version: head?.version ?? 0, entries: [] };
    const run = await this.runs.get(user, head.runId);
    const entries = await this.shortlists.entries(surveyId);
    const items = await this.verdicts.items(
      head.runId,
      entries.map((entry) => entry.detectionId),
    );
    const settled = await this.#settled(entries.map((entry) => entry.detectionId));
    return {
      runId: head.runId,
      runNumber: run.number,
      version: head.version,
      entries: entries.map(({ detectionId, rank, reason, nullResult }) => {
        const verdict = items.get(detectionId) ?? null;
        return {
          detectionId,
          rank,
          reason,
          nullResult,
          priority: verdict && priorityOf(verdict),
          verdict,
          notReady: notReady(settled.get(detectionId)),
        };
      }),
    };
  }

  /** @param ifMatch ETag of the version last seen; without it the change is taken as it comes */
  async put(
    user: SignedInUser,
    surveyId: string,
    request: PutShortlistRequest,
    ifMatch: string | undefined,
  ): Promise<Shortlist> {
    await this.access.survey(user, surveyId, 'lead');
    const run = await this.runs.get(user, request.runId);
    if (run.surveyId !== surveyId) throw new AppError('NOT_FOUND', 'There is no such run in this survey.');
    if (run.state !== 'done')
      throw new AppError('NOT_READY', `Run ${run.number} is ${run.state}; a shortlist needs a finished run.`);
    const ids = request.entries.map((entry) => entry.detectionId);
    if (new Set(ids).size !== ids.length)
      throw new AppError('VALIDATION_FAILED', 'A detection is on the list twice.', [
        { pointer: '/entries', detail: 'each detection once' },
      ]);
    const items = await this.verdicts.items(request.runId, ids);
    const missing = ids.findIndex((id) => !items.has(id));
    if (missing >= 0) {
      throw new AppError('VALIDATION_FAILED', `Entry ${missing + 1} has no verdict in run ${run.number}.`, [
        { pointer: `/entries/${missing}/detectionId`, detail: 'not in this run' },
      ]);
    }
    const seen = await this.get(user, surveyId);
    await this.#refuseUnsettled(ids, seen, items);
    requireMatch(ifMatch, seen.version, seen);
    const stood = await this.shortlists.transaction(async (tx) => {
      const version = await this.shortlists.lock(surveyId, tx);
      if (ifMatch !== undefined && version !== seen.version) return false;
      await this.shortlists.advance(surveyId, request.runId, tx);
      await this.shortlists.replaceEntries(surveyId, request.entries, tx);
      const names = ids.map((id) => items.get(id)!.name);
      const subject = `${ids.length} ${ids.length === 1 ? 'detection' : 'detections'} of run ${run.number}`;
      const entry = { surveyId, actor: user, action: 'changed the shortlist', subject };
      await this.ledger.append({ ...entry, detail: { runId: request.runId, names } }, tx);
      return true;
    });
    // Someone was quicker between the look and the lock.
    if (!stood) requireMatch(ifMatch, '', await this.get(user, surveyId));
    return this.get(user, surveyId);
  }

  /** What is on the list already may stay and be moved; freezing an edition looks at it again. */
  async #refuseUnsettled(
    ids: readonly string[],
    seen: Shortlist,
    items: ReadonlyMap<string, { name: string }>,
  ): Promise<void> {
    const there = new Set(seen.entries.map((entry) => entry.detectionId));
    const settled = await this.#settled(ids);
    const refused = ids.flatMap((id, i) => {
      const why = there.has(id) ? null : notReady(settled.get(id));
      return why === null ? [] : [{ pointer: `/entries/${i}/detectionId`, detail: `${items.get(id)!.name}: ${why}` }];
    });
    if (refused.length === 0) return;
    const first = refused[0]!.detail;
    const more = refused.length > 1 ? ` (and ${refused.length - 1} more)` : '';
    throw new AppError('NOT_READY', `The shortlist takes settled detections. ${first}${more}.`, refused);
  }

  async #settled(detectionIds: readonly string[]) {
    return new Map((await this.shortlists.settled({ detectionIds })).map((row) => [row.detectionId, row]));
  }
}
