import { createHash, timingSafeEqual } from 'node:crypto';
import { Inject, Injectable } from '@nestjs/common';
import type { Request } from 'express';
import { AppError } from '../../common/app-error.ts';
import { ENV, type Env } from '../../config/env.ts';
import { bearerOf, RequestUser } from '../auth/request-user.ts';

/** Figures are for the configured scraper and for administrators. */
@Injectable()
export class MetricsAccess {
  constructor(
    @Inject(ENV) private readonly env: Env,
    private readonly users: RequestUser,
  ) {}

  async check(request: Request): Promise<void> {
    const given = bearerOf(request);
    if (given !== undefined && this.env.metricsToken !== undefined && equal(given, this.env.metricsToken)) return;
    const user = await this.users.of(request);
    if (!user.isAdministrator) throw new AppError('NOT_ALLOWED', 'Only administrators read the figures.');
  }
}

function equal(a: string, b: string): boolean {
  const digest = (text: string) => createHash('sha256').update(text).digest();
  return timingSafeEqual(digest(a), digest(b));
}
