import { ApiProperty, ApiPropertyOptional } from '@nestjs/swagger';
import { Transform } from 'class-transformer';
import { IsEmail, IsNotEmpty, IsOptional, IsString, MaxLength } from 'class-validator';

const trimmed = ({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value);

export class PasswordResetDto {
  @ApiProperty()
  @Transform(trimmed)
  @IsString()
  @IsNotEmpty({ message: 'Enter your e-mail address.' })
  @MaxLength(254)
  email!: string;
}

export class LinkDto {
  @ApiProperty()
  @IsString()
  @IsNotEmpty({ message: 'Choose a password.' })
  @MaxLength(4096)
  password!: string;

  /** Of the first administrator alone. */
  @ApiPropertyOptional()
  @IsOptional()
  @Transform(trimmed)
  @IsString()
  @IsNotEmpty({ message: 'Enter your name.' })
  @MaxLength(120)
  name?: string;

  /** Of the first administrator alone. */
  @ApiPropertyOptional()
  @IsOptional()
  @Transform(trimmed)
  @IsEmail({ require_tld: false }, { message: 'Enter an e-mail address, such as name@plant.example.' })
  @MaxLength(254)
  email?: string;
}
