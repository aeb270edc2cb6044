import type { Account, Storage } from '@eremite/shared/contracts/admin';
import type { List, ListQuery } from '@eremite/shared/contracts/list';
import { Inject, Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { offsetOf, pageByOffset } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { ENV, type Env } from '../../config/env.ts';
import { JobsRepository } from '../../jobs/jobs.repository.ts';
import { toJob } from '../../jobs/to-job.ts';
import { FilesService } from '../files/files.service.ts';
import { AdminRepository } from './admin.repository.ts';

/** What administrators may do: accounts, jobs and storage, but no sight of a team's data. */
@Injectable()
export class AdminService {
  constructor(
    private readonly admin: AdminRepository,
    private readonly jobsTable: JobsRepository,
    private readonly files: FilesService,
    @Inject(ENV) private readonly env: Env,
  ) {}

  async accounts(user: SignedInUser, query: ListQuery): Promise<List<Account>> {
    this.#check(user);
    const offset = offsetOf(query.cursor);
    const { rows, total } = await this.admin.accounts(query.limit, offset);
    return pageByOffset(rows.map(toAccount), total, offset);
  }

  async setDisabled(user: SignedInUser, id: string, disabled: boolean): Promise<Account> {
    this.#check(user);
    if (id === user.id && disabled) throw new AppError('CONFLICT', 'You cannot disable your own account.');
    if (!(await this.admin.account(id))) throw new AppError('NOT_FOUND', 'There is no such account.');
    await this.admin.setDisabled(id, disabled);
    return toAccount((await this.admin.account(id))!);
  }

  async jobs(user: SignedInUser, query: ListQuery) {
    this.#check(user);
    const offset = offsetOf(query.cursor);
    const [rows, total] = await Promise.all([this.jobsTable.page(query.limit, offset), this.admin.countJobs()]);
    const items = rows.map((row) => ({
      ...toJob(row),
      attempts: row.attempts,
      createdAt: row.createdAt.toISOString(),
    }));
    return pageByOffset(items, total, offset);
  }

  async storage(user: SignedInUser): Promise<Storage> {
    this.#check(user);
    const [{ databaseBytes, tileBytes, ...counts }, files] = await Promise.all([
      this.admin.storage(),
      this.files.usage(),
    ]);
    const kind = this.env.databaseUrl ? 'postgresql' : 'built-in';
    return { database: { kind, bytes: databaseBytes }, files, ...counts, tiles: { bytes: tileBytes } };
  }

  #check(user: SignedInUser): void {
    if (!user.isAdministrator) throw new AppError('NOT_ALLOWED', 'Only administrators may do this.');
  }
}

function toAccount({ user, teams }: NonNullable<Awaited<ReturnType<AdminRepository['account']>>>): Account {
  return {
    id: user.id,
    email: user.email,
    name: user.name,
    isAdministrator: user.isAdministrator,
    disabled: user.disabledAt !== null,
    teams,
    createdAt: user.createdAt.toISOString(),
  };
}
