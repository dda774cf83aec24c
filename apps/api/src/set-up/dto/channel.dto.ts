import { IdField, InstantField, RetiredField, TextField } from './fields';

const NAME = 'Name the channel, such as Coat weight.';
const POSITION = 'Say where the gauge stands, such as exit or A.';
const GAUGE = 'Say which gauge serves here.';

export class NewChannelDto {
  @IdField('Say on which line the channel is.')
  lineId!: number;

  @IdField('Say which characteristic the channel measures.')
  characteristicId!: number;

  @TextField(POSITION)
  position!: string;

  @TextField(NAME)
  name!: string;

  @IdField(GAUGE)
  gaugeId!: number;

  @InstantField()
  since!: string;
}

export class ChannelDto {
  @TextField(NAME, { isOptional: true })
  name?: string;

  @TextField(POSITION, { isOptional: true })
  position?: string;

  @RetiredField()
  isRetired?: boolean;
}

export class ChannelGaugeDto {
  @IdField(GAUGE)
  gaugeId!: number;

  @InstantField()
  since!: string;
}
