import { ApiProperty, ApiPropertyOptional } from '@nestjs/swagger';
import { MAIL_KINDS, type MailKind, type Theme, THEMES } from '@app/contracts';
import { Transform, Type } from 'class-transformer';
import {
  ArrayMaxSize,
  IsArray,
  IsBoolean,
  IsIn,
  IsNotEmpty,
  IsOptional,
  IsString,
  MaxLength,
  ValidateNested,
} from 'class-validator';

const trimmed = ({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value);

export class ProfileDto {
  @ApiPropertyOptional()
  @IsOptional()
  @Transform(trimmed)
  @IsString()
  @IsNotEmpty({ message: 'Enter your name: it stands under what you sign.' })
  @MaxLength(120)
  name?: string;

  @ApiPropertyOptional({ enum: THEMES })
  @IsOptional()
  @IsIn(THEMES, { message: 'Choose the day theme, the night theme, or what the system says.' })
  theme?: Theme;
}

export class PasswordDto {
  @ApiProperty()
  @IsString()
  @IsNotEmpty({ message: 'Enter the password that you have now.' })
  @MaxLength(1024)
  current!: string;

  @ApiProperty()
  @IsString()
  @IsNotEmpty({ message: 'Choose a password.' })
  @MaxLength(4096)
  next!: string;
}

export class SubscriptionDto {
  @ApiProperty({ enum: MAIL_KINDS })
  @IsIn(MAIL_KINDS)
  kind!: MailKind;

  @ApiProperty()
  @IsBoolean()
  isWanted!: boolean;
}

export class SubscriptionsDto {
  @ApiProperty({ type: [SubscriptionDto] })
  @IsArray()
  @ArrayMaxSize(MAIL_KINDS.length)
  @ValidateNested({ each: true })
  @Type(() => SubscriptionDto)
  subscriptions!: SubscriptionDto[];
}
