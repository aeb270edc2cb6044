import type {
  CreateEditionRequest,
  Edition,
  EditionDetail,
  EditionDifference,
} from '@eremite/shared/contracts/edition';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { EditionHead } from '../../edition/edition-head.ts';
import { methodsParagraph } from '../../edition/methods/write-methods.ts';
import { priorityOf } from '../../edition/priority-of.ts';
import { EditionContents } from './edition-contents.ts';
import { EditionFreezer } from './edition-freezer.ts';
import { differenceOfEditions } from './edition-difference.ts';
import { type EditionRow, EditionsRepository } from './editions.repository.ts';

/** Frozen, numbered shortlists. */
@Injectable()
export class EditionsService {
  constructor(
    private readonly editions: EditionsRepository,
    private readonly contents: EditionContents,
    private readonly freezer: EditionFreezer,
    private readonly access: AccessService,
  ) {}

  async list(user: SignedInUser, surveyId: string, query: ListQuery): Promise<List<Edition>> {
    await this.access.survey(user, surveyId, 'read');
    const rows = await this.editions.list(surveyId);
    return pageOf(
      rows.map((row) => toEdition(row, rows)),
      query,
    );
  }

  /** Freezes the shortlist as it stands. */
  async create(
    user: SignedInUser,
    surveyId: string,
    request: CreateEditionRequest,
    ifMatch: string | undefined,
  ): Promise<EditionDetail> {
    const { survey } = await this.access.survey(user, surveyId, 'lead');
    const id = await this.freezer.freeze(user, survey, request, ifMatch);
    return this.detail(await this.row(user, id));
  }

  async get(user: SignedInUser, id: string): Promise<EditionDetail> {
    return this.detail(await this.row(user, id));
  }

  /** The edition, for those who may read its survey. */
  async row(user: SignedInUser, id: string, need: 'read' | 'lead' = 'read'): Promise<EditionRow> {
    const row = await this.editions.find(id);
    if (!row) throw new AppError('NOT_FOUND', 'There is no such edition.');
    await this.access.survey(user, row.surveyId, need);
    return row;
  }

  /** The edition with its list, for whoever has been let in already. */
  async detail(row: EditionRow): Promise<EditionDetail> {
    const head = row.head as EditionHead;
    const list: EditionDetail['list'] = [];
    for await (const { rank, detectionId, item, words } of this.contents.lines(row)) {
      list.push({ rank, detectionId, ...words, priority: priorityOf(item).value, verdict: item });
    }
    return {
      ...toEdition(row, await this.editions.numbers(row.surveyId)),
      description: head.survey.description,
      cosmology: head.survey.cosmology,
      inputHash: head.run.inputHash,
      scoringVersion: head.run.scoringVersion,
      softwareVersion: head.software.version,
      inputs: head.inputs,
      ledgerHead: head.ledgerHead,
      methods: methodsParagraph(head, row.entries),
      list,
    };
  }

  async difference(user: SignedInUser, id: string, fromId: string): Promise<EditionDifference> {
    const [to, from] = [await this.row(user, id), await this.row(user, fromId)];
    if (to.surveyId !== from.surveyId) throw new AppError('NOT_FOUND', 'The two editions are of different surveys.');
    return differenceOfEditions(await this.#side(from), await this.#side(to));
  }

  async #side(row: EditionRow) {
    const lines = [];
    for await (const line of this.contents.lines(row)) lines.push(line);
    return { id: row.id, head: row.head as EditionHead, lines };
  }
}

type Numbered = Pick<EditionRow, 'id' | 'number' | 'state' | 'supersedesId'>;

export function toEdition(row: EditionRow, all: readonly Numbered[]): Edition {
  const head = row.head as EditionHead;
  const short = (found: Numbered | undefined) => (found ? { id: found.id, number: found.number } : null);
  const { id, surveyId, number, state, error, note, entries, createdBy, jobId, bytes, sha256 } = row;
  return {
    id,
    surveyId,
    surveyName: head.survey.name,
    number,
    state: state as Edition['state'],
    error,
    note,
    run: { id: row.runId, number: head.run.number },
    criteria: { id: head.criteria.id, number: head.criteria.number },
    entries,
    createdBy,
    createdAt: row.createdAt.toISOString(),
    supersedes: short(all.find((other) => other.id === row.supersedesId)),
    supersededBy: short(all.find((other) => other.supersedesId === id && other.state === 'frozen')),
    archive: sha256 && bytes !== null ? { bytes, sha256 } : null,
    jobId,
  };
}
