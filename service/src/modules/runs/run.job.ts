import { Inject, Injectable } from '@nestjs/common';
import { ENV, type Env } from '../../config/env.ts';
import { type BulkColumn, BulkStore, type BulkType } from '../../database/bulk.ts';
import { JsonText } from '../../database/json-text.ts';
import { SurveyHooks } from '../../common/survey-hooks.ts';
import type { JobContext, JobHandler } from '../../jobs/job-handler.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { RunInputs } from './run-inputs.ts';
import type { StoredVerdict } from './run-messages.ts';
import { type RunOutcome, scoreInThreads } from './run-threads.ts';
import { type RunRow, RunsRepository } from './runs.repository.ts';

interface Payload {
  runId: string;
}
type Counts = { detections: number; starlight: Record<string, number>; surroundings: Record<string, number> };

/** Verdicts written in one go: other requests are served in between. */
const STORED_AT_ONCE = 100;
const VERDICT_COLUMNS = columns([
  ['run_id', 'uuid'],
  ['detection_id', 'uuid'],
  ['position', 'int4'],
  ['name', 'text'],
  ['ra_deg', 'float8'],
  ['dec_deg', 'float8'],
  ['velocity_kms', 'float8'],
  ['distance_mpc', 'float8'],
  ['log_hi_mass', 'float8'],
  ['starlight', 'text'],
  ['p_none', 'float8'],
  ['p_missed', 'float8'],
  ['p_spurious', 'float8'],
  ['power', 'float8'],
  ['surroundings', 'text'],
  ['p_alone', 'float8'],
  ['item', 'jsonb'],
  ['detail', 'jsonb'],
]);
const EVIDENCE_COLUMNS = columns([
  ['run_id', 'uuid'],
  ['detection_id', 'uuid'],
  ['candidates', 'bytea'],
  ['neighbours', 'bytea'],
]);

/**
 * Does a run: reads its tables, scores in a thread, stages verdicts and evidence, and makes them visible together with
 * the run's end in one transaction. A run that was interrupted starts again from nothing, since its inputs are fixed.
 */
@Injectable()
export class RunJob implements JobHandler<Payload, { runId: string }> {
  readonly kind = 'run';

  constructor(
    private readonly runs: RunsRepository,
    private readonly inputs: RunInputs,
    private readonly bulk: BulkStore,
    private readonly ledger: LedgerService,
    private readonly hooks: SurveyHooks,
    @Inject(ENV) private readonly env: Env,
  ) {}

  async run({ runId }: Payload, { signal, progress }: JobContext): Promise<{ runId: string }> {
    // Killed between the end of the run and the end of its job: what is done stays as it is.
    if (!(await this.runs.begin(runId))) return { runId };
    const run = (await this.runs.find(runId))!;
    const source = await this.inputs.open(run);
    const ids = new Map<string, string>();
    const lists = source.tables
      .filter(({ about }) => about.settings.kind === 'hi')
      .map(({ about }) => about.identity.id);
    for (const { id, catalogueId, row } of await this.runs.detectionIds(lists)) ids.set(`${catalogueId}/${row}`, id);
    const counts: Counts = { detections: 0, starlight: {}, surroundings: {} };
    const outcome = await scoreInThreads(source, {
      threads: this.env.threads,
      memoryBytes: this.env.runMemoryBytes,
      threadMemoryBytes: this.env.threadMemoryBytes,
      signal,
      progress: (fraction, message) => progress(fraction * 0.99, message),
      take: (verdicts) => this.#store(runId, verdicts, ids, counts),
    });
    signal.throwIfAborted();
    await this.#finish(run, { ...counts, ...outcome.totals }, outcome);
    return { runId };
  }

  async #store(runId: string, verdicts: StoredVerdict[], ids: Map<string, string>, counts: Counts): Promise<void> {
    for (let from = 0; from < verdicts.length; from += STORED_AT_ONCE) {
      const rows: unknown[][] = [];
      const evidence: unknown[][] = [];
      for (const verdict of verdicts.slice(from, from + STORED_AT_ONCE)) {
        const { facts, position, item, detail, candidates, neighbours } = verdict;
        const { starlight, surroundings } = facts;
        const detectionId = ids.get(`${verdict.catalogueId}/${verdict.row}`)!;
        counts.detections += 1;
        counts.starlight[starlight] = (counts.starlight[starlight] ?? 0) + 1;
        counts.surroundings[surroundings] = (counts.surroundings[surroundings] ?? 0) + 1;
        const head = `{"detectionId":"${detectionId}","settled":null,"reviews":0,"overrides":0,`;
        const place = [facts.name, facts.raDeg, facts.decDeg, facts.velocityKms, facts.distanceMpc, facts.logHiMass];
        const found = [starlight, facts.pNone, facts.pMissed, facts.pSpurious, facts.power, surroundings, facts.pAlone];
        const texts = [new JsonText(head + item.slice(1)), new JsonText(detail)];
        rows.push([runId, detectionId, position, ...place, ...found, ...texts]);
        evidence.push([runId, detectionId, candidates, neighbours]);
      }
      await this.bulk.copyInto('verdicts', VERDICT_COLUMNS, [rows]);
      await this.bulk.copyInto('evidence', EVIDENCE_COLUMNS, [evidence]);
    }
  }

  async #finish(run: RunRow, counts: object, { notes, control, learnt }: RunOutcome): Promise<void> {
    await this.runs.transaction(async (tx) => {
      await this.runs.update(run.id, { state: 'done', finishedAt: new Date(), counts, control, notes, learnt }, tx);
      const actor = { id: run.createdById, name: run.createdBy };
      await this.ledger.append(
        {
          surveyId: run.surveyId,
          actor,
          action: 'finished a run',
          subject: `run ${run.number}`,
          detail: { runId: run.id, counts },
        },
        tx,
      );
      await this.hooks.runFinishing({ id: run.id, surveyId: run.surveyId, number: run.number, actor }, tx);
    });
  }

  async recover({ runId }: Payload): Promise<void> {
    await this.runs.reopen(runId, { state: 'queued', startedAt: null });
  }

  async ended({ runId }: Payload, { state, error }: { state: 'failed' | 'cancelled'; error: string }): Promise<void> {
    await this.runs.reopen(runId, { state, error, finishedAt: new Date() });
  }
}

function columns(list: readonly [name: string, type: BulkType][]): BulkColumn[] {
  return list.map(([name, type]) => ({ name, type }));
}
