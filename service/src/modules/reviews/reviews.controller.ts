import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import {
  createReviewRequest,
  review,
  settlement,
  settleRequest,
  withdrawRequest,
  type CreateReviewRequest,
  type SettleRequest,
} from '@eremite/shared/contracts/review';
import { Body, Controller, Delete, Get, Headers, HttpCode, Param, Post, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { ReviewsService } from './reviews.service.ts';
import { SettlementsService } from './settlements.service.ts';

const uuid = z.uuid();

/** What reviewers say of a verdict, and the lead's word that ends it. */
@Controller()
export class ReviewsController {
  constructor(
    private readonly reviews: ReviewsService,
    private readonly settlements: SettlementsService,
  ) {}

  @Get('detections/:id/reviews')
  @SerializeOptions({ schema: listOf(review) })
  list(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.reviews.list(user, id, query);
  }

  @Post('detections/:id/reviews')
  @SerializeOptions({ schema: review })
  create(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: createReviewRequest }) request: CreateReviewRequest,
  ) {
    return this.reviews.create(user, id, request);
  }

  /** Takes one's own review back. */
  @Delete('reviews/:id')
  @HttpCode(204)
  withdraw(@CurrentUser() user: SignedInUser, @Param('id', { schema: uuid }) id: string) {
    return this.reviews.withdraw(user, id);
  }

  @Get('detections/:id/settlements')
  @SerializeOptions({ schema: z.object({ settlement: settlement.nullable() }) })
  settlement(@CurrentUser() user: SignedInUser, @Param('id', { schema: uuid }) id: string) {
    return this.settlements.get(user, id);
  }

  /** `If-Match` names the settlement that was seen; another lead's is not overwritten without it. */
  @Post('detections/:id/settlements')
  @HttpCode(204)
  settle(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: settleRequest }) request: SettleRequest,
    @Headers('if-match') ifMatch?: string,
  ) {
    return this.settlements.settle(user, id, request, ifMatch);
  }

  /** Opens a settled detection again. */
  @Delete('detections/:id/settlements')
  @HttpCode(204)
  reopen(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: withdrawRequest }) request: { note: string },
  ) {
    return this.settlements.reopen(user, id, request.note);
  }
}
