import {
  observabilityAnswer,
  observabilityQuery,
  type ObservabilityQuery,
} from '@eremite/shared/contracts/observability';
import {
  putShortlistRequest,
  shortlist,
  shortlistProposal,
  shortlistRule,
  type PutShortlistRequest,
  type ShortlistRule,
} from '@eremite/shared/contracts/shortlist';
import {
  Body,
  Controller,
  Get,
  Headers,
  HttpCode,
  Param,
  Post,
  Put,
  Query,
  Res,
  SerializeOptions,
} from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { etagOf } from '../../common/etag.ts';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { observabilityOf } from '../../edition/observability/observability-of.ts';
import { TABLE_FORMATS } from '../../tables/writers/write-table.ts';
import { sendTable } from '../runs/send-table.ts';
import { verdictTable } from '../runs/verdict-columns.ts';
import { ProposalsService } from './proposals.service.ts';
import { ShortlistsService } from './shortlists.service.ts';

const formatQuery = z.object({
  format: z.enum(TABLE_FORMATS).default('csv'),
  units: z.enum(['yes', 'no']).default('no'),
});
const uuid = z.uuid();

@Controller('surveys/:surveyId/shortlist')
export class ShortlistsController {
  constructor(
    private readonly shortlists: ShortlistsService,
    private readonly proposals: ProposalsService,
  ) {}

  @Get()
  @SerializeOptions({ schema: shortlist })
  async get(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Res({ passthrough: true }) response: Response,
  ) {
    const list = await this.shortlists.get(user, surveyId);
    response.setHeader('ETag', etagOf(list.version));
    return list;
  }

  @Put()
  @SerializeOptions({ schema: shortlist })
  async put(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Body({ schema: putShortlistRequest }) request: PutShortlistRequest,
    @Headers('if-match') ifMatch: string | undefined,
    @Res({ passthrough: true }) response: Response,
  ) {
    const list = await this.shortlists.put(user, surveyId, request, ifMatch);
    response.setHeader('ETag', etagOf(list.version));
    return list;
  }

  /** What a rule would pick; nothing is changed. */
  @Post('proposals')
  @HttpCode(200)
  @SerializeOptions({ schema: shortlistProposal })
  propose(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Body({ schema: shortlistRule }) rule: ShortlistRule,
  ) {
    return this.proposals.propose(user, surveyId, rule);
  }

  @Get('observability')
  @SerializeOptions({ schema: observabilityAnswer })
  async observability(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Query({ schema: observabilityQuery }) query: ObservabilityQuery,
  ) {
    const { entries } = await this.shortlists.get(user, surveyId);
    return observabilityOf(
      entries.flatMap(({ verdict }) => (verdict ? [verdict] : [])),
      query,
    );
  }

  @Get('export')
  async export(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Query({ schema: formatQuery }) query: z.output<typeof formatQuery>,
    @Res() response: Response,
  ) {
    const list = await this.shortlists.get(user, surveyId);
    const table = verdictTable(
      list.entries.flatMap(({ verdict, priority, rank, reason, nullResult }) =>
        verdict ? [{ item: verdict, rank, reason, nullResult, priority: priority?.value ?? null }] : [],
      ),
      `Shortlist of run ${list.runNumber ?? 'none'}`,
      true,
    );
    await sendTable(response, query.format, 'shortlist', table, { unitsRow: query.units === 'yes' });
  }
}
