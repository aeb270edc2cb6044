import { createHash } from 'node:crypto';
import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import type { CreateRunRequest, Run, runDifference } from '@eremite/shared/contracts/run';
import { Injectable, type OnModuleInit } from '@nestjs/common';
import type { z } from 'zod';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { SurveyHooks } from '../../common/survey-hooks.ts';
import { JobsService } from '../../jobs/jobs.service.ts';
import { SCORING_VERSION } from '../../scoring/version.ts';
import { CriteriaService } from '../criteria/criteria.service.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { decisionChanges } from './decision-changes.ts';
import { changedKeys, compareVerdicts, type VerdictSummary } from './difference.ts';
import { RunInputs, type StoredDecisions } from './run-inputs.ts';
import { RunJob } from './run.job.ts';
import { type RunRow, RunsRepository } from './runs.repository.ts';
import { VerdictsRepository } from './verdicts.repository.ts';

/** Criteria applied to a stated set of tables: started here, done by {@link RunJob}. */
@Injectable()
export class RunsService implements OnModuleInit {
  constructor(
    private readonly runs: RunsRepository,
    private readonly verdicts: VerdictsRepository,
    private readonly criteria: CriteriaService,
    private readonly jobs: JobsService,
    private readonly work: RunJob,
    private readonly inputs: RunInputs,
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
    private readonly hooks: SurveyHooks,
  ) {}

  onModuleInit(): void {
    this.jobs.register(this.work);
  }

  async list(user: SignedInUser, surveyId: string, query: ListQuery): Promise<List<Run>> {
    await this.access.survey(user, surveyId, 'read');
    return pageOf((await this.runs.list(surveyId)).map(toRun), query);
  }

  async get(user: SignedInUser, id: string): Promise<Run> {
    const row = await this.runs.find(id);
    if (!row) throw new AppError('NOT_FOUND', 'There is no such run.');
    await this.access.survey(user, row.surveyId, 'read');
    return toRun(row);
  }

  /** A run whose results can be read: until it is done, what there is of them is staged and nobody's. */
  async finished(user: SignedInUser, id: string): Promise<Run> {
    const run = await this.get(user, id);
    if (run.state !== 'done') throw new AppError('NOT_READY', `Run ${run.number} is ${run.state}; it has no results.`);
    return run;
  }

  /** Whether a run of the survey is done, for those who have asked for access already. */
  async isDone(id: string, surveyId?: string): Promise<boolean> {
    const row = await this.runs.find(id);
    return row?.state === 'done' && (surveyId === undefined || row.surveyId === surveyId);
  }

  async latestDone(surveyId: string): Promise<Run | undefined> {
    const row = await this.runs.latestDone(surveyId);
    return row && toRun(row);
  }

  /** Fixes the inputs of a run as they stand and puts it on the queue. */
  async start(
    user: SignedInUser,
    surveyId: string,
    request: CreateRunRequest,
  ): Promise<{ runId: string; jobId: string }> {
    const { survey } = await this.access.survey(user, surveyId, 'lead');
    const criteria = await this.criteria.get(user, request.criteriaId);
    if (criteria.surveyId !== surveyId) throw new AppError('NOT_FOUND', 'There are no such criteria in this survey.');
    const tables = await this.runs.publishedCatalogues(surveyId, request.catalogueIds);
    if (request.catalogueIds && tables.length !== new Set(request.catalogueIds).size) {
      throw new AppError('NOT_FOUND', 'Some of these catalogues are not published in this survey.', [
        { pointer: '/catalogueIds', detail: 'unknown catalogue' },
      ]);
    }
    if (!tables.some((table) => table.kind === 'hi')) {
      throw new AppError(
        'NO_DETECTIONS',
        'Publish a table of HI detections first; a run has nothing to judge without one.',
      );
    }
    const inputs = tables.map(({ id, name, kind, rows, contentHash }) => ({
      catalogueId: id,
      name,
      kind,
      rows,
      sha256: contentHash,
    }));
    await this.hooks.runStarting(surveyId);
    const decisions = await this.inputs.decisionsNow(survey, tables);
    const inputHash = hashOf({
      criteria: criteria.settings,
      inputs: inputs.map((input) => input.sha256),
      decisions,
      version: SCORING_VERSION,
    });
    const { runId, jobId } = await this.runs.transaction(async (tx) => {
      const row = {
        surveyId,
        criteriaId: criteria.id,
        inputs,
        inputHash,
        decisions,
        codeVersion: SCORING_VERSION,
        createdBy: user.id,
      };
      const { id: runId, number } = await this.runs.insert(row, tx);
      const jobId = await this.jobs.add('run', { runId }, { surveyId, userId: user.id }, tx);
      await this.runs.update(runId, { jobId }, tx);
      const detail = { runId, criteriaId: criteria.id, inputs, inputHash };
      await this.ledger.append(
        {
          surveyId,
          actor: user,
          action: 'started a run',
          subject: `run ${number}, criteria ${criteria.number}`,
          detail,
        },
        tx,
      );
      return { runId, jobId };
    });
    await this.jobs.release(jobId);
    return { runId, jobId };
  }

  async difference(user: SignedInUser, id: string, fromId: string): Promise<z.output<typeof runDifference>> {
    const [to, from] = [await this.finished(user, id), await this.finished(user, fromId)];
    if (to.surveyId !== from.surveyId) throw new AppError('NOT_FOUND', 'The two runs are of different surveys.');
    const settings = async (run: Run) => (await this.criteria.get(user, run.criteriaId)).settings as CriteriaSettings;
    const summaries = async (run: Run) => (await this.verdicts.summary(run.id)) as VerdictSummary[];
    const inputsChanged = changedInputs(from.inputs, to.inputs);
    const criteriaChanged = changedKeys(await settings(from), await settings(to));
    const decisionsChanged = await this.#decisionsChanged(from.id, to.id);
    const ofAll = [
      ...criteriaChanged.map(({ key }) => `criterion ${key}`),
      ...inputsChanged.map((change) => `table ${change}`),
      ...decisionsChanged.filter(({ detectionId }) => detectionId === null).map(({ change }) => change),
    ];
    const own = new Map<string, string[]>();
    for (const { detectionId, change } of decisionsChanged)
      if (detectionId) own.set(detectionId, [...(own.get(detectionId) ?? []), change]);
    // What was changed for one detection moves the others only through what the run learns from the survey.
    const learnt = ofAll.length === 0 && own.size > 0 ? ['words on other detections, through what the run learnt'] : [];
    const causesOf = (id: string) => [...(own.get(id) ?? []), ...(ofAll.length > 0 || own.has(id) ? ofAll : learnt)];
    return {
      from: { id: from.id, number: from.number },
      to: { id: to.id, number: to.number },
      criteriaChanged,
      inputsChanged,
      decisionsChanged,
      ...compareVerdicts(await summaries(from), await summaries(to), causesOf),
    };
  }

  async #decisionsChanged(fromId: string, toId: string): Promise<z.output<typeof runDifference>['decisionsChanged']> {
    const [from, to] = [(await this.runs.find(fromId))!, (await this.runs.find(toId))!];
    const changes = decisionChanges(from.decisions as StoredDecisions, to.decisions as StoredDecisions);
    const lists = [...new Set(changes.flatMap(({ catalogueId }) => catalogueId ?? []))];
    const rows = lists.length > 0 ? await this.runs.detectionIds(lists) : [];
    const found = new Map(rows.map((row) => [`${row.catalogueId}/${row.row}`, row]));
    return changes.map(({ catalogueId, row, change }) => {
      const detection = found.get(`${catalogueId}/${row}`);
      return { detectionId: detection?.id ?? null, name: detection?.name ?? '', change };
    });
  }
}

type Inputs = Run['inputs'];
/** Tables that only one of two runs read, by their content. */
function changedInputs(from: Inputs, to: Inputs): string[] {
  const before = new Map(from.map((input) => [input.sha256, input.name]));
  const after = new Map(to.map((input) => [input.sha256, input.name]));
  return [
    ...[...after].filter(([hash]) => !before.has(hash)).map(([, name]) => `new: ${name}`),
    ...[...before].filter(([hash]) => !after.has(hash)).map(([, name]) => `gone: ${name}`),
  ];
}

function hashOf(value: unknown): string {
  return createHash('sha256').update(JSON.stringify(value)).digest('hex');
}

function toRun(row: RunRow): Run {
  const { criteriaSettings: _, decisions: __, createdById: ___, learnt: ____, ...shown } = row;
  const { startedAt, finishedAt, createdAt, ...rest } = shown;
  return {
    ...rest,
    createdAt: createdAt.toISOString(),
    finishedAt: finishedAt?.toISOString() ?? null,
    seconds: startedAt && finishedAt ? (finishedAt.getTime() - startedAt.getTime()) / 1000 : null,
  } as Run;
}
