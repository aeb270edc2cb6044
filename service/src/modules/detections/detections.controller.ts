import {
  detection,
  detectionsQuery,
  type UpdateDetectionRequest,
  positionsQuery,
  updateDetectionRequest,
} from '@eremite/shared/contracts/detection';
import { listOf } from '@eremite/shared/contracts/list';
import { Body, Controller, Get, Param, Patch, Query, Res, SerializeOptions } from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { sendPositions } from './send-positions.ts';
import { DetectionsService } from './detections.service.ts';

const id = { schema: z.uuid() };

@Controller()
export class DetectionsController {
  constructor(private readonly detections: DetectionsService) {}

  @Get('surveys/:surveyId/detections')
  @SerializeOptions({ schema: listOf(detection) })
  list(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', id) surveyId: string,
    @Query({ schema: detectionsQuery }) query: z.output<typeof detectionsQuery>,
  ) {
    return this.detections.list(user, surveyId, query);
  }

  /** Positions with radii, to be submitted to an archive. */
  @Get('surveys/:surveyId/positions')
  async positions(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', id) surveyId: string,
    @Query({ schema: positionsQuery }) query: z.output<typeof positionsQuery>,
    @Res() response: Response,
  ): Promise<void> {
    await sendPositions(response, query, await this.detections.positions(user, surveyId));
  }

  @Get('detections/:id')
  @SerializeOptions({ schema: detection })
  get(@CurrentUser() user: SignedInUser, @Param('id', id) detectionId: string) {
    return this.detections.get(user, detectionId);
  }

  @Patch('detections/:id')
  @SerializeOptions({ schema: detection })
  replaceDistance(
    @CurrentUser() user: SignedInUser,
    @Param('id', id) detectionId: string,
    @Body({ schema: updateDetectionRequest }) request: UpdateDetectionRequest,
  ) {
    return this.detections.replaceDistance(user, detectionId, request);
  }
}
