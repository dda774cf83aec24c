import { ApiProperty, ApiPropertyOptional } from '@nestjs/swagger';
import { Transform } from 'class-transformer';
import { IsBoolean, IsNotEmpty, IsOptional, IsString, MaxLength } from 'class-validator';

export class ProposePlanDto {
  @ApiProperty()
  @Transform(({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value))
  @IsString()
  @IsNotEmpty({ message: 'Say why a plan is proposed: the reason stands on the record.' })
  @MaxLength(500)
  reason!: string;

  @ApiPropertyOptional({
    description: 'Whether outlying lots pull the baseline less (bisquare weights).',
    default: false,
  })
  @IsOptional()
  @IsBoolean()
  isRobust?: boolean;
}

export class ApprovePlanDto {
  @ApiProperty({ description: 'The approver’s own password, given again as part of the signature.' })
  @IsString()
  @IsNotEmpty({ message: 'Give your password again to sign.' })
  @MaxLength(1024)
  password!: string;
}
