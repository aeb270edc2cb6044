import type { CreateEditionRequest, EditionReview } from '@eremite/shared/contracts/edition';
import type { Run } from '@eremite/shared/contracts/run';
import type { Shortlist } from '@eremite/shared/contracts/shortlist';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { requireMatch } from '../../common/etag.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import type { Database } from '../../database/database.ts';
import type { EditionHead, EditionWords } from '../../edition/edition-head.ts';
import { SOFTWARE_VERSION } from '../../edition/software-version.ts';
import { JobsService } from '../../jobs/jobs.service.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { engineDecisions, type StoredDecisions } from '../runs/run-inputs.ts';
import { ShortlistsRepository } from '../shortlists/shortlists.repository.ts';
import { ShortlistsService } from '../shortlists/shortlists.service.ts';
import { EditionsRepository } from './editions.repository.ts';
import { PACK_EDITION } from './pack-edition.job.ts';
import { SaidRepository } from './said.repository.ts';

interface SurveyFacts {
  id: string;
  name: string;
  description: string;
  h0: number;
  omegaM: number;
}

/** Freezes a shortlist: one transaction takes down everything it stands on, then a job packs the archive. */
@Injectable()
export class EditionFreezer {
  constructor(
    private readonly editions: EditionsRepository,
    private readonly shortlists: ShortlistsService,
    private readonly settlements: ShortlistsRepository,
    private readonly said: SaidRepository,
    private readonly jobs: JobsService,
    private readonly ledger: LedgerService,
  ) {}

  async freeze(
    user: SignedInUser,
    survey: SurveyFacts,
    { note }: CreateEditionRequest,
    ifMatch: string | undefined,
  ): Promise<string> {
    const list = await this.shortlists.get(user, survey.id);
    requireMatch(ifMatch, list.version, list);
    refuseUnready(list);
    const { editionId, jobId } = await this.editions.transaction(async (tx) => {
      await this.editions.lockSurvey(survey.id, tx);
      // Whoever changes the list locks it as well, so that what is taken down is what was looked at.
      const version = await this.settlements.lock(survey.id, tx);
      if (version !== list.version) throw new AppError('CHANGED_MEANWHILE', 'The shortlist was changed a moment ago.');
      const earlier = await this.editions.numbers(survey.id, tx);
      const last = earlier.filter(({ state }) => state === 'frozen').at(-1);
      const number = (earlier.at(-1)?.number ?? 0) + 1;
      const head = await this.#head(user, survey, list.runId!, { number, note, supersedes: last?.number ?? null }, tx);
      const editionId = await this.editions.insert(
        {
          surveyId: survey.id,
          number,
          runId: list.runId!,
          note,
          head,
          supersedesId: last?.id ?? null,
          createdBy: user.id,
          createdAt: new Date(head.frozenAt),
        },
        tx,
      );
      const words = await this.#words(list, tx);
      await this.editions.insertEntries(
        list.entries.map(({ rank, detectionId }, i) => ({ editionId, rank, detectionId, words: words[i]! })),
        tx,
      );
      const jobId = await this.jobs.add(PACK_EDITION, { editionId }, { surveyId: survey.id, userId: user.id }, tx);
      await this.editions.setJob(editionId, jobId, tx);
      await this.ledger.append(
        {
          surveyId: survey.id,
          actor: user,
          action: 'froze an edition',
          subject: `edition ${number}, ${list.entries.length} of run ${list.runNumber}`,
          note,
          detail: { editionId, runId: list.runId, inputHash: head.run.inputHash, ledgerHead: head.ledgerHead },
        },
        tx,
      );
      return { editionId, jobId };
    });
    await this.jobs.release(jobId);
    return editionId;
  }

  async #head(
    user: SignedInUser,
    { id, name, description, h0, omegaM }: SurveyFacts,
    runId: string,
    edition: Pick<EditionHead, 'number' | 'note' | 'supersedes'>,
    tx: Database,
  ): Promise<EditionHead> {
    const run = (await this.editions.run(runId, tx))!;
    const inputs = run.inputs as Run['inputs'];
    const tables = await this.editions.tables(
      inputs.map(({ catalogueId }) => catalogueId),
      tx,
    );
    const decisions = run.decisions as StoredDecisions;
    return {
      ...edition,
      survey: {
        id,
        name,
        description,
        team: await this.editions.teamName(id, tx),
        cosmology: decisions.cosmology ?? { h0, omegaM },
      },
      frozenBy: user.name,
      frozenAt: new Date().toISOString(),
      criteria: {
        id: run.criteriaId,
        number: run.criteriaNumber,
        note: run.criteriaNote,
        settings: run.criteriaSettings as EditionHead['criteria']['settings'],
      },
      run: {
        id: runId,
        number: run.number,
        inputHash: run.inputHash,
        notes: run.notes as string[],
        control: run.control as Run['control'],
        detections: (run.counts as Run['counts'])?.detections ?? 0,
        scoringVersion: run.codeVersion,
        startedBy: run.startedBy,
      },
      decisions: engineDecisions(decisions).decisions,
      inputs: inputs.map(({ catalogueId }) => {
        const table = tables.get(catalogueId);
        if (!table) throw new AppError('NOT_READY', 'The upload of one of the tables of the run is gone.');
        const { fileName, kind, rows, sha256, contentHash, reference, withVelocity } = table;
        const settings = table.settings as EditionHead['inputs'][number]['settings'];
        return {
          catalogueId,
          name: table.name,
          kind,
          fileName,
          rows,
          sha256,
          contentHash,
          reference,
          settings,
          withVelocity,
        };
      }),
      ledgerHead: await this.editions.ledgerHead(id, tx),
      software: { version: SOFTWARE_VERSION, node: process.version },
    };
  }

  async #words({ entries }: Shortlist, tx: Database): Promise<EditionWords[]> {
    const words: EditionWords[] = [];
    for (let from = 0; from < entries.length; from += 1000) {
      const some = entries.slice(from, from + 1000);
      const ids = some.map(({ detectionId }) => detectionId);
      const settled = new Map(
        (await this.settlements.settled({ detectionIds: ids }, tx)).map((row) => [row.detectionId, row]),
      );
      const reviews = await this.said.reviews(ids, tx);
      const overrides = await this.said.overrides(ids, tx);
      const doubts = await this.said.doubtWords(ids, tx);
      for (const { detectionId, reason, nullResult } of some) {
        const { at, moved: _, detectionId: __, ...word } = settled.get(detectionId)!;
        const last = { as: 'settled', ...word, at: at.toISOString() } as EditionReview;
        words.push({
          reason,
          nullResult,
          said: [last, ...(reviews.get(detectionId) ?? [])],
          overrides: overrides.get(detectionId) ?? [],
          doubtWords: doubts.get(detectionId) ?? [],
        });
      }
    }
    return words;
  }
}

/** @throws {AppError} NOT_READY naming every entry that may not be handed on, and why */
function refuseUnready({ entries, runId }: Shortlist): void {
  if (!runId || entries.length === 0)
    throw new AppError('NOT_READY', 'The shortlist is empty: there is nothing to freeze.');
  const refused = entries.flatMap(({ verdict, notReady }, i) => {
    const why = verdict ? notReady : 'it has no verdict in the run of the shortlist';
    return why === null ? [] : [{ pointer: `/entries/${i}`, detail: `${verdict?.name ?? `entry ${i + 1}`}: ${why}` }];
  });
  if (refused.length === 0) return;
  const more = refused.length > 1 ? ` (and ${refused.length - 1} more)` : '';
  throw new AppError('NOT_READY', `An edition takes settled detections. ${refused[0]!.detail}${more}.`, refused);
}
