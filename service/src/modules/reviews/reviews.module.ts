import { Module } from '@nestjs/common';
import { CataloguesModule } from '../catalogues/catalogues.module.ts';
import { LedgerModule } from '../ledger/ledger.module.ts';
import { RunsModule } from '../runs/runs.module.ts';
import { OverridesService } from './overrides.service.ts';
import { ReviewsController } from './reviews.controller.ts';
import { ReviewsRepository } from './reviews.repository.ts';
import { ReviewsService } from './reviews.service.ts';

@Module({
  imports: [LedgerModule, RunsModule, CataloguesModule],
  controllers: [ReviewsController],
  providers: [ReviewsService, OverridesService, ReviewsRepository],
  exports: [ReviewsService, OverridesService],
})
export class ReviewsModule {}
