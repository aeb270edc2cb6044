import {
  EDITION_FORMATS,
  exportQuery,
  sharedEdition,
  type EditionFormat,
  type ExportQuery,
} from '@eremite/shared/contracts/edition';
import { verdictDetail } from '@eremite/shared/contracts/verdict';
import { Controller, Get, Header, Param, Query, Res, SerializeOptions } from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { AppError } from '../../common/app-error.ts';
import { Public } from '../../common/signed-in-user.ts';
import { sendPieces } from '../runs/send-table.ts';
import { EditionContents } from './edition-contents.ts';
import { EditionDownloads } from './edition-downloads.ts';
import { EditionsService } from './editions.service.ts';
import { GuestLinksService } from './guest-links.service.ts';

const linkToken = z.string().regex(/^[\w-]{20,100}$/, 'not a link of this service');
const format = z.enum(EDITION_FORMATS);

/** What the holder of a guest link reads: one edition, and nothing else. */
@Public()
@Controller('shared/:linkToken')
export class SharedController {
  constructor(
    private readonly links: GuestLinksService,
    private readonly editions: EditionsService,
    private readonly contents: EditionContents,
    private readonly downloads: EditionDownloads,
  ) {}

  @Get()
  @Header('Cache-Control', 'no-store')
  @Header('X-Robots-Tag', 'noindex')
  @SerializeOptions({ schema: sharedEdition })
  async get(@Param('linkToken', { schema: linkToken }) token: string) {
    const { edition, expiresAt } = await this.links.open(token);
    return { edition: await this.editions.detail(edition), expiresAt };
  }

  @Get('detections/:detectionId')
  @Header('Cache-Control', 'no-store')
  @Header('X-Robots-Tag', 'noindex')
  @SerializeOptions({ schema: verdictDetail })
  async detection(
    @Param('linkToken', { schema: linkToken }) token: string,
    @Param('detectionId', { schema: z.uuid() }) detectionId: string,
  ) {
    const { edition } = await this.links.open(token);
    const found = await this.contents.detail(edition, detectionId);
    if (!found) throw new AppError('NOT_FOUND', 'That detection is not on this edition.');
    return found;
  }

  @Get('export/:format')
  async export(
    @Param('linkToken', { schema: linkToken }) token: string,
    @Param('format', { schema: format }) as: EditionFormat,
    @Query({ schema: exportQuery }) query: ExportQuery,
    @Res() response: Response,
  ) {
    const { edition } = await this.links.open(token);
    const file = await this.downloads.open(edition, as, query);
    response.setHeader('Cache-Control', 'no-store');
    response.setHeader('X-Robots-Tag', 'noindex');
    await sendPieces(response, file, file.pieces());
  }
}
