import { Module } from '@nestjs/common';
import { IntakeWorker } from './intake-worker.ts';
import { IntakesController } from './intakes.controller.ts';
import { IntakesRepository } from './intakes.repository.ts';
import { IntakesService } from './intakes.service.ts';
import { PublishingService } from './publishing.service.ts';
import { UploadInterceptor } from './upload.interceptor.ts';

@Module({
  controllers: [IntakesController],
  providers: [IntakesRepository, IntakesService, PublishingService, IntakeWorker, UploadInterceptor],
  exports: [IntakesService],
})
export class IntakesModule {}
