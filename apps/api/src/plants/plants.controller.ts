import { Controller, Get, Param } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { LineView, Page, PlantView, StripView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { PlantsService } from './plants.service';

@ApiTags('plants and lines')
@Controller()
export class PlantsController {
  constructor(private readonly plants: PlantsService) {}

  @Get('plants')
  @Permit('read')
  listPlants(@CurrentPerson() person: Person): Promise<Page<PlantView>> {
    return this.plants.listPlants(person);
  }

  @Get('plants/:id/lines')
  @Permit('read')
  listLines(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<Page<LineView>> {
    return this.plants.listLines(person, id);
  }

  @Get('lines/:id/strip')
  @Permit('read')
  strip(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<StripView> {
    return this.plants.strip(person, id);
  }
}
