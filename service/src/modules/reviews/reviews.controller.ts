import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import {
  assignmentsRequest,
  createOverrideRequest,
  createReviewRequest,
  override,
  review,
  reviewerProgress,
  settleRequest,
  withdrawRequest,
  type CreateOverrideRequest,
  type CreateReviewRequest,
  type SettleRequest,
} from '@eremite/shared/contracts/review';
import { Body, Controller, Delete, Get, HttpCode, Param, Post, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { OverridesService } from './overrides.service.ts';
import { ReviewsService } from './reviews.service.ts';

@Controller()
export class ReviewsController {
  constructor(
    private readonly reviews: ReviewsService,
    private readonly overrides: OverridesService,
  ) {}

  @Get('detections/:id/reviews')
  @SerializeOptions({ schema: listOf(review) })
  list(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: z.uuid() }) id: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.reviews.list(user, id, query);
  }

  @Post('detections/:id/reviews')
  @SerializeOptions({ schema: review })
  create(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: z.uuid() }) id: string,
    @Body({ schema: createReviewRequest }) request: CreateReviewRequest,
  ) {
    return this.reviews.create(user, id, request);
  }

  @Post('detections/:id/settlements')
  @HttpCode(204)
  settle(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: z.uuid() }) id: string,
    @Body({ schema: settleRequest }) request: SettleRequest,
  ) {
    return this.reviews.settle(user, id, request);
  }

  @Get('detections/:id/overrides')
  @SerializeOptions({ schema: listOf(override) })
  listOverrides(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: z.uuid() }) id: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.overrides.list(user, id, query);
  }

  @Post('detections/:id/overrides')
  @SerializeOptions({ schema: override })
  override(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: z.uuid() }) id: string,
    @Body({ schema: createOverrideRequest }) request: CreateOverrideRequest,
  ) {
    return this.overrides.create(user, id, request);
  }

  @Delete('overrides/:id')
  @SerializeOptions({ schema: override })
  withdraw(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: z.uuid() }) id: string,
    @Body({ schema: withdrawRequest }) request: { note: string },
  ) {
    return this.overrides.withdraw(user, id, request.note);
  }

  /** How far each reviewer is with what was assigned. */
  @Get('surveys/:surveyId/assignments')
  @SerializeOptions({ schema: listOf(reviewerProgress) })
  assignments(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.reviews.progress(user, surveyId, query);
  }

  @Post('surveys/:surveyId/assignments')
  @HttpCode(204)
  assign(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
    @Body({ schema: assignmentsRequest }) request: z.output<typeof assignmentsRequest>,
  ) {
    return this.reviews.assign(user, surveyId, request, true);
  }

  @Delete('surveys/:surveyId/assignments')
  @HttpCode(204)
  unassign(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
    @Body({ schema: assignmentsRequest }) request: z.output<typeof assignmentsRequest>,
  ) {
    return this.reviews.assign(user, surveyId, request, false);
  }
}
