import { type DynamicModule, Module, type Type } from '@nestjs/common';
import { APP_FILTER, APP_PIPE } from '@nestjs/core';
import { type Clock, type Config, PlatformModule } from '@app/platform';
import { AccessModule } from './access/access.module';
import { AuthModule } from './auth/auth.module';
import { HealthModule } from './health/health.module';
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
        loggingModule(config),
        AccessModule,
        AuthModule,
        HealthModule,
        ...extraImports,
      ],
      providers: [
        { provide: APP_FILTER, useClass: ProblemFilter },
        { provide: APP_PIPE, useFactory: createValidationPipe },
      ],
    };
  }
}
