import { Module } from '@nestjs/common';
import { DetectionsController } from './detections.controller.ts';
import { DetectionsRepository } from './detections.repository.ts';
import { DetectionsService } from './detections.service.ts';

@Module({
  controllers: [DetectionsController],
  providers: [DetectionsRepository, DetectionsService],
  exports: [DetectionsService],
})
export class DetectionsModule {}
