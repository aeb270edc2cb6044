import { Module } from '@nestjs/common';
import { LedgerModule } from '../ledger/ledger.module.ts';
import { RunsModule } from '../runs/runs.module.ts';
import { ProposalsService } from './proposals.service.ts';
import { ShortlistsController } from './shortlists.controller.ts';
import { ShortlistsRepository } from './shortlists.repository.ts';
import { ShortlistsService } from './shortlists.service.ts';

@Module({
  imports: [LedgerModule, RunsModule],
  controllers: [ShortlistsController],
  providers: [ShortlistsService, ProposalsService, ShortlistsRepository],
  exports: [ShortlistsService, ShortlistsRepository],
})
export class ShortlistsModule {}
