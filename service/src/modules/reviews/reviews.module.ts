import { Module } from '@nestjs/common';
import { CataloguesModule } from '../catalogues/catalogues.module.ts';
import { FilesModule } from '../files/files.module.ts';
import { LedgerModule } from '../ledger/ledger.module.ts';
import { RunsModule } from '../runs/runs.module.ts';
import { AgreementService } from './agreement.service.ts';
import { AssignmentsRepository } from './assignments.repository.ts';
import { AssignmentsService } from './assignments.service.ts';
import { AttachmentsController } from './attachments.controller.ts';
import { AttachmentsRepository } from './attachments.repository.ts';
import { AttachmentsService } from './attachments.service.ts';
import { BindingsRepository } from './bindings.repository.ts';
import { BindingsService } from './bindings.service.ts';
import { BoundObjects } from './bound-objects.ts';
import { CarryOverRepository } from './carry-over.repository.ts';
import { CarryOverService } from './carry-over.service.ts';
import { DecisionsController } from './decisions.controller.ts';
import { DetectionAccess } from './detection-access.ts';
import { DoubtWordsRepository } from './doubt-words.repository.ts';
import { DoubtWordsService } from './doubt-words.service.ts';
import { OverridesRepository } from './overrides.repository.ts';
import { OverridesService } from './overrides.service.ts';
import { PhrasesService } from './phrases.service.ts';
import { RemarksRepository } from './remarks.repository.ts';
import { RemarksService } from './remarks.service.ts';
import { ReviewsController } from './reviews.controller.ts';
import { ReviewsRepository } from './reviews.repository.ts';
import { ReviewsService } from './reviews.service.ts';
import { SettlementsService } from './settlements.service.ts';
import { TeamworkController } from './teamwork.controller.ts';

@Module({
  imports: [LedgerModule, RunsModule, CataloguesModule, FilesModule],
  controllers: [ReviewsController, DecisionsController, AttachmentsController, TeamworkController],
  providers: [
    AgreementService,
    AssignmentsRepository,
    AssignmentsService,
    AttachmentsRepository,
    AttachmentsService,
    BindingsRepository,
    BindingsService,
    BoundObjects,
    CarryOverRepository,
    CarryOverService,
    DetectionAccess,
    DoubtWordsRepository,
    DoubtWordsService,
    OverridesRepository,
    OverridesService,
    PhrasesService,
    RemarksRepository,
    RemarksService,
    ReviewsRepository,
    ReviewsService,
    SettlementsService,
  ],
  exports: [ReviewsService, OverridesService, SettlementsService, AssignmentsService],
})
export class ReviewsModule {}
