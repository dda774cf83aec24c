import { Module } from '@nestjs/common';
import { IntakeEventsService } from './intake-events.service';
import { IntakesController } from './intakes.controller';
import { IntakesService } from './intakes.service';
import { WithdrawalsService } from './withdrawals.service';
import { ProgressHub } from './progress-hub';

@Module({
  controllers: [IntakesController],
  providers: [IntakesService, WithdrawalsService, IntakeEventsService, ProgressHub],
})
export class IntakesModule {}
