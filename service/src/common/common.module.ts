import { Global, Module } from '@nestjs/common';
import { AccessRepository } from './access.repository.ts';
import { AccessService } from './access.ts';
import { IdempotencyRepository } from './idempotency.repository.ts';
import { Readiness } from './readiness.ts';

@Global()
@Module({
  providers: [AccessRepository, AccessService, IdempotencyRepository, Readiness],
  exports: [AccessService, IdempotencyRepository, Readiness],
})
export class CommonModule {}
