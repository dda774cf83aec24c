import { type DynamicModule, Module, type Type } from '@nestjs/common';
import { APP_FILTER, APP_PIPE } from '@nestjs/core';
import { type Clock, type Config, PlatformModule, QueueModule } from '@app/platform';
import { AccessModule } from './access/access.module';
import { ApiTokensModule } from './api-tokens/api-tokens.module';
import { AuditModule } from './audit/audit.module';
import { AuthModule } from './auth/auth.module';
import { BreaksModule } from './breaks/breaks.module';
import { ChannelsModule } from './channels/channels.module';
import { DecisionsModule } from './decisions/decisions.module';
import { DeskModule } from './desk/desk.module';
import { HealthModule } from './health/health.module';
import { HoldsModule } from './holds/holds.module';
import { IntakesModule } from './intakes/intakes.module';
import { LayoutsModule } from './layouts/layouts.module';
import { LotsModule } from './lots/lots.module';
import { MailsModule } from './mails/mails.module';
import { PeopleModule } from './people/people.module';
import { PlansModule } from './plans/plans.module';
import { PlantsModule } from './plants/plants.module';
import { SetUpModule } from './set-up/set-up.module';
import { SetUpWorkbookModule } from './set-up-workbook/set-up-workbook.module';
import { ProfileModule } from './profile/profile.module';
import { SummariesModule } from './summaries/summaries.module';
import { loggingModule } from './platform/logging.module';
import { ProblemFilter } from './platform/problem.filter';
import { createValidationPipe } from './platform/validation';

export interface AppOptions {
  /** Further modules of this process, such as the worker's when there is no Redis. */
  extraImports?: (Type | DynamicModule)[];
}

@Module({})
export class AppModule {
  static register(config: Config, clock: Clock, { extraImports = [] }: AppOptions = {}): DynamicModule {
    return {
      module: AppModule,
      imports: [
        PlatformModule.register(config, clock),
        QueueModule.register(),
        loggingModule(config),
        AccessModule,
        AuthModule,
        PeopleModule,
        ProfileModule,
        ApiTokensModule,
        LayoutsModule,
        AuditModule,
        HealthModule,
        PlantsModule,
        ChannelsModule,
        LotsModule,
        HoldsModule,
        DeskModule,
        IntakesModule,
        DecisionsModule,
        BreaksModule,
        PlansModule,
        MailsModule,
        SetUpModule,
        SetUpWorkbookModule,
        SummariesModule,
        ...extraImports,
      ],
      providers: [
        { provide: APP_FILTER, useClass: ProblemFilter },
        { provide: APP_PIPE, useFactory: createValidationPipe },
      ],
    };
  }
}
