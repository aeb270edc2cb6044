import { Global, Module } from '@nestjs/common';
import { LedgerController } from './ledger.controller.ts';
import { LedgerRepository } from './ledger.repository.ts';
import { LedgerService } from './ledger.service.ts';

@Global()
@Module({ controllers: [LedgerController], providers: [LedgerRepository, LedgerService], exports: [LedgerService] })
export class LedgerModule {}
