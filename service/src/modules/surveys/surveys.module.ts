import { Module } from '@nestjs/common';
import { SurveysController } from './surveys.controller.ts';
import { SurveysRepository } from './surveys.repository.ts';
import { SurveysService } from './surveys.service.ts';

@Module({
  controllers: [SurveysController],
  providers: [SurveysRepository, SurveysService],
  exports: [SurveysRepository, SurveysService],
})
export class SurveysModule {}
