import { attachment, ATTACHMENT_BYTES } from '@eremite/shared/contracts/attachment';
import {
  Controller,
  Get,
  Param,
  Post,
  Req,
  Res,
  SerializeOptions,
  StreamableFile,
  UseInterceptors,
} from '@nestjs/common';
import { FileInterceptor } from '@nestjs/platform-express';
import type { Response } from 'express';
import { z } from 'zod';
import { AppError } from '../../common/app-error.ts';
import { CurrentUser, type SignedInRequest, type SignedInUser } from '../../common/signed-in-user.ts';
import { AttachmentsService } from './attachments.service.ts';

/** One byte more than allowed is read, so that what is too large is seen to be. */
const limits = { files: 1, fields: 0, fileSize: ATTACHMENT_BYTES + 1 };

@Controller()
export class AttachmentsController {
  constructor(private readonly attachments: AttachmentsService) {}

  @Post('detections/:id/attachments')
  @UseInterceptors(FileInterceptor('file', { limits, defParamCharset: 'utf8' }))
  @SerializeOptions({ schema: attachment })
  upload(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: z.uuid() }) id: string,
    @Req() request: SignedInRequest,
  ) {
    const { file } = request as { file?: { originalname: string; buffer: Buffer } };
    if (!file)
      throw new AppError('VALIDATION_FAILED', 'Send the file as the multipart field "file".', [
        { pointer: '/file', detail: 'missing' },
      ]);
    return this.attachments.upload(user, id, { name: shownName(file.originalname), bytes: file.buffer });
  }

  /** As a download, never shown by the browser in our name. */
  @Get('attachments/:id')
  async download(
    @CurrentUser() user: SignedInUser,
    @Param('id', { schema: z.uuid() }) id: string,
    @Res({ passthrough: true }) response: Response,
  ) {
    const { stream, fileName, mediaType, bytes } = await this.attachments.download(user, id);
    response.setHeader('Content-Security-Policy', "default-src 'none'; sandbox");
    return new StreamableFile(stream, {
      type: mediaType,
      length: bytes,
      disposition: `attachment; filename*=UTF-8''${encodeURIComponent(fileName)}`,
    });
  }
}

function shownName(given: string): string {
  return (
    given
      .replace(/\p{Cc}/gu, '')
      .trim()
      .slice(0, 200) || 'attachment'
  );
}
