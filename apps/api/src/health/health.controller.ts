import { Controller, Get, Inject, ServiceUnavailableException } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { type Database, isDatabaseReachable } from '@app/data';
import { DATABASE } from '@app/platform';
import { Public } from '../auth/public';

@ApiTags('health')
@Controller('health')
export class HealthController {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** The process answers. */
  @Get('live')
  @Public()
  live(): { status: 'ok' } {
    return { status: 'ok' };
  }

  /** It can do its work: the database answers. */
  @Get('ready')
  @Public()
  async ready(): Promise<{ status: 'ok' }> {
    if (await isDatabaseReachable(this.database, 2_000)) return { status: 'ok' };
    throw new ServiceUnavailableException();
  }
}
