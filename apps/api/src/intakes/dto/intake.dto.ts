import { ApiProperty, ApiPropertyOptional } from '@nestjs/swagger';
import { Transform } from 'class-transformer';
import { IsIn, IsNotEmpty, IsObject, IsOptional, IsString, MaxLength } from 'class-validator';

export class ReceiveQueryDto {
  @ApiPropertyOptional({
    enum: ['auto'],
    description: 'auto: confirmed as soon as it is read, if its layouts are remembered and nothing is left to say.',
  })
  @IsOptional()
  @IsIn(['auto'], { message: 'Say "auto", or leave it out.' })
  confirm?: 'auto';
}

export class ConfirmIntakeDto {
  @ApiPropertyOptional({
    enum: ['keep', 'supersede'],
    description:
      "Where a stored reading has another value: it stands (keep, the default), or the workbook's supersedes it.",
  })
  @IsOptional()
  @IsIn(['keep', 'supersede'], { message: 'Say whether stored readings stand or are superseded.' })
  differing?: 'keep' | 'supersede';
}

export class ReadAgainDto {
  @ApiProperty({ type: 'object', additionalProperties: true, description: 'What is said about how it is to be read.' })
  @IsObject({ message: 'Give the answers as an object.' })
  answers!: object;
}

export class WithdrawIntakeDto {
  @ApiProperty()
  @Transform(({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value))
  @IsString()
  @IsNotEmpty({ message: 'Say why: the reason stands on the record.' })
  @MaxLength(500)
  reason!: string;
}
