import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import { createRemarkRequest, remark, type CreateRemarkRequest } from '@eremite/shared/contracts/remark';
import {
  createOverrideRequest,
  doubtWord,
  doubtWordRequest,
  override,
  withdrawRequest,
  type CreateOverrideRequest,
  type DoubtWordRequest,
} from '@eremite/shared/contracts/review';
import { Body, Controller, Delete, Get, Headers, Param, Post, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { DoubtWordsService } from './doubt-words.service.ts';
import { OverridesService } from './overrides.service.ts';
import { RemarksService } from './remarks.service.ts';

const uuid = z.uuid();

/** Words on single pieces of evidence, which the next run takes up, and remarks. */
@Controller()
export class DecisionsController {
  constructor(
    private readonly overrides: OverridesService,
    private readonly doubts: DoubtWordsService,
    private readonly remarks: RemarksService,
  ) {}

  @Get('detections/:id/overrides')
  @SerializeOptions({ schema: listOf(override) })
  listOverrides(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.overrides.list(user, id, query);
  }

  /** `If-Match` names the override that was seen; another person's is not overwritten without it. */
  @Post('detections/:id/overrides')
  @SerializeOptions({ schema: override })
  override(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: createOverrideRequest }) request: CreateOverrideRequest,
    @Headers('if-match') ifMatch?: string,
  ) {
    return this.overrides.create(user, id, request, ifMatch);
  }

  @Delete('overrides/:id')
  @SerializeOptions({ schema: override })
  withdrawOverride(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: withdrawRequest }) request: { note: string },
  ) {
    return this.overrides.withdraw(user, id, request.note);
  }

  @Get('detections/:id/doubt-words')
  @SerializeOptions({ schema: listOf(doubtWord) })
  listDoubtWords(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.doubts.list(user, id, query);
  }

  @Post('detections/:id/doubt-words')
  @SerializeOptions({ schema: doubtWord })
  doubtWord(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: doubtWordRequest }) request: DoubtWordRequest,
    @Headers('if-match') ifMatch?: string,
  ) {
    return this.doubts.create(user, id, request, ifMatch);
  }

  @Delete('doubt-words/:id')
  @SerializeOptions({ schema: doubtWord })
  withdrawDoubtWord(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: withdrawRequest }) request: { note: string },
  ) {
    return this.doubts.withdraw(user, id, request.note);
  }

  @Get('detections/:id/remarks')
  @SerializeOptions({ schema: listOf(remark) })
  listRemarks(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.remarks.list(user, id, query);
  }

  @Post('detections/:id/remarks')
  @SerializeOptions({ schema: remark })
  remark(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: createRemarkRequest }) request: CreateRemarkRequest,
  ) {
    return this.remarks.create(user, id, request);
  }
}
