import { putShortlistRequest, shortlist, type PutShortlistRequest } from '@eremite/shared/contracts/shortlist';
import { Body, Controller, Get, Headers, Param, Put, Query, Res, SerializeOptions } from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { etagOf } from '../../common/etag.ts';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { sendTable } from '../runs/send-table.ts';
import { verdictTable } from '../runs/verdict-columns.ts';
import { ShortlistsService } from './shortlists.service.ts';

const formatQuery = z.object({ format: z.enum(['csv', 'votable']).default('csv') });
@Controller('surveys/:surveyId/shortlist')
export class ShortlistsController {
  constructor(private readonly shortlists: ShortlistsService) {}

  @Get()
  @SerializeOptions({ schema: shortlist })
  async get(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
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
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
    @Body({ schema: putShortlistRequest }) request: PutShortlistRequest,
    @Headers('if-match') ifMatch: string | undefined,
    @Res({ passthrough: true }) response: Response,
  ) {
    const list = await this.shortlists.put(user, surveyId, request, ifMatch);
    response.setHeader('ETag', etagOf(list.version));
    return list;
  }

  @Get('export')
  async export(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
    @Query({ schema: formatQuery }) query: { format: 'csv' | 'votable' },
    @Res() response: Response,
  ) {
    const list = await this.shortlists.get(user, surveyId);
    const table = verdictTable(
      list.entries.flatMap((entry) =>
        entry.verdict
          ? [{ item: entry.verdict, rank: entry.rank, reason: entry.reason, nullResult: entry.nullResult }]
          : [],
      ),
      `Shortlist of run ${list.runNumber ?? 'none'}`,
      true,
    );
    await sendTable(response, query.format, 'shortlist', table);
  }
}
