import { job } from '@eremite/shared/contracts/job';
import { Controller, Delete, Get, Param, Res, SerializeOptions } from '@nestjs/common';
import type { Response } from 'express';
import { z } from 'zod';
import { CurrentUser, type SignedInUser } from '../common/signed-in-user.ts';
import { JobsService } from './jobs.service.ts';
import { streamJob } from './stream-job.ts';

const jobId = { schema: z.uuid() };

@Controller('jobs')
export class JobsController {
  constructor(private readonly jobs: JobsService) {}

  @Get(':jobId')
  @SerializeOptions({ schema: job })
  get(@CurrentUser() user: SignedInUser, @Param('jobId', jobId) id: string) {
    return this.jobs.get(user, id);
  }

  @Get(':jobId/events')
  events(
    @CurrentUser() user: SignedInUser,
    @Param('jobId', jobId) id: string,
    @Res() response: Response,
  ): Promise<void> {
    return streamJob(this.jobs, user, id, response);
  }

  @Delete(':jobId')
  @SerializeOptions({ schema: job })
  cancel(@CurrentUser() user: SignedInUser, @Param('jobId', jobId) id: string) {
    return this.jobs.cancel(user, id);
  }
}
