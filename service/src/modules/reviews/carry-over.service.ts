import type { Moved } from '@eremite/shared/contracts/evidence-moved';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { Injectable, type OnModuleInit } from '@nestjs/common';
import { type FinishingRun, SurveyHooks } from '../../common/survey-hooks.ts';
import type { Database } from '../../database/database.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { CarryOverRepository, type NewReview } from './carry-over.repository.ts';
import { evidenceMoved } from './evidence-moved.ts';

type Run = { id: string; number: number };
type Word = { detectionId: string; runId: string };
const GONE: Moved = { what: 'detection', from: 'in the list', to: 'not in this run', by: null, unit: '' };

/**
 * After a run: words whose evidence stands are carried into it, words whose evidence moved come back, marked with what moved.
 * The comparison is always with the run the word was given on, so that small moves do not add up unseen.
 */
@Injectable()
export class CarryOverService implements OnModuleInit {
  constructor(
    private readonly carrying: CarryOverRepository,
    private readonly hooks: SurveyHooks,
    private readonly ledger: LedgerService,
  ) {}

  onModuleInit(): void {
    this.hooks.onRunFinishing((run, tx) => this.#afterRun(run, tx));
  }

  async #afterRun(run: FinishingRun, tx: Database): Promise<void> {
    const { surveyId } = run;
    const words = await this.#reviews(surveyId, run, undefined, tx);
    const settled = await this.#settlements(surveyId, run, undefined, tx);
    const kept = words.kept + settled.kept;
    const returned = words.returned + settled.returned;
    if (kept + returned === 0) return;
    await this.ledger.append(
      {
        surveyId,
        actor: run.actor,
        action: 'carried decisions over',
        subject: `run ${run.number}: ${kept} kept, ${returned} came back`,
        detail: { runId: run.id, reviews: words, settlements: settled },
      },
      tx,
    );
  }

  /** A word given on a run that is not the latest any more is held to the latest at once. */
  async catchUp(surveyId: string, reviewId: string, tx: Database): Promise<void> {
    const run = await this.carrying.latestDone(surveyId, tx);
    if (run) await this.#reviews(surveyId, run, reviewId, tx);
  }

  async catchUpSettlement(surveyId: string, settlementId: string, tx: Database): Promise<void> {
    const run = await this.carrying.latestDone(surveyId, tx);
    if (run) await this.#settlements(surveyId, run, settlementId, tx);
  }

  async #reviews(surveyId: string, run: Run, only: string | undefined, tx: Database) {
    const words = (await this.carrying.lastWords(surveyId, only, tx)).filter((word) => word.runId !== run.id);
    const compare = await this.#comparison(surveyId, run, words, tx);
    const kept: NewReview[] = [];
    const back: Parameters<CarryOverRepository['giveBack']>[0] = [];
    for (const { id, ...word } of words) {
      const { detectionId, moved } = compare(word);
      if (detectionId === null) continue;
      if (moved.length === 0) kept.push({ ...word, detectionId, runId: run.id, carriedFrom: id, blind: false });
      else back.push({ runId: run.id, detectionId, reviewerId: word.reviewerId, reviewId: id, moved });
    }
    await this.carrying.carry(kept, tx);
    await this.carrying.giveBack(back, tx);
    return { kept: kept.length, returned: back.length };
  }

  async #settlements(surveyId: string, run: Run, only: string | undefined, tx: Database) {
    const rows = (await this.carrying.settled(surveyId, only, tx)).map(({ settlement }) => settlement);
    const given = await Promise.all(
      rows.map(async (row) => {
        const root = row.carriedFrom ? await this.carrying.settlementById(row.carriedFrom, tx) : row;
        return { row, detectionId: (root ?? row).detectionId, runId: row.runId };
      }),
    );
    const compare = await this.#comparison(surveyId, run, given, tx);
    const count = { kept: 0, returned: 0 };
    for (const { row, ...word } of given) {
      const { detectionId, moved } = compare(word);
      if (detectionId === null) continue;
      count[moved.length === 0 ? 'kept' : 'returned'] += 1;
      if (row.detectionId === detectionId) await this.carrying.markSettlement(row.id, moved, tx);
      else if (row.carriedFrom === null) {
        const { id, createdAt, settledBy, starlight, surroundings, outcome, note, runId } = row;
        const said = { createdAt, settledBy, starlight, surroundings, outcome, note, runId };
        const marked = { moved: moved.length > 0 ? moved : null, carriedFrom: id };
        await this.carrying.settleSuccessor({ ...said, ...marked, detectionId }, tx);
      }
    }
    return count;
  }

  /** Reads both sides of all words at once; answers where each word belongs in the run and what moved under it. */
  async #comparison(surveyId: string, run: Run, words: readonly Word[], tx: Database) {
    const successors = words.length > 0 ? await this.carrying.successors(surveyId, tx) : new Map<string, string>();
    const now = (id: string): string => {
      let last = id;
      for (let next = successors.get(last); next !== undefined; next = successors.get(last)) last = next;
      return last;
    };
    const given = new Map<string, Map<string, VerdictItem>>();
    for (const runId of new Set(words.map((word) => word.runId))) {
      const ids = words.filter((word) => word.runId === runId).map((word) => word.detectionId);
      given.set(runId, await this.carrying.items(runId, ids, tx));
    }
    const targets = new Set(words.flatMap(({ detectionId }) => [detectionId, now(detectionId)]));
    const found = await this.carrying.items(run.id, [...targets], tx);
    return ({ detectionId, runId }: Word): { detectionId: string | null; moved: Moved[] } => {
      const target = found.has(detectionId) ? detectionId : now(detectionId);
      const from = given.get(runId)?.get(detectionId);
      const to = found.get(target);
      // A detection of another list than this run read: nothing is said of it either way.
      if (!to) return { detectionId: null, moved: [GONE] };
      return { detectionId: target, moved: from ? evidenceMoved(from, to) : [GONE] };
    };
  }
}
