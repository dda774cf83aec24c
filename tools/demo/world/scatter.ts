import { DomainError } from '@app/contracts';
import { CALENDER_1 } from './lines/calender-1';
import { COATER_2 } from './lines/coater-2';
import type { LineModel } from './lines/line-model';
import { SLURRY_3 } from './lines/slurry-3';
import { channelNamed } from './plant';

const MODELS: LineModel[] = [COATER_2, CALENDER_1, SLURRY_3];

/** The generator's model of a line. @throws DomainError when there is no such line. */
export function modelOf(line: string): LineModel {
  const model = MODELS.find((candidate) => candidate.line.name === line);
  if (!model) throw new DomainError('invalid', 'no-such-line', `Marrowby Works has no line "${line}".`);
  return model;
}

/**
 * Standard deviation of a lot mean about the slow movement, in the characteristic's unit:
 * sqrt(between² + (within² + resolution²/12)/n + amplitude²/2), n readings a lot, the last term for the daily swing.
 */
export function lotMeanSd(line: string, channelName: string): number {
  const channel = channelNamed(line, channelName);
  const { betweenLots, betweenReadings, swingAmplitude } = modelOf(line).scatter[channelName];
  const readingsPerLot = channel.readingsPerShift / modelOf(line).line.lotsPerShift;
  const rounding = channel.characteristic.resolution ** 2 / 12;
  return Math.sqrt(betweenLots ** 2 + (betweenReadings ** 2 + rounding) / readingsPerLot + swingAmplitude ** 2 / 2);
}
