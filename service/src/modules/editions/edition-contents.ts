import type { EditionTable } from '@eremite/shared/contracts/edition';
import type { VerdictDetail, VerdictItem } from '@eremite/shared/contracts/verdict';
import { Injectable } from '@nestjs/common';
import {
  CANDIDATE_COLUMNS,
  DOUBT_COLUMNS,
  type EvidenceLine,
  GROUND_COLUMNS,
  LIMIT_COLUMNS,
  NEIGHBOUR_COLUMNS,
} from '../../edition/columns/evidence-columns.ts';
import { type TableAnswer, tableOf } from '../../edition/columns/table-column.ts';
import { SHORTLIST_COLUMNS, type VerdictLine } from '../../edition/columns/verdict-columns.ts';
import { OVERRIDE_COLUMNS, REVIEW_COLUMNS } from '../../edition/columns/word-columns.ts';
import type { EditionHead, EditionWords } from '../../edition/edition-head.ts';
import { priorityOf } from '../../edition/priority-of.ts';
import { readCandidates, readNeighbours } from '../../scoring/evidence.ts';
import { type EditionRow, EditionsRepository } from './editions.repository.ts';

type Row = Awaited<ReturnType<EditionsRepository['block']>>[number];

/** One detection of an edition: what the run found, with what people had said when it was frozen. */
export interface EditionLine {
  rank: number;
  detectionId: string;
  item: VerdictItem;
  words: EditionWords;
  /** Without candidates and neighbours. */
  detail: Omit<VerdictDetail, 'verdict' | 'candidates' | 'neighbours'>;
}

/** Reads editions: the run's part never changes, people's part was frozen. */
@Injectable()
export class EditionContents {
  constructor(private readonly editions: EditionsRepository) {}

  /** Entries in order, a block at a time. */
  async *lines({ id, runId, head }: EditionRow): AsyncIterable<EditionLine> {
    for (let after = 0; ;) {
      const rows = await this.editions.block(id, runId, after);
      for (const row of rows) yield lineOf(row, runId, head as EditionHead);
      if (rows.length === 0) return;
      after = rows.at(-1)!.rank;
    }
  }

  /** Everything behind one verdict of an edition; undefined where it is not on the list. */
  async detail({ id, runId, head }: EditionRow, detectionId: string): Promise<VerdictDetail | undefined> {
    const row = await this.editions.entry(id, runId, detectionId);
    return row && this.#whole(lineOf(row, runId, head as EditionHead), head as EditionHead);
  }

  /** The same of all entries, in order. */
  async *details(edition: EditionRow): AsyncIterable<{ line: EditionLine; detail: VerdictDetail }> {
    for await (const line of this.lines(edition)) {
      yield { line, detail: await this.#whole(line, edition.head as EditionHead) };
    }
  }

  async #whole({ item, detail, words, detectionId }: EditionLine, head: EditionHead): Promise<VerdictDetail> {
    const [packed] = await this.editions.evidence(head.run.id, [detectionId]);
    const inForce = words.overrides.filter(({ withdrawnAt }) => withdrawnAt === null);
    return {
      ...detail,
      verdict: item,
      candidates: readCandidates(packed!.candidates, head.inputs).map((candidate) => ({
        ...candidate,
        override:
          inForce.find((word) => word.catalogueId === candidate.catalogueId && word.rowId === candidate.rowId)
            ?.action ?? null,
      })),
      neighbours: readNeighbours(packed!.neighbours, head.inputs),
    };
  }

  /** One table of an edition. */
  table(edition: EditionRow, table: EditionTable): TableAnswer {
    const head = edition.head as EditionHead;
    const about = (what: string) =>
      `${what} of edition ${edition.number} of ${head.survey.name}, run ${head.run.number}`;
    const each = <T>(of: (line: EditionLine) => readonly T[]) => this.#each(edition, of);
    switch (table) {
      case 'shortlist':
        return tableOf(SHORTLIST_COLUMNS, verdictLines(this.lines(edition)), about('Shortlist'));
      case 'limits':
        return tableOf(
          LIMIT_COLUMNS,
          each(({ detail }) => detail.limits),
          about('Limits'),
        );
      case 'doubts':
        return tableOf(
          DOUBT_COLUMNS,
          each(({ detail }) => detail.doubts),
          about('Doubts'),
        );
      case 'grounds':
        return tableOf(
          GROUND_COLUMNS,
          each(({ item }) => item.grounds),
          about('Grounds'),
        );
      case 'overrides':
        return tableOf(
          OVERRIDE_COLUMNS,
          each(({ words }) => words.overrides),
          about('Overrides'),
        );
      case 'reviews':
        return tableOf(
          REVIEW_COLUMNS,
          each(({ words }) => words.said),
          about('Reviews'),
        );
      case 'candidates':
        return tableOf(CANDIDATE_COLUMNS, this.#packed(edition, 'candidates', readCandidates), about('Candidates'));
      case 'neighbours':
        return tableOf(NEIGHBOUR_COLUMNS, this.#packed(edition, 'neighbours', readNeighbours), about('Neighbours'));
    }
  }

  async *#each<T>(edition: EditionRow, of: (line: EditionLine) => readonly T[]): AsyncIterable<EvidenceLine<T>> {
    for await (const line of this.lines(edition)) {
      for (const entry of of(line)) yield { detection: line.item.name, entry };
    }
  }

  async *#packed<T>(
    { id, runId, head }: EditionRow,
    which: 'candidates' | 'neighbours',
    read: (packed: Uint8Array, tables: EditionHead['inputs']) => T[],
  ): AsyncIterable<EvidenceLine<T>> {
    const { inputs } = head as EditionHead;
    for (let after = 0; ;) {
      const rows = await this.editions.block(id, runId, after);
      if (rows.length === 0) return;
      const packed = await this.editions.evidence(
        runId,
        rows.map(({ detectionId }) => detectionId),
      );
      const found = new Map(packed.map((row) => [row.detectionId, row[which]]));
      for (const { detectionId, item } of rows) {
        for (const entry of read(found.get(detectionId)!, inputs)) {
          yield { detection: (item as VerdictItem).name, entry };
        }
      }
      after = rows.at(-1)!.rank;
    }
  }
}

export async function* verdictLines(lines: AsyncIterable<EditionLine>): AsyncIterable<VerdictLine> {
  for await (const { item, rank, words } of lines) {
    const { reason, nullResult } = words;
    yield { item, rank, reason, nullResult, priority: priorityOf(item).value };
  }
}

function lineOf(row: Row, runId: string, head: EditionHead): EditionLine {
  const words = row.words as EditionWords;
  const settled = words.said.find(({ as }) => as === 'settled');
  const item: VerdictItem = {
    ...(row.item as VerdictItem),
    settled: settled ? { ...settledWords(settled), stands: true } : null,
    reviews: words.said.filter(({ as }) => as === 'review').length,
    overrides: words.overrides.filter(({ withdrawnAt }) => withdrawnAt === null).length,
  };
  const detail = {
    ...(row.detail as EditionLine['detail']),
    runId,
    runNumber: head.run.number,
    criteriaNumber: head.criteria.number,
  };
  return { rank: row.rank, detectionId: row.detectionId, item, words, detail };
}

function settledWords({ starlight, surroundings, outcome, by, note }: EditionWords['said'][number]) {
  return { starlight, surroundings, outcome, by, note };
}
