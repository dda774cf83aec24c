import {
  Body,
  Controller,
  Get,
  HttpCode,
  type MessageEvent,
  Param,
  Post,
  Query,
  Sse,
  StreamableFile,
  UploadedFile,
} from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { IntakeListItem, IntakeView, Page, SettledChange } from '@app/contracts';
import type { Observable } from 'rxjs';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { ForMachines } from '../auth/machine';
import { IdPipe } from '../platform/id.pipe';
import { checkAnswers } from './check-answers';
import { ConfirmIntakeDto, ReadAgainDto, ReceiveQueryDto, WithdrawIntakeDto } from './dto/intake.dto';
import { IntakeListQueryDto } from './dto/intake-list-query.dto';
import { IntakeEventsService } from './intake-events.service';
import { IntakesService } from './intakes.service';
import { WithdrawalsService } from './withdrawals.service';
import { uploadedFile, WorkbookUpload } from './workbook-upload';

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

@ApiTags('intakes')
@Controller()
export class IntakesController {
  constructor(
    private readonly intakes: IntakesService,
    private readonly withdrawals: WithdrawalsService,
    private readonly events: IntakeEventsService,
  ) {}

  @Post('lines/:id/intakes')
  @Permit('upload_intake')
  @ForMachines()
  @WorkbookUpload()
  receive(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) lineId: number,
    @Query() { confirm }: ReceiveQueryDto,
    @UploadedFile() file?: Express.Multer.File,
  ): Promise<IntakeView> {
    return this.intakes.receive(person, lineId, uploadedFile(file), { confirmsItself: confirm === 'auto' });
  }

  @Get('lines/:id/intakes')
  @Permit('read')
  @ForMachines()
  list(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) lineId: number,
    @Query() query: IntakeListQueryDto,
  ): Promise<Page<IntakeListItem>> {
    return this.intakes.list(person, lineId, query.page, query.pageSize);
  }

  @Get('intakes/:id')
  @Permit('read')
  @ForMachines()
  get(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<IntakeView> {
    return this.intakes.get(person, id);
  }

  @Post('intakes/:id/confirm')
  @Permit('upload_intake')
  @HttpCode(200)
  confirm(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: ConfirmIntakeDto,
  ): Promise<IntakeView> {
    return this.intakes.confirm(person, id, body);
  }

  @Post('intakes/:id/reading')
  @Permit('upload_intake')
  @HttpCode(200)
  readAgain(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() { answers }: ReadAgainDto,
  ): Promise<IntakeView> {
    return this.intakes.readAgain(person, id, checkAnswers(answers));
  }

  @Post('intakes/:id/withdraw')
  @Permit('upload_intake')
  @HttpCode(200)
  withdraw(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() { reason }: WithdrawIntakeDto,
  ): Promise<IntakeView> {
    return this.withdrawals.withdraw(person, id, reason);
  }

  @Get('intakes/:id/settled')
  @Permit('read')
  settled(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<SettledChange[]> {
    return this.withdrawals.settled(person, id);
  }

  @Post('intakes/:id/settled')
  @Permit('upload_intake')
  @HttpCode(200)
  rejudgeSettled(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<SettledChange[]> {
    return this.withdrawals.rejudgeSettled(person, id);
  }

  @Sse('intakes/:id/events')
  @Permit('read')
  watch(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<Observable<MessageEvent>> {
    return this.events.watch(person, id);
  }

  @Get('intakes/:id/workbook')
  @Permit('read')
  @ForMachines()
  async workbook(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<StreamableFile> {
    const { fileName, bytes } = await this.intakes.markedWorkbook(person, id);
    return new StreamableFile(bytes, {
      type: XLSX,
      disposition: `attachment; filename*=UTF-8''${encodeURIComponent(fileName)}`,
    });
  }
}
