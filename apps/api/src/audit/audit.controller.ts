import { Controller, Get, Param, Query, Res, StreamableFile } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { AuditFilterChoices, AuditPage } from '@app/contracts';
import type { Response } from 'express';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { AuditTableService } from './audit-table.service';
import { AuditService } from './audit.service';
import { AuditQuery } from './dto/audit-query.dto';

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

@ApiTags('audit')
@Controller('plants/:id/audit')
export class AuditController {
  constructor(
    private readonly audit: AuditService,
    private readonly table: AuditTableService,
  ) {}

  @Get()
  @Permit('read_audit')
  list(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Query() query: AuditQuery,
  ): Promise<AuditPage> {
    return this.audit.list(person, id, query);
  }

  @Get('filters')
  @Permit('read_audit')
  filters(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<AuditFilterChoices> {
    return this.audit.filters(person, id);
  }

  @Get('export')
  @Permit('read_audit')
  async export(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Query() query: AuditQuery,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile> {
    const bytes = await this.table.write(person, id, query);
    response.attachment('audit.xlsx');
    return new StreamableFile(bytes, { type: XLSX, length: bytes.length });
  }
}
