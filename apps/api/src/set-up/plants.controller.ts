import { Body, Controller, Get, Param, Patch, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { PlantSetUpView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { NewPlantDto, PlantSetUpDto } from './dto/plant.dto';
import { SetUpPlantsService } from './plants.service';

@ApiTags('set-up')
@Controller('plants')
export class SetUpPlantsController {
  constructor(private readonly plants: SetUpPlantsService) {}

  @Post()
  @Permit('set_up_plant')
  add(@CurrentPerson() person: Person, @Body() body: NewPlantDto): Promise<PlantSetUpView> {
    return this.plants.add(person, body);
  }

  @Get(':id/set-up')
  @Permit('read')
  get(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<PlantSetUpView> {
    return this.plants.get(person, id);
  }

  @Patch(':id/set-up')
  @Permit('set_up_plant')
  change(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: PlantSetUpDto,
  ): Promise<PlantSetUpView> {
    return this.plants.change(person, id, body);
  }
}
