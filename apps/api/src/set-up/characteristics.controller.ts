import { Body, Controller, Get, Param, Patch, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { CharacteristicSetUpView, Page } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { CharacteristicDto, NewCharacteristicDto } from './dto/characteristic.dto';
import { SetUpCharacteristicsService } from './characteristics.service';

@ApiTags('set-up')
@Controller()
export class SetUpCharacteristicsController {
  constructor(private readonly characteristics: SetUpCharacteristicsService) {}

  @Get('plants/:id/set-up/characteristics')
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<Page<CharacteristicSetUpView>> {
    return this.characteristics.list(person, plantId);
  }

  @Post('plants/:id/set-up/characteristics')
  @Permit('set_up_plant')
  add(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Body() body: NewCharacteristicDto,
  ): Promise<CharacteristicSetUpView> {
    return this.characteristics.add(person, plantId, body);
  }

  @Patch('characteristics/:id')
  @Permit('set_up_plant')
  change(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: CharacteristicDto,
  ): Promise<CharacteristicSetUpView> {
    return this.characteristics.change(person, id, body);
  }
}
