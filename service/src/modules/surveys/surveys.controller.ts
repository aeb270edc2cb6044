import { listOf, listQuery } from '@eremite/shared/contracts/list';
import {
  type CreateSurveyRequest,
  createSurveyRequest,
  survey,
  type UpdateSurveyRequest,
  updateSurveyRequest,
} from '@eremite/shared/contracts/survey';
import {
  Body,
  Controller,
  Delete,
  Get,
  Headers,
  HttpCode,
  Param,
  Patch,
  Post,
  Query,
  Res,
  SerializeOptions,
} from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { etagOf } from '../../common/etag.ts';
import { pageOf } from '../../common/paging.ts';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { SurveysService } from './surveys.service.ts';

const surveyId = { schema: z.uuid() };
const surveysQuery = listQuery.extend({ deleted: z.stringbool().default(false) });

@Controller('surveys')
export class SurveysController {
  constructor(private readonly surveys: SurveysService) {}

  @Get()
  @SerializeOptions({ schema: listOf(survey) })
  async list(@CurrentUser() user: SignedInUser, @Query({ schema: surveysQuery }) query: z.output<typeof surveysQuery>) {
    return pageOf(await this.surveys.list(user, query.deleted), query);
  }

  @Post()
  @SerializeOptions({ schema: survey })
  create(@CurrentUser() user: SignedInUser, @Body({ schema: createSurveyRequest }) body: CreateSurveyRequest) {
    return this.surveys.create(user, body);
  }

  @Get(':surveyId')
  @SerializeOptions({ schema: survey })
  async get(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', surveyId) id: string,
    @Res({ passthrough: true }) response: Response,
  ) {
    const found = await this.surveys.get(user, id);
    response.setHeader('ETag', etagOf(this.surveys.version(found)));
    return found;
  }

  @Patch(':surveyId')
  @SerializeOptions({ schema: survey })
  async update(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', surveyId) id: string,
    @Body({ schema: updateSurveyRequest }) body: UpdateSurveyRequest,
    @Headers('if-match') seen: string | undefined,
    @Res({ passthrough: true }) response: Response,
  ) {
    const changed = await this.surveys.update(user, id, body, seen);
    response.setHeader('ETag', etagOf(this.surveys.version(changed)));
    return changed;
  }

  @Delete(':surveyId')
  @HttpCode(204)
  remove(@CurrentUser() user: SignedInUser, @Param('surveyId', surveyId) id: string): Promise<void> {
    return this.surveys.remove(user, id);
  }

  /** Undoes a deletion. */
  @Post(':surveyId/restore')
  @HttpCode(200)
  @SerializeOptions({ schema: survey })
  restore(@CurrentUser() user: SignedInUser, @Param('surveyId', surveyId) id: string) {
    return this.surveys.restore(user, id);
  }
}
