import { Global, Module } from '@nestjs/common';
import { JobQueue } from './job-queue.ts';
import { JobsController } from './jobs.controller.ts';
import { JobsRepository } from './jobs.repository.ts';
import { JobsService } from './jobs.service.ts';

@Global()
@Module({
  controllers: [JobsController],
  providers: [JobsRepository, JobQueue, JobsService],
  exports: [JobsRepository, JobsService],
})
export class JobsModule {}
