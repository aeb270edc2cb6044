import { createHash } from 'node:crypto';
import type { CreateSurveyRequest, Survey, UpdateSurveyRequest } from '@eremite/shared/contracts/survey';
import type { TeamRole } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { requireMatch } from '../../common/etag.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { type SurveyRow, SurveysRepository } from './surveys.repository.ts';

@Injectable()
export class SurveysService {
  constructor(
    private readonly surveys: SurveysRepository,
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
  ) {}

  async list(user: SignedInUser, deleted: boolean): Promise<Survey[]> {
    return this.#describe(await this.surveys.of(user.id, { deleted }));
  }

  async get(user: SignedInUser, surveyId: string): Promise<Survey> {
    await this.access.survey(user, surveyId, 'read');
    const [found] = await this.#describe(await this.surveys.of(user.id, { surveyId }));
    if (!found) throw new AppError('NOT_FOUND', 'There is no such survey.');
    return found;
  }

  async create(user: SignedInUser, request: CreateSurveyRequest): Promise<Survey> {
    await this.access.team(user, request.teamId, 'lead');
    const { teamId, name, description, cosmology } = request;
    const id = await this.surveys.db.transaction(async (tx) => {
      const row = await this.surveys.insert({ teamId, name, description, ...cosmology }, tx);
      await this.ledger.append(
        { surveyId: row.id, actor: user, action: 'survey created', subject: name, detail: { cosmology } },
        tx,
      );
      return row.id;
    });
    return this.get(user, id);
  }

  /** Versions of name, description and cosmology: what a change could overwrite. */
  version({ name, description, cosmology }: Pick<Survey, 'name' | 'description' | 'cosmology'>): string {
    const text = JSON.stringify([name, description, cosmology.h0, cosmology.omegaM]);
    return createHash('sha256').update(text).digest('hex').slice(0, 16);
  }

  async update(user: SignedInUser, surveyId: string, request: UpdateSurveyRequest, ifMatch?: string): Promise<Survey> {
    await this.access.survey(user, surveyId, 'lead');
    const seen = await this.get(user, surveyId);
    await this.surveys.db.transaction(async (tx) => {
      const row = await this.surveys.locked(surveyId, tx);
      if (!row || row.deletedAt) throw new AppError('NOT_FOUND', 'There is no such survey.');
      const before = describe(row);
      requireMatch(ifMatch, this.version(before), { ...seen, ...before });
      const after = { ...before, ...definedOf(request) };
      const { name, description, cosmology } = after;
      await this.surveys.update(surveyId, { name, description, ...cosmology }, tx);
      await this.ledger.append(
        { surveyId, actor: user, action: 'survey changed', subject: name, detail: { before, after } },
        tx,
      );
    });
    return this.get(user, surveyId);
  }

  /** Out of sight, with everything in it; {@link restore} brings it back. */
  async remove(user: SignedInUser, surveyId: string): Promise<void> {
    const { survey } = await this.access.survey(user, surveyId, 'lead');
    await this.surveys.db.transaction(async (tx) => {
      await this.surveys.update(surveyId, { deletedAt: new Date() }, tx);
      await this.ledger.append({ surveyId, actor: user, action: 'survey deleted', subject: survey.name }, tx);
    });
  }

  async restore(user: SignedInUser, surveyId: string): Promise<Survey> {
    const [found] = await this.surveys.of(user.id, { surveyId, deleted: true });
    if (!found) throw new AppError('NOT_FOUND', 'There is no such deleted survey.');
    await this.access.team(user, found.survey.teamId, 'lead');
    await this.surveys.db.transaction(async (tx) => {
      await this.surveys.update(surveyId, { deletedAt: null }, tx);
      await this.ledger.append({ surveyId, actor: user, action: 'survey restored', subject: found.survey.name }, tx);
    });
    return this.get(user, surveyId);
  }

  async #describe(found: Awaited<ReturnType<SurveysRepository['of']>>): Promise<Survey[]> {
    const runs = await this.surveys.latestRuns(found.map(({ survey }) => survey.id));
    const latest = new Map(runs.map(({ surveyId, ...run }) => [surveyId, run]));
    return found.map(({ survey, teamName, role, ...counts }) => {
      const run = latest.get(survey.id);
      return {
        id: survey.id,
        teamId: survey.teamId,
        teamName,
        role: role as TeamRole,
        ...describe(survey),
        createdAt: survey.createdAt.toISOString(),
        ...counts,
        latestRun: run ? { ...run, finishedAt: run.finishedAt?.toISOString() ?? null } : null,
      };
    });
  }
}

function describe({ name, description, h0, omegaM }: SurveyRow) {
  return { name, description, cosmology: { h0, omegaM } };
}

function definedOf<T extends object>(values: T): Partial<T> {
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined)) as Partial<T>;
}
