import { Module } from '@nestjs/common';
import { IntakeEventsService } from './intake-events.service';
import { IntakesController } from './intakes.controller';
import { IntakesService } from './intakes.service';
import { ProgressHub } from './progress-hub';

@Module({ controllers: [IntakesController], providers: [IntakesService, IntakeEventsService, ProgressHub] })
export class IntakesModule {}
