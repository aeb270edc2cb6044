import { field, fieldQuery } from '@eremite/shared/contracts/field';
import { whatIf } from '@eremite/shared/contracts/what-if';
import { plotsQuery, surveyPlots } from '@eremite/shared/contracts/plot';
import { Controller, Get, Param, Query, Res, SerializeOptions } from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { FieldService } from './field.service.ts';
import { PlotsService } from './plots.service.ts';
import { sendTable } from './send-table.ts';
import { WhatIfService } from './what-if.service.ts';

const uuid = { schema: z.uuid() };

/** What the pictures of a run are drawn from besides its verdicts. */
@Controller('runs/:id')
export class PicturesController {
  constructor(
    private readonly fields: FieldService,
    private readonly plots: PlotsService,
    private readonly whatIfs: WhatIfService,
  ) {}

  @Get('detections/:detectionId/field')
  @SerializeOptions({ schema: field })
  field(
    @CurrentUser() user: SignedInUser,
    @Param('id', uuid) id: string,
    @Param('detectionId', uuid) detectionId: string,
    @Query({ schema: fieldQuery }) { radiusArcsec }: z.output<typeof fieldQuery>,
  ) {
    return this.fields.get(user, id, detectionId, radiusArcsec);
  }

  /** The verdict at other distances. */
  @Get('detections/:detectionId/what-if')
  @SerializeOptions({ schema: whatIf })
  whatIf(
    @CurrentUser() user: SignedInUser,
    @Param('id', uuid) id: string,
    @Param('detectionId', uuid) detectionId: string,
  ) {
    return this.whatIfs.distances(user, id, detectionId);
  }

  @Get('plots')
  @SerializeOptions({ schema: surveyPlots })
  async survey(
    @CurrentUser() user: SignedInUser,
    @Param('id', uuid) id: string,
    @Query({ schema: plotsQuery }) { format }: z.output<typeof plotsQuery>,
    @Res({ passthrough: true }) response: Response,
  ) {
    if (format === 'json') return this.plots.get(user, id);
    const { answer, name } = await this.plots.table(user, id);
    return sendTable(response, format, name, answer);
  }
}
