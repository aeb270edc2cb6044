import { Controller, Get, Header, Req } from '@nestjs/common';
import type { Request } from 'express';
import { Public } from '../../common/signed-in-user.ts';
import { MetricsAccess } from './metrics-access.ts';
import { MetricsService } from './metrics.service.ts';

@Controller('metrics')
export class MetricsController {
  constructor(
    private readonly metrics: MetricsService,
    private readonly access: MetricsAccess,
  ) {}

  /** Public only so far that a scraper need not have an account: it must bring the configured token. */
  @Public()
  @Get()
  @Header('Content-Type', 'text/plain; version=0.0.4; charset=utf-8')
  async read(@Req() request: Request): Promise<string> {
    await this.access.check(request);
    return this.metrics.text();
  }
}
