import { Module } from '@nestjs/common';
import { LotsController } from './lots.controller';
import { LotsService } from './lots.service';
import { LotsTableService } from './lots-table.service';

@Module({ controllers: [LotsController], providers: [LotsService, LotsTableService] })
export class LotsModule {}
