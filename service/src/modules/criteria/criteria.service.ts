import type { Criteria, CreateCriteriaRequest } from '@eremite/shared/contracts/criteria';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import { pageOf } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { LedgerService } from '../ledger/ledger.service.ts';
import { CriteriaRepository } from './criteria.repository.ts';

type Row = NonNullable<Awaited<ReturnType<CriteriaRepository['find']>>>;
const toContract = (row: Row): Criteria => ({ ...row, createdAt: row.createdAt.toISOString() }) as Criteria;

@Injectable()
export class CriteriaService {
  constructor(
    private readonly criteria: CriteriaRepository,
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
  ) {}

  async list(user: SignedInUser, surveyId: string, query: ListQuery): Promise<List<Criteria>> {
    await this.access.survey(user, surveyId, 'read');
    return pageOf((await this.criteria.list(surveyId)).map(toContract), query);
  }

  async get(user: SignedInUser, id: string): Promise<Criteria> {
    const row = await this.criteria.find(id);
    if (!row) throw new AppError('NOT_FOUND');
    await this.access.survey(user, row.surveyId, 'read');
    return toContract(row);
  }

  async create(user: SignedInUser, surveyId: string, request: CreateCriteriaRequest): Promise<Criteria> {
    await this.access.survey(user, surveyId, 'lead');
    const id = await this.criteria.transaction(async (tx) => {
      const { id, number } = await this.criteria.insert({ surveyId, createdBy: user.id, ...request }, tx);
      const entry = {
        surveyId,
        actor: user,
        action: 'set criteria',
        subject: `criteria ${number}`,
        note: request.note,
      };
      await this.ledger.append({ ...entry, detail: { criteriaId: id, settings: request.settings } }, tx);
      return id;
    });
    return this.get(user, id);
  }
}
