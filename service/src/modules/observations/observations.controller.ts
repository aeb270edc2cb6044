import { listOf } from '@eremite/shared/contracts/list';
import {
  observation,
  observationFields,
  type ObservationFields,
  rasterQuery,
  type RasterQuery,
  spectrumChannels,
} from '@eremite/shared/contracts/observation';
import {
  Body,
  Controller,
  Delete,
  Get,
  HttpCode,
  Param,
  Post,
  Query,
  Req,
  Res,
  SerializeOptions,
  StreamableFile,
  UseInterceptors,
} from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../../common/signed-in-user.ts';
import { type ObservationRequest, ObservationUpload } from './observation-upload.interceptor.ts';
import { ObservationsService } from './observations.service.ts';

const uuid = { schema: z.uuid() };

@Controller()
export class ObservationsController {
  constructor(private readonly observations: ObservationsService) {}

  @Get('detections/:id/observations')
  @SerializeOptions({ schema: listOf(observation) })
  async list(@CurrentUser() user: SignedInUser, @Param('id', uuid) id: string) {
    const items = await this.observations.list(user, id);
    return { items, nextCursor: null, total: items.length };
  }

  @Post('detections/:id/observations')
  @UseInterceptors(ObservationUpload)
  @SerializeOptions({ schema: observation })
  addTo(
    @CurrentUser() user: SignedInUser,
    @Param('id', uuid) id: string,
    @Body({ schema: observationFields }) fields: ObservationFields,
    @Req() request: ObservationRequest,
  ) {
    return this.observations.addTo(user, id, request.observation!, fields);
  }

  /** Of many files each is sent on its own: what is wrong with one is said of that one. */
  @Post('surveys/:surveyId/observations')
  @UseInterceptors(ObservationUpload)
  @SerializeOptions({ schema: observation })
  addToSurvey(
    @CurrentUser() user: SignedInUser,
    @Param('surveyId', uuid) surveyId: string,
    @Body({ schema: observationFields }) fields: ObservationFields,
    @Req() request: ObservationRequest,
  ) {
    return this.observations.addToSurvey(user, surveyId, request.observation!, fields);
  }

  @Get('observations/:id/raster')
  async raster(
    @CurrentUser() user: SignedInUser,
    @Param('id', uuid) id: string,
    @Query({ schema: rasterQuery }) query: RasterQuery,
    @Res({ passthrough: true }) response: Response,
  ) {
    const values = await this.observations.raster(user, id, query);
    // The file never changes and neither does its detection's place, but whoever lost access must lose it at once.
    response.setHeader('Cache-Control', 'private, no-cache');
    return new StreamableFile(new Uint8Array(values.buffer, values.byteOffset, values.byteLength), {
      type: 'application/octet-stream',
    });
  }

  @Get('observations/:id/channels')
  @SerializeOptions({ schema: spectrumChannels })
  channels(@CurrentUser() user: SignedInUser, @Param('id', uuid) id: string) {
    return this.observations.channels(user, id);
  }

  @Get('observations/:id/file')
  async file(
    @CurrentUser() user: SignedInUser,
    @Param('id', uuid) id: string,
    @Res({ passthrough: true }) response: Response,
  ) {
    const { stream, fileName, bytes } = await this.observations.download(user, id);
    // As a download, never shown by the browser in our name.
    response.setHeader('Content-Security-Policy', "default-src 'none'; sandbox");
    return new StreamableFile(stream, {
      type: 'application/octet-stream',
      length: bytes,
      disposition: `attachment; filename*=UTF-8''${encodeURIComponent(fileName)}`,
    });
  }

  @Delete('observations/:id')
  @HttpCode(204)
  remove(@CurrentUser() user: SignedInUser, @Param('id', uuid) id: string) {
    return this.observations.remove(user, id);
  }
}
