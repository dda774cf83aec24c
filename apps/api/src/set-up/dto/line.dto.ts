import { RetiredField, TextField } from './fields';

const NAME = 'Name the line, such as Coater 2.';

export class NewLineDto {
  @TextField(NAME)
  name!: string;
}

export class LineDto {
  @TextField(NAME, { isOptional: true })
  name?: string;

  @RetiredField()
  isRetired?: boolean;
}
