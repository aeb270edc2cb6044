import type { ListQuery } from '@eremite/shared/contracts/list';
import { Injectable } from '@nestjs/common';
import { AppError } from '../../common/app-error.ts';
import { offsetOf, pageByOffset } from '../../common/paging.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { MailRepository } from '../mail/mail.repository.ts';
import { TeamsRepository } from './teams.repository.ts';

/** Mails to be handed on by hand where no mail server is configured: leads see their teams', administrators all. */
@Injectable()
export class OutboxService {
  constructor(
    private readonly mails: MailRepository,
    private readonly teams: TeamsRepository,
  ) {}

  async list(user: SignedInUser, query: ListQuery) {
    // The mails hold links that make members: looking at them is more than looking.
    if (user.scope === 'read') throw new AppError('NOT_ALLOWED', 'A token that may only read does not see the outbox.');
    const offset = offsetOf(query.cursor);
    const whose = user.isAdministrator ? 'all' : await this.teams.ledBy(user.id);
    const { rows, total } = await this.mails.page(whose, query.limit, offset);
    const items = rows.map(({ id, to, subject, text, state, error, createdAt }) => ({
      id,
      to,
      subject,
      text,
      state,
      error,
      createdAt: createdAt.toISOString(),
    }));
    return pageByOffset(items, total, offset);
  }
}
