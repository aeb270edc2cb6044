import { Module } from '@nestjs/common';
import { HealthController } from './health.controller.ts';
import { HealthRepository } from './health.repository.ts';
import { HealthService } from './health.service.ts';
import { MetricsAccess } from './metrics-access.ts';
import { MetricsController } from './metrics.controller.ts';
import { MetricsService } from './metrics.service.ts';
import { RequestCounts } from './request-counts.ts';

@Module({
  controllers: [HealthController, MetricsController],
  providers: [HealthRepository, HealthService, MetricsAccess, MetricsService, RequestCounts],
  exports: [RequestCounts],
})
export class HealthModule {}
