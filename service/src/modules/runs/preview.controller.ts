import { preview, previewRequest, type PreviewRequest } from '@eremite/shared/contracts/preview';
import { Body, Controller, HttpCode, Param, Post, SerializeOptions } from '@nestjs/common';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { PreviewService } from './preview.service.ts';

@Controller('surveys/:surveyId/preview')
export class PreviewController {
  constructor(private readonly previews: PreviewService) {}

  @Post()
  @HttpCode(200)
  @SerializeOptions({ schema: preview })
  preview(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', { schema: z.uuid() }) surveyId: string,
    @Body({ schema: previewRequest }) request: PreviewRequest,
  ) {
    return this.previews.preview(user, surveyId, request);
  }
}
