import { Module } from '@nestjs/common';
import { InvitationsService } from './invitations.service';
import { PeopleController } from './people.controller';
import { PeopleService } from './people.service';
import { PlantAdministration } from './plant-administration.service';

@Module({
  controllers: [PeopleController],
  providers: [InvitationsService, PeopleService, PlantAdministration],
  exports: [InvitationsService, PeopleService],
})
export class PeopleModule {}
