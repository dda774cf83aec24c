import { ApiPropertyOptional } from '@nestjs/swagger';
import { MAIL_STATES, type MailState } from '@app/contracts';
import { IsIn, IsOptional, IsString, MaxLength } from 'class-validator';
import { PageQuery } from '../../platform/paging';

export class MailsQuery extends PageQuery {
  @ApiPropertyOptional({ enum: MAIL_STATES })
  @IsOptional()
  @IsIn(MAIL_STATES)
  state?: MailState;

  @ApiPropertyOptional({ description: 'what the mail is about, such as held-lots' })
  @IsOptional()
  @IsString()
  @MaxLength(60)
  kind?: string;
}
