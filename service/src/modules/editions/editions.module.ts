import { Module, type OnModuleInit } from '@nestjs/common';
import { JobsService } from '../../jobs/jobs.service.ts';
import { ShortlistsModule } from '../shortlists/shortlists.module.ts';
import { EditionArchive } from './edition-archive.ts';
import { EditionContents } from './edition-contents.ts';
import { EditionDossier } from './edition-dossier.ts';
import { EditionDownloads } from './edition-downloads.ts';
import { EditionExports } from './edition-exports.ts';
import { EditionFreezer } from './edition-freezer.ts';
import { EditionsController } from './editions.controller.ts';
import { EditionsRepository } from './editions.repository.ts';
import { EditionsService } from './editions.service.ts';
import { GuestLinksRepository } from './guest-links.repository.ts';
import { GuestLinksService } from './guest-links.service.ts';
import { PackEditionJob } from './pack-edition.job.ts';
import { ReplayEditionJob } from './replay-edition.job.ts';
import { SaidRepository } from './said.repository.ts';
import { SharedController } from './shared.controller.ts';

@Module({
  imports: [ShortlistsModule],
  controllers: [EditionsController, SharedController],
  providers: [
    EditionsService,
    EditionFreezer,
    EditionContents,
    EditionExports,
    EditionDownloads,
    EditionArchive,
    EditionDossier,
    EditionsRepository,
    SaidRepository,
    GuestLinksService,
    GuestLinksRepository,
    PackEditionJob,
    ReplayEditionJob,
  ],
  exports: [EditionsService],
})
export class EditionsModule implements OnModuleInit {
  constructor(
    private readonly jobs: JobsService,
    private readonly pack: PackEditionJob,
    private readonly replay: ReplayEditionJob,
  ) {}

  onModuleInit(): void {
    this.jobs.register(this.pack);
    this.jobs.register(this.replay);
  }
}
