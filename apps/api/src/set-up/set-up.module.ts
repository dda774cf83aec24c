import { Module } from '@nestjs/common';
import { AuthModule } from '../auth/auth.module';
import { SetUpChannelsController } from './channels.controller';
import { SetUpChannelsService } from './channels.service';
import { SetUpCharacteristicsController } from './characteristics.controller';
import { SetUpCharacteristicsService } from './characteristics.service';
import { SetUpGaugesController } from './gauges.controller';
import { SetUpGaugesService } from './gauges.service';
import { SetUpLinesController } from './lines.controller';
import { SetUpLinesService } from './lines.service';
import { SetUpPlantsController } from './plants.controller';
import { SetUpPlantsService } from './plants.service';
import { SetUpProductsController } from './products.controller';
import { SetUpProductsService } from './products.service';
import { SetUpWrites } from './set-up-writes.service';
import { SetUpShiftsController } from './shifts.controller';
import { SetUpShiftsService } from './shifts.service';
import { SpecificationsController } from './specifications.controller';
import { SpecificationsService } from './specifications.service';

@Module({
  imports: [AuthModule],
  controllers: [
    SetUpPlantsController,
    SetUpLinesController,
    SetUpShiftsController,
    SetUpProductsController,
    SetUpCharacteristicsController,
    SpecificationsController,
    SetUpGaugesController,
    SetUpChannelsController,
  ],
  providers: [
    SetUpWrites,
    SetUpPlantsService,
    SetUpLinesService,
    SetUpShiftsService,
    SetUpProductsService,
    SetUpCharacteristicsService,
    SpecificationsService,
    SetUpGaugesService,
    SetUpChannelsService,
  ],
  exports: [SetUpWrites],
})
export class SetUpModule {}
