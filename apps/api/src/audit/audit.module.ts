import { Module } from '@nestjs/common';
import { AuditTableService } from './audit-table.service';
import { AuditController } from './audit.controller';
import { AuditService } from './audit.service';

@Module({ controllers: [AuditController], providers: [AuditService, AuditTableService] })
export class AuditModule {}
