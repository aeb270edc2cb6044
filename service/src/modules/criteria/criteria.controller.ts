import { createCriteriaRequest, criteria, type CreateCriteriaRequest } from '@eremite/shared/contracts/criteria';
import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import { Body, Controller, Get, Param, Post, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { CriteriaService } from './criteria.service.ts';

@Controller()
export class CriteriaController {
  constructor(private readonly criteria: CriteriaService) {}

  @Get('surveys/:surveyId/criteria')
  @SerializeOptions({ schema: listOf(criteria) })
  list(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.criteria.list(user, surveyId, query);
  }

  @Post('surveys/:surveyId/criteria')
  @SerializeOptions({ schema: criteria })
  create(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
    @Body({ schema: createCriteriaRequest }) request: CreateCriteriaRequest,
  ) {
    return this.criteria.create(user, surveyId, request);
  }

  @Get('criteria/:id')
  @SerializeOptions({ schema: criteria })
  get(@CurrentUser() user: SignedInUser, @Param('id', { schema: z.uuid() }) id: string) {
    return this.criteria.get(user, id);
  }
}
