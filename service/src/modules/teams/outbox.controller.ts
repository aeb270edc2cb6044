import { outboxMail } from '@eremite/shared/contracts/auth';
import { listOf, type ListQuery, listQuery } from '@eremite/shared/contracts/list';
import { Controller, Get, Query, SerializeOptions } from '@nestjs/common';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { OutboxService } from './outbox.service.ts';

@Controller('outbox')
export class OutboxController {
  constructor(private readonly outbox: OutboxService) {}

  @Get()
  @SerializeOptions({ schema: listOf(outboxMail) })
  list(@CurrentUser() user: SignedInUser, @Query({ schema: listQuery }) query: ListQuery) {
    return this.outbox.list(user, query);
  }
}
