import { Module } from '@nestjs/common';
import { AuthModule } from '../auth/auth.module';
import { DecisionsController } from './decisions.controller';
import { DecisionsService } from './decisions.service';

@Module({ imports: [AuthModule], controllers: [DecisionsController], providers: [DecisionsService] })
export class DecisionsModule {}
