import { Module } from '@nestjs/common';
import { PeopleModule } from '../people/people.module';
import { PeopleOfWorkbook } from './people-of-workbook.service';
import { SetUpWorkbookController } from './set-up-workbook.controller';
import { SetUpWorkbookService } from './set-up-workbook.service';

@Module({
  imports: [PeopleModule],
  controllers: [SetUpWorkbookController],
  providers: [SetUpWorkbookService, PeopleOfWorkbook],
})
export class SetUpWorkbookModule {}
