import { type DynamicModule, Module, StandardSchemaSerializerInterceptor } from '@nestjs/common';
import { APP_FILTER, APP_GUARD, APP_INTERCEPTOR, APP_PIPE } from '@nestjs/core';
import { ThrottlerModule } from '@nestjs/throttler';
import { CommonModule } from './common/common.module.ts';
import { DemoHook } from './common/demo-filler.ts';
import { IdempotencyInterceptor } from './common/idempotency.interceptor.ts';
import { ProblemFilter } from './common/problem.filter.ts';
import { requestLimit, ThrottleGuard } from './common/throttle.guard.ts';
import { validationPipe } from './common/validation-pipe.ts';
import { ConfigurationModule } from './config/configuration.module.ts';
import type { Env } from './config/env.ts';
import { DatabaseModule } from './database/database.module.ts';
import { JobsModule } from './jobs/jobs.module.ts';
import { AdminModule } from './modules/admin/admin.module.ts';
import { AuthGuard } from './modules/auth/auth.guard.ts';
import { AuthModule } from './modules/auth/auth.module.ts';
import { CriteriaModule } from './modules/criteria/criteria.module.ts';
import { DemoModule } from './modules/demo/demo.module.ts';
import { EditionsModule } from './modules/editions/editions.module.ts';
import { ObservationsModule } from './modules/observations/observations.module.ts';
import { ReviewsModule } from './modules/reviews/reviews.module.ts';
import { RunsModule } from './modules/runs/runs.module.ts';
import { ShortlistsModule } from './modules/shortlists/shortlists.module.ts';
import { CataloguesModule } from './modules/catalogues/catalogues.module.ts';
import { DetectionsModule } from './modules/detections/detections.module.ts';
import { FilesModule } from './modules/files/files.module.ts';
import { HealthModule } from './modules/health/health.module.ts';
import { IntakesModule } from './modules/intakes/intakes.module.ts';
import { LedgerModule } from './modules/ledger/ledger.module.ts';
import { MailModule } from './modules/mail/mail.module.ts';
import { SurveysModule } from './modules/surveys/surveys.module.ts';
import { TeamsModule } from './modules/teams/teams.module.ts';
import { TilesModule } from './tiles/tiles.module.ts';

/** What every feature stands on. */
const FOUNDATION = [
  DatabaseModule,
  CommonModule,
  JobsModule,
  AuthModule,
  FilesModule,
  LedgerModule,
  MailModule,
  TilesModule,
];
const FEATURES = [
  HealthModule,
  AdminModule,
  TeamsModule,
  SurveysModule,
  IntakesModule,
  CataloguesModule,
  DetectionsModule,
  CriteriaModule,
  RunsModule,
  ReviewsModule,
  ObservationsModule,
  ShortlistsModule,
  EditionsModule,
  DemoModule,
];

@Module({})
export class AppModule {
  static register(env: Env): DynamicModule {
    return {
      module: AppModule,
      imports: [
        ConfigurationModule.register(env),
        ThrottlerModule.forRoot([{ ttl: 60_000, limit: requestLimit }]),
        ...FOUNDATION,
        ...FEATURES,
      ],
      providers: [
        DemoHook,
        { provide: APP_GUARD, useExisting: AuthGuard },
        { provide: APP_GUARD, useClass: ThrottleGuard },
        { provide: APP_PIPE, useFactory: validationPipe },
        { provide: APP_FILTER, useClass: ProblemFilter },
        { provide: APP_INTERCEPTOR, useClass: IdempotencyInterceptor },
        { provide: APP_INTERCEPTOR, useClass: StandardSchemaSerializerInterceptor },
      ],
    };
  }
}
