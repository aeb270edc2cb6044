import { Global, Module } from '@nestjs/common';
import { LedgerFeed } from './ledger-feed.ts';
import { LedgerController } from './ledger.controller.ts';
import { LedgerRepository } from './ledger.repository.ts';
import { LedgerService } from './ledger.service.ts';

@Global()
@Module({
  controllers: [LedgerController],
  providers: [LedgerFeed, LedgerRepository, LedgerService],
  exports: [LedgerService],
})
export class LedgerModule {}
