import type { List } from '@eremite/shared/contracts/list';
import type { evidenceQuery } from '@eremite/shared/contracts/run';
import type { Candidate, Neighbour } from '@eremite/shared/contracts/verdict';
import { Injectable } from '@nestjs/common';
import type { z } from 'zod';
import { AppError } from '../../common/app-error.ts';
import { decodeCursor, encodeCursor, isPlace } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { readCandidates, readNeighbours, type EvidenceCatalogue } from '../../scoring/evidence.ts';
import { CANDIDATE_COLUMNS, NEIGHBOUR_COLUMNS } from '../../edition/columns/evidence-columns.ts';
import { type TableAnswer, tableOf } from '../../edition/columns/table-column.ts';
import { RunsService } from './runs.service.ts';
import { VerdictsRepository } from './verdicts.repository.ts';

type Query = z.output<typeof evidenceQuery>;
type Which = 'candidates' | 'neighbours';
type Found<T> = T & { detectionId: string; detection: string };
/** Detections whose packed evidence is read at a time. */
const BATCH = 200;

/** The flat lists of all candidates or neighbours of a run. */
@Injectable()
export class EvidenceService {
  constructor(
    private readonly runs: RunsService,
    private readonly verdicts: VerdictsRepository,
  ) {}

  candidates(user: SignedInUser, runId: string, query: Query): Promise<List<Found<Omit<Candidate, 'override'>>>> {
    return this.#page(user, runId, 'candidates', readCandidates, query);
  }

  neighbours(user: SignedInUser, runId: string, query: Query): Promise<List<Found<Neighbour>>> {
    return this.#page(user, runId, 'neighbours', readNeighbours, query);
  }

  async #page<T>(
    user: SignedInUser,
    runId: string,
    which: Which,
    read: (packed: Uint8Array, tables: readonly EvidenceCatalogue[]) => T[],
    query: Query,
  ): Promise<List<Found<T>>> {
    const run = await this.runs.finished(user, runId);
    // A place is the position of a detection and how many of its entries were handed out.
    let [from, skip] = placeOf(query.cursor);
    const items: Found<T>[] = [];
    let ofOne = 0;
    for (let more = true; more;) {
      const rows = await this.verdicts.evidence(runId, which, { limit: BATCH, from }, query.detectionId);
      more = rows.length === BATCH;
      for (const { detectionId, name, position, packed } of rows) {
        const found = read(packed, run.inputs);
        ofOne = found.length;
        const taken = found.slice(skip, skip + query.limit - items.length);
        items.push(...taken.map((entry) => ({ detectionId, detection: name, ...entry })));
        [from, skip] = [position, skip + taken.length];
        if (skip < found.length) {
          const total = query.detectionId ? ofOne : (run.counts?.[which] ?? 0);
          return { items, total, nextCursor: encodeCursor([from, skip]) };
        }
        [from, skip] = [position + 1, 0];
      }
    }
    return { items, total: query.detectionId ? ofOne : (run.counts?.[which] ?? 0), nextCursor: null };
  }

  async #lines<T>(
    user: SignedInUser,
    runId: string,
    read: (packed: Uint8Array, tables: readonly EvidenceCatalogue[]) => T[],
    which: Which,
    detectionId?: string,
  ) {
    const run = await this.runs.finished(user, runId);
    const { verdicts } = this;
    async function* lines(): AsyncIterable<{ detection: string; entry: T }> {
      for (let from = 0; ;) {
        const rows = await verdicts.evidence(runId, which, { limit: BATCH, from }, detectionId);
        for (const row of rows) for (const entry of read(row.packed, run.inputs)) yield { detection: row.name, entry };
        if (rows.length < BATCH) return;
        from = rows.at(-1)!.position + 1;
      }
    }
    return { run, lines: lines() };
  }

  async candidateTable(user: SignedInUser, runId: string, detectionId?: string): Promise<TableAnswer> {
    const { run, lines } = await this.#lines(user, runId, readCandidates, 'candidates', detectionId);
    return tableOf(CANDIDATE_COLUMNS, lines, `Candidates of run ${run.number}`);
  }

  async neighbourTable(user: SignedInUser, runId: string, detectionId?: string): Promise<TableAnswer> {
    const { run, lines } = await this.#lines(user, runId, readNeighbours, 'neighbours', detectionId);
    return tableOf(NEIGHBOUR_COLUMNS, lines, `Neighbours of run ${run.number}`);
  }
}

/** @throws {AppError} VALIDATION_FAILED for a cursor of another list */
function placeOf(cursor: string | undefined): [position: number, skip: number] {
  const place = decodeCursor(cursor) ?? [0, 0];
  const [position, skip] = place;
  if (place.length === 2 && isPlace(position) && isPlace(skip)) return [position, skip];
  throw new AppError('VALIDATION_FAILED', 'The cursor is not one of this list; start again without it.');
}
