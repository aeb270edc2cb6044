import {
  detection,
  detectionsQuery,
  type UpdateDetectionRequest,
  updateDetectionRequest,
} from '@eremite/shared/contracts/detection';
import { listOf } from '@eremite/shared/contracts/list';
import { Body, Controller, Get, Param, Patch, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
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
