import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import {
  createRunRequest,
  evidenceQuery,
  run,
  runAccepted,
  runDifference,
  verdictsQuery,
  type CreateRunRequest,
  type VerdictsQuery,
} from '@eremite/shared/contracts/run';
import { surveyOverview } from '@eremite/shared/contracts/survey';
import { docketItem, docketQuery } from '@eremite/shared/contracts/docket';
import { verdictDetail, verdictItem } from '@eremite/shared/contracts/verdict';
import { Body, Controller, Get, HttpCode, Param, Post, Query, Res, SerializeOptions } from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { DocketService } from './docket.service.ts';
import { EvidenceService } from './evidence.service.ts';
import { OverviewService } from './overview.service.ts';
import { RunsService } from './runs.service.ts';
import { sendTable } from './send-table.ts';
import { VerdictsService } from './verdicts.service.ts';
import { verdictTable } from './verdict-columns.ts';

const uuid = z.uuid();
const verdictsAnswer = verdictsQuery.extend({ format: evidenceQuery.shape.format });
const fromQuery = z.object({ from: z.uuid() });

@Controller()
export class RunsController {
  constructor(
    private readonly runs: RunsService,
    private readonly verdicts: VerdictsService,
    private readonly evidence: EvidenceService,
    private readonly overviews: OverviewService,
    private readonly dockets: DocketService,
  ) {}

  @Get('surveys/:surveyId/runs')
  @SerializeOptions({ schema: listOf(run) })
  list(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.runs.list(user, surveyId, query);
  }

  @Post('surveys/:surveyId/runs')
  @HttpCode(202)
  @SerializeOptions({ schema: runAccepted })
  start(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Body({ schema: createRunRequest }) request: CreateRunRequest,
  ) {
    return this.runs.start(user, surveyId, request);
  }

  @Get('surveys/:surveyId/overview')
  @SerializeOptions({ schema: surveyOverview })
  overview(@CurrentUser() user: SignedInUser, @Param('surveyId', { schema: uuid }) surveyId: string) {
    return this.overviews.get(user, surveyId);
  }

  @Get('surveys/:surveyId/docket')
  @SerializeOptions({ schema: listOf(docketItem) })
  docket(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: uuid }) surveyId: string,
    @Query({ schema: docketQuery }) query: z.output<typeof docketQuery>,
  ) {
    return this.dockets.list(user, surveyId, query);
  }

  @Get('runs/:id')
  @SerializeOptions({ schema: run })
  get(@CurrentUser() user: SignedInUser, @Param('id', { schema: uuid }) id: string) {
    return this.runs.get(user, id);
  }

  @Get('runs/:id/difference')
  @SerializeOptions({ schema: runDifference })
  difference(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: fromQuery }) query: { from: string },
  ) {
    return this.runs.difference(user, id, query.from);
  }

  @Get('runs/:id/verdicts')
  @SerializeOptions({ schema: listOf(verdictItem) })
  async listVerdicts(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: verdictsAnswer }) query: z.output<typeof verdictsAnswer>,
    @Res({ passthrough: true }) response: Response,
  ) {
    if (query.format === 'json') return this.verdicts.list(user, id, query as VerdictsQuery);
    const { number } = await this.runs.finished(user, id);
    return sendTable(
      response,
      query.format,
      `run-${number}-verdicts`,
      verdictTable(this.verdicts.lines(id, query, query.sort), `Verdicts of run ${number}`),
    );
  }

  @Get('runs/:id/detections/:detectionId')
  @SerializeOptions({ schema: verdictDetail })
  detail(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Param('detectionId', { schema: uuid }) detectionId: string,
  ) {
    return this.verdicts.detail(user, id, detectionId);
  }

  @Get('runs/:id/candidates')
  async candidates(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: evidenceQuery }) query: z.output<typeof evidenceQuery>,
    @Res({ passthrough: true }) response: Response,
  ) {
    if (query.format === 'json') return this.evidence.candidates(user, id, query);
    return sendTable(
      response,
      query.format,
      'candidates',
      await this.evidence.candidateTable(user, id, query.detectionId),
    );
  }

  @Get('runs/:id/neighbours')
  async neighbours(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: evidenceQuery }) query: z.output<typeof evidenceQuery>,
    @Res({ passthrough: true }) response: Response,
  ) {
    if (query.format === 'json') return this.evidence.neighbours(user, id, query);
    return sendTable(
      response,
      query.format,
      'neighbours',
      await this.evidence.neighbourTable(user, id, query.detectionId),
    );
  }
}
