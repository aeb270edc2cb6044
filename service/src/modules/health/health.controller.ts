import { Controller, Get, HttpStatus, Res, SerializeOptions } from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { Public } from '../../common/signed-in-user.ts';
import { HealthService } from './health.service.ts';

const health = z.object({ status: z.enum(['ok', 'starting', 'failing']), detail: z.string().optional() });

@Public()
@Controller('health')
export class HealthController {
  constructor(private readonly health: HealthService) {}

  @Get('live')
  @SerializeOptions({ schema: health })
  live() {
    return { status: 'ok' };
  }

  @Get('ready')
  @SerializeOptions({ schema: health })
  async ready(@Res({ passthrough: true }) response: Response) {
    const found = await this.health.ready();
    if (found.status !== 'ok') response.status(HttpStatus.SERVICE_UNAVAILABLE);
    return found;
  }
}
