import { RetiredField, TextField } from './fields';

const ASSET_NUMBER = 'Give the gauge’s asset number, such as BG-204.';
const KIND = 'Say what kind of gauge it is, such as beta gauge.';

export class NewGaugeDto {
  @TextField(ASSET_NUMBER, { max: 50 })
  assetNumber!: string;

  @TextField(KIND)
  kind!: string;
}

export class GaugeDto {
  @TextField(ASSET_NUMBER, { max: 50, isOptional: true })
  assetNumber?: string;

  @TextField(KIND, { isOptional: true })
  kind?: string;

  @RetiredField()
  isRetired?: boolean;
}
