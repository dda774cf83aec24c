import { ApiProperty } from '@nestjs/swagger';
import { Transform } from 'class-transformer';
import { IsNotEmpty, IsString, MaxLength } from 'class-validator';

export class ApiTokenDto {
  @ApiProperty({ description: 'Where it is used.', example: 'Line computer of Coater 2' })
  @Transform(({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value))
  @IsString()
  @IsNotEmpty({ message: 'Say where the token is used, so that it can be told from others.' })
  @MaxLength(120)
  name!: string;
}
