import { ledgerEntry } from '@eremite/shared/contracts/ledger';
import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import { Controller, Get, Param, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { AccessService } from '../../common/access.ts';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { LedgerService } from './ledger.service.ts';

const verification = z.object({ entries: z.int(), intact: z.boolean(), brokenAt: z.int().nullable() });

@Controller('surveys/:surveyId/ledger')
export class LedgerController {
  constructor(
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
  ) {}

  @Get()
  @SerializeOptions({ schema: listOf(ledgerEntry) })
  async list(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    const { role } = await this.access.survey(user, surveyId, 'read');
    return this.ledger.list(surveyId, query, role === 'reviewer' ? user.id : undefined);
  }

  @Get('verification')
  @SerializeOptions({ schema: verification })
  async verify(@CurrentUser() user: SignedInUser, @Param('surveyId', { schema: z.uuid() }) surveyId: string) {
    await this.access.survey(user, surveyId, 'read');
    return this.ledger.verify(surveyId);
  }
}
