import { ApiProperty, ApiPropertyOptional } from '@nestjs/swagger';
import type { DecisionRequest } from '@app/contracts';
import { Transform } from 'class-transformer';
import { IsIn, IsInt, IsNotEmpty, IsOptional, IsString, MaxLength, Min } from 'class-validator';

const trimmed = ({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value);

export class DecisionDto implements DecisionRequest {
  @ApiProperty({ enum: ['release', 'scrap'] })
  @IsIn(['release', 'scrap'], { message: 'Choose release or scrap.' })
  disposition!: 'release' | 'scrap';

  @ApiProperty()
  @Transform(trimmed)
  @IsString()
  @IsNotEmpty({ message: 'Say why: the reason stands in the record.' })
  @MaxLength(2000)
  reason!: string;

  @ApiPropertyOptional()
  @IsOptional()
  @Transform(trimmed)
  @IsString()
  @MaxLength(5000)
  note?: string;

  @ApiProperty({ description: 'The decider’s own password, given again as part of the signature.' })
  @IsString()
  @IsNotEmpty({ message: 'Give your password again to sign.' })
  @MaxLength(1024)
  password!: string;

  @ApiProperty({ description: 'As read with the hold; another one means that the evidence changed meanwhile.' })
  @IsInt()
  @Min(1)
  evidenceVersion!: number;
}

export class SetAsideDto {
  @ApiPropertyOptional({ description: 'Where the lot stands now.' })
  @IsOptional()
  @Transform(trimmed)
  @IsString()
  @MaxLength(200)
  place?: string;
}
