import { Injectable, Logger } from '@nestjs/common';
import { Readiness } from '../../common/readiness.ts';
import { HealthRepository } from './health.repository.ts';

@Injectable()
export class HealthService {
  readonly #log = new Logger(HealthService.name);

  constructor(
    private readonly readiness: Readiness,
    private readonly database: HealthRepository,
  ) {}

  async ready(): Promise<{ status: 'ok' | 'starting' | 'failing'; detail?: string }> {
    if (!this.readiness.ready) return { status: 'starting', detail: this.readiness.doing };
    try {
      await this.database.ping();
      return { status: 'ok' };
    } catch (error) {
      this.#log.error({ err: error }, 'the database does not answer');
      return { status: 'failing', detail: 'the database does not answer' };
    }
  }
}
