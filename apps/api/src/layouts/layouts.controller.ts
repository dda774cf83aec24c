import { Controller, Delete, Get, HttpCode, Param, StreamableFile } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { LayoutView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { LayoutsService } from './layouts.service';

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

@ApiTags('intakes')
@Controller('lines/:id')
export class LayoutsController {
  constructor(private readonly layouts: LayoutsService) {}

  @Get('layouts')
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) lineId: number): Promise<LayoutView[]> {
    return this.layouts.list(person, lineId);
  }

  @Delete('layouts/:layoutId')
  @Permit('upload_intake')
  @HttpCode(204)
  forget(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) lineId: number,
    @Param('layoutId', IdPipe) layoutId: number,
  ): Promise<void> {
    return this.layouts.forget(person, lineId, layoutId);
  }

  @Get('workbook-template')
  @Permit('read')
  async template(@CurrentPerson() person: Person, @Param('id', IdPipe) lineId: number): Promise<StreamableFile> {
    const { fileName, bytes } = await this.layouts.template(person, lineId);
    return new StreamableFile(bytes, {
      type: XLSX,
      disposition: `attachment; filename*=UTF-8''${encodeURIComponent(fileName)}`,
    });
  }
}
