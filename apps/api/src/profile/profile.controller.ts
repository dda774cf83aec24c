import { Body, Controller, Get, HttpCode, Param, Patch, Post, Put } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { SubscriptionsView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, CurrentSession, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { PasswordDto, ProfileDto, SubscriptionsDto } from './dto/profile.dto';
import { ProfileService } from './profile.service';

@ApiTags('profile')
@Controller('me')
export class ProfileController {
  constructor(private readonly profile: ProfileService) {}

  @Patch()
  @Permit('read')
  @HttpCode(204)
  change(@CurrentPerson() person: Person, @Body() body: ProfileDto): Promise<void> {
    return this.profile.change(person, body);
  }

  @Post('password')
  @Permit('read')
  @HttpCode(204)
  changePassword(
    @CurrentPerson() person: Person,
    @CurrentSession() session: string | undefined,
    @Body() body: PasswordDto,
  ): Promise<void> {
    return this.profile.changePassword(person, body, session);
  }

  @Post('sign-out-everywhere')
  @Permit('read')
  @HttpCode(204)
  signOutEverywhere(@CurrentPerson() person: Person): Promise<void> {
    return this.profile.signOutEverywhere(person);
  }

  @Get('subscriptions/:plantId')
  @Permit('read')
  subscriptions(
    @CurrentPerson() person: Person,
    @Param('plantId', IdPipe) plantId: number,
  ): Promise<SubscriptionsView> {
    return this.profile.subscriptions(person, plantId);
  }

  @Put('subscriptions/:plantId')
  @Permit('read')
  changeSubscriptions(
    @CurrentPerson() person: Person,
    @Param('plantId', IdPipe) plantId: number,
    @Body() body: SubscriptionsDto,
  ): Promise<SubscriptionsView> {
    return this.profile.changeSubscriptions(person, plantId, body);
  }
}
