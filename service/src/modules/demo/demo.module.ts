import { Module } from '@nestjs/common';
import { DEMO_FILLER } from '../../common/demo-filler.ts';
import { AuthModule } from '../auth/auth.module.ts';
import { CriteriaModule } from '../criteria/criteria.module.ts';
import { FilesModule } from '../files/files.module.ts';
import { IntakesModule } from '../intakes/intakes.module.ts';
import { ObservationsModule } from '../observations/observations.module.ts';
import { ReviewsModule } from '../reviews/reviews.module.ts';
import { RunsModule } from '../runs/runs.module.ts';
import { EditionsModule } from '../editions/editions.module.ts';
import { ShortlistsModule } from '../shortlists/shortlists.module.ts';
import { SurveysModule } from '../surveys/surveys.module.ts';
import { TeamsModule } from '../teams/teams.module.ts';
import { DemoObservations } from './demo-observations.ts';
import { DemoService } from './demo.service.ts';

@Module({
  imports: [
    AuthModule,
    TeamsModule,
    SurveysModule,
    FilesModule,
    IntakesModule,
    CriteriaModule,
    RunsModule,
    ReviewsModule,
    ObservationsModule,
    ShortlistsModule,
    EditionsModule,
  ],
  providers: [DemoObservations, DemoService, { provide: DEMO_FILLER, useExisting: DemoService }],
  exports: [DEMO_FILLER],
})
export class DemoModule {}
