import {
  createdGuestLink,
  createEditionRequest,
  createGuestLinkRequest,
  edition,
  EDITION_FORMATS,
  editionDetail,
  editionDifference,
  exportQuery,
  guestLink,
  type CreateEditionRequest,
  type CreateGuestLinkRequest,
  type EditionFormat,
  type ExportQuery,
} from '@eremite/shared/contracts/edition';
import { jobAccepted } from '@eremite/shared/contracts/job';
import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import {
  observabilityAnswer,
  observabilityQuery,
  type ObservabilityQuery,
} from '@eremite/shared/contracts/observability';
import { verdictDetail } from '@eremite/shared/contracts/verdict';
import {
  Body,
  Controller,
  Delete,
  Get,
  Headers,
  HttpCode,
  Param,
  Post,
  Query,
  Res,
  SerializeOptions,
} from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { AppError } from '../../common/app-error.ts';
import { SecretAnswer } from '../../common/secret-answer.ts';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { observabilityOf } from '../../edition/observability/observability-of.ts';
import { JobsService } from '../../jobs/jobs.service.ts';
import { sendPieces } from '../runs/send-table.ts';
import { EditionContents } from './edition-contents.ts';
import { EditionDownloads } from './edition-downloads.ts';
import { EditionsService } from './editions.service.ts';
import { GuestLinksService } from './guest-links.service.ts';
import { REPLAY_EDITION } from './replay-edition.job.ts';

const uuid = z.uuid();
const format = z.enum(EDITION_FORMATS);
const fromQuery = z.object({ from: z.uuid() });

@Controller()
export class EditionsController {
  constructor(
    private readonly editions: EditionsService,
    private readonly contents: EditionContents,
    private readonly downloads: EditionDownloads,
    private readonly links: GuestLinksService,
    private readonly jobs: JobsService,
  ) {}

  @Get('surveys/:surveyId/editions')
  @SerializeOptions({ schema: listOf(edition) })
  list(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.editions.list(user, surveyId, query);
  }

  @Post('surveys/:surveyId/editions')
  @SerializeOptions({ schema: editionDetail })
  create(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Body({ schema: createEditionRequest }) request: CreateEditionRequest,
    @Headers('if-match') ifMatch: string | undefined,
  ) {
    return this.editions.create(user, surveyId, request, ifMatch);
  }

  @Get('editions/:id')
  @SerializeOptions({ schema: editionDetail })
  get(@CurrentUser() user: SignedInUser, @Param('id', { schema: uuid }) id: string) {
    return this.editions.get(user, id);
  }

  @Get('editions/:id/difference')
  @SerializeOptions({ schema: editionDifference })
  difference(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: fromQuery }) { from }: { from: string },
  ) {
    return this.editions.difference(user, id, from);
  }

  @Get('editions/:id/detections/:detectionId')
  @SerializeOptions({ schema: verdictDetail })
  async detection(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Param('detectionId', { schema: uuid }) detectionId: string,
  ) {
    const found = await this.contents.detail(await this.editions.row(user, id), detectionId);
    if (!found) throw new AppError('NOT_FOUND', 'That detection is not on this edition.');
    return found;
  }

  @Get('editions/:id/observability')
  @SerializeOptions({ schema: observabilityAnswer })
  async observability(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: observabilityQuery }) query: ObservabilityQuery,
  ) {
    const row = await this.editions.row(user, id);
    const targets = [];
    for await (const { item } of this.contents.lines(row)) targets.push(item);
    return observabilityOf(targets, query);
  }

  @Get('editions/:id/export/:format')
  async export(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Param('format', { schema: format }) as: EditionFormat,
    @Query({ schema: exportQuery }) query: ExportQuery,
    @Res() response: Response,
  ) {
    const file = await this.downloads.open(await this.editions.row(user, id), as, query);
    await sendPieces(response, file, file.pieces());
  }

  /** Repeats the edition from its inputs. */
  @Post('editions/:id/replay')
  @HttpCode(202)
  @SerializeOptions({ schema: jobAccepted })
  async replay(@CurrentUser() user: SignedInUser, @Param('id', { schema: uuid }) id: string) {
    const { surveyId, state } = await this.editions.row(user, id);
    if (state !== 'frozen') throw new AppError('NOT_READY', 'The archive of the edition is not packed yet.');
    return { jobId: await this.jobs.enqueue(REPLAY_EDITION, { editionId: id }, { surveyId, userId: user.id }) };
  }

  @Get('editions/:id/links')
  @SerializeOptions({ schema: listOf(guestLink) })
  guestLinks(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.links.list(user, id, query);
  }

  @Post('editions/:id/links')
  @SecretAnswer()
  @SerializeOptions({ schema: createdGuestLink })
  makeLink(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: createGuestLinkRequest }) request: CreateGuestLinkRequest,
  ) {
    return this.links.create(user, id, request);
  }

  @Delete('links/:id')
  @HttpCode(204)
  async revokeLink(@CurrentUser() user: SignedInUser, @Param('id', { schema: uuid }) id: string): Promise<void> {
    await this.links.revoke(user, id);
  }
}
