import { Global, Module } from '@nestjs/common';
import { AccessRepository } from './access.repository.ts';
import { AccessService } from './access.ts';
import { IdempotencyRepository } from './idempotency.repository.ts';
import { Readiness } from './readiness.ts';
import { SurveyHooks } from './survey-hooks.ts';

@Global()
@Module({
  providers: [AccessRepository, AccessService, IdempotencyRepository, Readiness, SurveyHooks],
  exports: [AccessService, IdempotencyRepository, Readiness, SurveyHooks],
})
export class CommonModule {}
