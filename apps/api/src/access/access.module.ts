import { Global, Module } from '@nestjs/common';
import { AccessService } from './access.service';
import { ScopeService } from './scope.service';

@Global()
@Module({ providers: [AccessService, ScopeService], exports: [AccessService, ScopeService] })
export class AccessModule {}
