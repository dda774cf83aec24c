import { DomainError } from '@app/contracts';
import { CALENDER_1 } from './lines/calender-1';
import { COATER_2 } from './lines/coater-2';
import { SLURRY_3 } from './lines/slurry-3';
import { DEMO_PEOPLE } from './people';
import type { DemoChannel, DemoLine, DemoPlant } from './types';

const PLANT: DemoPlant = {
  name: 'Marrowby Works',
  timeZone: 'Europe/London',
  currency: 'GBP',
  shifts: [
    { name: 'early', startsAt: '06:00', endsAt: '14:00' },
    { name: 'late', startsAt: '14:00', endsAt: '22:00' },
    { name: 'night', startsAt: '22:00', endsAt: '06:00' },
  ],
  lines: [COATER_2.line, CALENDER_1.line, SLURRY_3.line],
  people: DEMO_PEOPLE,
};

/** The demo plant: what an administrator would have set up before the first workbook arrives. */
export function describePlant(): DemoPlant {
  return structuredClone(PLANT);
}

/** A line of the plant by its name. @throws DomainError when there is none. */
export function lineNamed(name: string): DemoLine {
  const line = PLANT.lines.find((candidate) => candidate.name === name);
  if (!line) throw new DomainError('invalid', 'no-such-line', `Marrowby Works has no line "${name}".`);
  return line;
}

/** A channel of a line by its name. @throws DomainError when there is none. */
export function channelNamed(lineName: string, channelName: string): DemoChannel {
  const channel = lineNamed(lineName).channels.find((candidate) => candidate.name === channelName);
  if (!channel) throw new DomainError('invalid', 'no-such-channel', `${lineName} has no channel "${channelName}".`);
  return channel;
}
