import {
  ledgerEntry,
  ledgerExportQuery,
  ledgerFacets,
  ledgerQuery,
  ledgerVerification,
  type LedgerExportQuery,
  type LedgerQuery,
} from '@eremite/shared/contracts/ledger';
import { listOf } from '@eremite/shared/contracts/list';
import { Controller, Get, Headers, Param, Query, Res, SerializeOptions } from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { AccessService } from '../../common/access.ts';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { sendPieces } from '../runs/send-table.ts';
import { ledgerCsv, ledgerJsonLines } from './ledger-file.ts';
import { LedgerFeed } from './ledger-feed.ts';
import { LedgerRepository } from './ledger.repository.ts';
import { LedgerService } from './ledger.service.ts';
import { streamEvents } from './stream-events.ts';

const inSurvey = { schema: z.uuid() };
const eventsQuery = z.object({ after: z.coerce.number().int().min(0).optional() });

@Controller('surveys/:surveyId')
export class LedgerController {
  constructor(
    private readonly access: AccessService,
    private readonly ledger: LedgerService,
    private readonly lines: LedgerRepository,
    private readonly feed: LedgerFeed,
  ) {}

  @Get('ledger')
  @SerializeOptions({ schema: listOf(ledgerEntry) })
  async list(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', inSurvey) surveyId: string,
    @Query({ schema: ledgerQuery }) query: LedgerQuery,
  ) {
    return this.ledger.list(surveyId, query, await this.blindTo(user, surveyId));
  }

  @Get('ledger/verification')
  @SerializeOptions({ schema: ledgerVerification })
  async verify(@CurrentUser() user: SignedInUser, @Param('surveyId', inSurvey) surveyId: string) {
    await this.access.survey(user, surveyId, 'read');
    return this.ledger.verify(surveyId);
  }

  /** Who and what there is to filter by. */
  @Get('ledger/facets')
  @SerializeOptions({ schema: ledgerFacets })
  async facets(@CurrentUser() user: SignedInUser, @Param('surveyId', inSurvey) surveyId: string) {
    return this.ledger.facets(surveyId, await this.blindTo(user, surveyId));
  }

  /** The lines as a file. A reviewer's leaves out what others' reviews came to, so that its hashes cannot all be checked. */
  @Get('ledger/export')
  async export(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', inSurvey) surveyId: string,
    @Query({ schema: ledgerExportQuery }) query: LedgerExportQuery,
    @Res() response: Response,
  ): Promise<void> {
    const lines = this.ledger.whole(surveyId, query, await this.blindTo(user, surveyId));
    const isCsv = query.format === 'csv';
    const file = {
      type: isCsv ? 'text/csv; charset=utf-8' : 'application/jsonl; charset=utf-8',
      fileName: `ledger.${query.format}`,
    };
    await sendPieces(response, file, isCsv ? ledgerCsv(lines) : ledgerJsonLines(lines));
  }

  /** What is done in the survey, as it is done: server-sent events, which go on from `Last-Event-ID` or `after`. */
  @Get('events')
  async events(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', inSurvey) surveyId: string,
    @Query({ schema: eventsQuery }) query: z.output<typeof eventsQuery>,
    @Res() response: Response,
    @Headers('last-event-id') lastEventId?: string,
  ): Promise<void> {
    const isBlind = (await this.blindTo(user, surveyId)) !== undefined;
    const last = /^\d{1,9}$/.test(lastEventId ?? '') ? Number(lastEventId) : query.after;
    const isOpen = () =>
      this.access.survey(user, surveyId, 'read').then(
        () => true,
        () => false,
      );
    await streamEvents(
      { lines: this.lines, feed: this.feed },
      { surveyId, after: last, isBlind, isOpen },
      user,
      response,
    );
  }

  /** The account where it is one from whom others' reviews are kept back. */
  private async blindTo(user: SignedInUser, surveyId: string): Promise<string | undefined> {
    const { role } = await this.access.survey(user, surveyId, 'read');
    return role === 'reviewer' ? user.id : undefined;
  }
}
