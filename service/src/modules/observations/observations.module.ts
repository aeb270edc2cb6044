import { Module } from '@nestjs/common';
import { FilesModule } from '../files/files.module.ts';
import { LedgerModule } from '../ledger/ledger.module.ts';
import { ObservationThread } from './observation-thread.ts';
import { ObservationUpload } from './observation-upload.interceptor.ts';
import { ObservationsController } from './observations.controller.ts';
import { ObservationsRepository } from './observations.repository.ts';
import { ObservationsService } from './observations.service.ts';

@Module({
  imports: [FilesModule, LedgerModule],
  controllers: [ObservationsController],
  providers: [ObservationThread, ObservationUpload, ObservationsRepository, ObservationsService],
  exports: [ObservationsService],
})
export class ObservationsModule {}
