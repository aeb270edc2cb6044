import { Module } from '@nestjs/common';
import { LedgerModule } from '../ledger/ledger.module.ts';
import { CriteriaController } from './criteria.controller.ts';
import { CriteriaRepository } from './criteria.repository.ts';
import { CriteriaService } from './criteria.service.ts';

@Module({
  imports: [LedgerModule],
  controllers: [CriteriaController],
  providers: [CriteriaService, CriteriaRepository],
  exports: [CriteriaService],
})
export class CriteriaModule {}
