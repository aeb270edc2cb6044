import type { List } from '@eremite/shared/contracts/list';
import type { VerdictsQuery } from '@eremite/shared/contracts/run';
import type { Run } from '@eremite/shared/contracts/run';
import type { Doubt, VerdictDetail, VerdictItem } from '@eremite/shared/contracts/verdict';
import type { StarlightVerdict, SurroundingsVerdict } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { offsetOf, pageByOffset } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { readCandidates, readNeighbours } from '../../scoring/evidence.ts';
import { RunsService } from './runs.service.ts';
import type { VerdictFilter } from './verdict-filter.repository.ts';
import { VerdictsRepository } from './verdicts.repository.ts';
import type { VerdictLine } from '../../edition/columns/verdict-columns.ts';

/** Verdicts held at a time while exporting. */
const EXPORT_BLOCK = 500;
type Said = Awaited<ReturnType<VerdictsRepository['said']>>;

/** Reads what runs found, together with what people said of it since. */
@Injectable()
export class VerdictsService {
  constructor(
    private readonly verdicts: VerdictsRepository,
    private readonly runs: RunsService,
  ) {}

  async list(user: SignedInUser, runId: string, query: VerdictsQuery): Promise<List<VerdictItem>> {
    await this.runs.finished(user, runId);
    return this.page(runId, query, query);
  }

  async page(
    runId: string,
    filter: VerdictFilter,
    page: { limit: number; cursor?: string | undefined; sort?: string | undefined },
  ): Promise<List<VerdictItem>> {
    const offset = offsetOf(page.cursor);
    const [rows, total] = await Promise.all([
      this.verdicts.page(runId, filter, { sort: page.sort, limit: page.limit, offset }),
      this.verdicts.count(runId, filter),
    ]);
    const said = await this.verdicts.said(rows.map((row) => row.detectionId));
    return pageByOffset(
      rows.map((row) => withSaid(row.item as VerdictItem, row.detectionId, runId, said)),
      total,
      offset,
    );
  }

  /** Verdicts of a run in order, a block at a time, so that an export of any size streams. Only ids are held. */
  async *lines(runId: string, filter: VerdictFilter = {}, sort?: string): AsyncIterable<VerdictLine> {
    const ids = await this.verdicts.ids(runId, filter, sort);
    for (let from = 0; from < ids.length; from += EXPORT_BLOCK) {
      const block = ids.slice(from, from + EXPORT_BLOCK);
      const items = await this.items(runId, block);
      for (const id of block) yield { item: items.get(id)! };
    }
  }

  /** Items of some detections by id; those without a verdict in the run are absent. */
  async items(runId: string, detectionIds: readonly string[]): Promise<Map<string, VerdictItem>> {
    const found = new Map<string, VerdictItem>();
    for (let from = 0; from < detectionIds.length; from += 1000) {
      const ids = detectionIds.slice(from, from + 1000);
      const rows = await this.verdicts.page(runId, { detectionIds: ids }, { limit: ids.length, offset: 0 });
      const said = await this.verdicts.said(ids);
      for (const row of rows)
        found.set(row.detectionId, withSaid(row.item as VerdictItem, row.detectionId, runId, said));
    }
    return found;
  }

  /** The verdict as computed; undefined where the run has none, is not done, or is of another survey. */
  async computed(
    runId: string,
    detectionId: string,
    surveyId?: string,
  ): Promise<{ starlight: StarlightVerdict; surroundings: SurroundingsVerdict } | undefined> {
    if (!(await this.runs.isDone(runId, surveyId))) return undefined;
    const words = await this.verdicts.words(runId, detectionId);
    return words as { starlight: StarlightVerdict; surroundings: SurroundingsVerdict } | undefined;
  }

  /** The newest finished run of a survey. */
  latestRun(surveyId: string): Promise<Run | undefined> {
    return this.runs.latestDone(surveyId);
  }

  /** A doubt as a run judged it, whatever its grade. */
  async doubt(runId: string, detectionId: string, name: string): Promise<Doubt | undefined> {
    const row = await this.verdicts.find(runId, detectionId);
    return (row?.detail as VerdictDetail | undefined)?.doubts.find((doubt) => doubt.name === name);
  }

  /** Everything behind one verdict. */
  async detail(user: SignedInUser, runId: string, detectionId: string): Promise<VerdictDetail> {
    const run = await this.runs.finished(user, runId);
    const row = await this.verdicts.find(runId, detectionId);
    if (!row) throw new AppError('NOT_FOUND', 'That run has no verdict on this detection.');
    const said = await this.verdicts.said([detectionId]);
    const candidates = readCandidates(row.candidates, run.inputs).map((candidate) => {
      const word = said.overrides.find(
        (entry) => entry.catalogueId === candidate.catalogueId && entry.row === candidate.rowId,
      );
      return { ...candidate, override: (word?.action ?? null) as 'accept' | 'reject' | null };
    });
    return {
      ...(row.detail as Omit<
        VerdictDetail,
        'verdict' | 'candidates' | 'neighbours' | 'runId' | 'runNumber' | 'criteriaNumber'
      >),
      runId,
      runNumber: run.number,
      criteriaNumber: run.criteriaNumber,
      verdict: withSaid(row.item as VerdictItem, detectionId, runId, said),
      candidates,
      neighbours: readNeighbours(row.neighbours, run.inputs),
    };
  }
}

/** The stored item with what people said of the detection since. */
function withSaid(item: VerdictItem, detectionId: string, runId: string, said: Said): VerdictItem {
  const settled = said.settled.find((entry) => entry.detectionId === detectionId);
  return {
    ...item,
    settled: settled
      ? {
          starlight: settled.starlight as StarlightVerdict,
          surroundings: settled.surroundings as SurroundingsVerdict,
          outcome: settled.outcome,
          by: settled.by,
          note: settled.note,
          stands: settled.moved === null,
        }
      : null,
    reviews: said.reviews.filter((entry) => entry.detectionId === detectionId && entry.runId === runId).length,
    overrides: said.overrides.filter((entry) => entry.detectionId === detectionId).length,
  };
}
