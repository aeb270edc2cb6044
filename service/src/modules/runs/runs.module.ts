import { Module } from '@nestjs/common';
import { CriteriaModule } from '../criteria/criteria.module.ts';
import { LedgerModule } from '../ledger/ledger.module.ts';
import { SurveysModule } from '../surveys/surveys.module.ts';
import { DocketService } from './docket.service.ts';
import { EvidenceService } from './evidence.service.ts';
import { FieldService } from './field.service.ts';
import { OverviewService } from './overview.service.ts';
import { PicturesController } from './pictures.controller.ts';
import { PlotsService } from './plots.service.ts';
import { PreviewTables } from './preview-tables.ts';
import { PreviewThread } from './preview-thread.ts';
import { PreviewController } from './preview.controller.ts';
import { PreviewService } from './preview.service.ts';
import { RunInputs } from './run-inputs.ts';
import { RunJob } from './run.job.ts';
import { RunsController } from './runs.controller.ts';
import { RunsRepository } from './runs.repository.ts';
import { RunsService } from './runs.service.ts';
import { VerdictsRepository } from './verdicts.repository.ts';
import { VerdictsService } from './verdicts.service.ts';
import { WhatIfService } from './what-if.service.ts';

@Module({
  imports: [LedgerModule, CriteriaModule, SurveysModule],
  controllers: [RunsController, PreviewController, PicturesController],
  providers: [
    RunsService,
    VerdictsService,
    EvidenceService,
    FieldService,
    PlotsService,
    WhatIfService,
    DocketService,
    OverviewService,
    PreviewService,
    PreviewTables,
    PreviewThread,
    RunJob,
    RunInputs,
    RunsRepository,
    VerdictsRepository,
  ],
  exports: [RunsService, VerdictsService],
})
export class RunsModule {}
