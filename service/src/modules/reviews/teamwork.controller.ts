import { agreement } from '@eremite/shared/contracts/agreement';
import { answerBindingRequest, binding, type AnswerBindingRequest } from '@eremite/shared/contracts/binding';
import { listOf, listQuery, type ListQuery } from '@eremite/shared/contracts/list';
import { notePhrases, type NotePhrases } from '@eremite/shared/contracts/note';
import { assignmentsRequest, reviewerProgress } from '@eremite/shared/contracts/review';
import { Body, Controller, Delete, Get, HttpCode, Param, Post, Put, Query, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { AgreementService } from './agreement.service.ts';
import { AssignmentsService } from './assignments.service.ts';
import { BindingsService } from './bindings.service.ts';
import { PhrasesService } from './phrases.service.ts';

const uuid = z.uuid();
const inSurvey = { schema: uuid };

/** How a team shares the work on a survey. */
@Controller()
export class TeamworkController {
  constructor(
    private readonly assignments: AssignmentsService,
    private readonly agreements: AgreementService,
    private readonly phrases: PhrasesService,
    private readonly bindings: BindingsService,
  ) {}

  /** How far each reviewer is with what was assigned. */
  @Get('surveys/:surveyId/assignments')
  @SerializeOptions({ schema: listOf(reviewerProgress) })
  progress(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', inSurvey) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.assignments.progress(user, surveyId, query);
  }

  @Post('surveys/:surveyId/assignments')
  @HttpCode(204)
  assign(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', inSurvey) surveyId: string,
    @Body({ schema: assignmentsRequest }) request: z.output<typeof assignmentsRequest>,
  ) {
    return this.assignments.assign(user, surveyId, request, true);
  }

  @Delete('surveys/:surveyId/assignments')
  @HttpCode(204)
  unassign(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', inSurvey) surveyId: string,
    @Body({ schema: assignmentsRequest }) request: z.output<typeof assignmentsRequest>,
  ) {
    return this.assignments.assign(user, surveyId, request, false);
  }

  /** Cohen's kappa of each pair of reviewers. */
  @Get('surveys/:surveyId/agreement')
  @SerializeOptions({ schema: listOf(agreement) })
  agreement(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', inSurvey) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.agreements.list(user, surveyId, query);
  }

  /** Phrases the survey's team keeps at hand for its notes. */
  @Get('surveys/:surveyId/note-phrases')
  @SerializeOptions({ schema: notePhrases })
  getPhrases(@CurrentUser() user: SignedInUser, @Param('surveyId', inSurvey) surveyId: string) {
    return this.phrases.get(user, surveyId);
  }

  @Put('surveys/:surveyId/note-phrases')
  @SerializeOptions({ schema: notePhrases })
  setPhrases(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', inSurvey) surveyId: string,
    @Body({ schema: notePhrases }) request: NotePhrases,
  ) {
    return this.phrases.set(user, surveyId, request);
  }

  /** Questions that new versions of tables raised. */
  @Get('surveys/:surveyId/bindings')
  @SerializeOptions({ schema: listOf(binding) })
  listBindings(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', inSurvey) surveyId: string,
    @Query({ schema: listQuery }) query: ListQuery,
  ) {
    return this.bindings.list(user, surveyId, query);
  }

  @Post('bindings/:id/answer')
  @HttpCode(204)
  answerBinding(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: uuid }) id: string,
    @Body({ schema: answerBindingRequest }) request: AnswerBindingRequest,
  ) {
    return this.bindings.answer(user, id, request);
  }
}
