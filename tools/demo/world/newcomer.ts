import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { DateTime } from 'luxon';
import { describePlant, lineNamed } from './plant';
import { makeWorld, shiftReadings } from './readings';
import type { DemoShift } from './types';
import { writeLongWorkbook, writeWideWorkbook } from './workbook';

export interface NewcomerWorkbook {
  path: string;
  line: string;
  shift: DemoShift;
  layout: 'long' | 'wide';
}

const NEWCOMER_LINE = 'Coater 2';

/** Title row of a shift's workbook: "Early shift, Monday 2 March 2026", by the date on which the shift begins. */
export function shiftHeading(shift: DemoShift, timeZone: string): string {
  const name = shift.name[0].toUpperCase() + shift.name.slice(1);
  const date = DateTime.fromSeconds(shift.startsAt, { zone: timeZone }).setLocale('en-GB');
  return `${name} shift, ${date.toFormat('cccc d LLLL yyyy')}`;
}

/**
 * Writes the two shifts of Coater 2 that follow the six weeks, for a newcomer to upload by hand: the first in long
 * layout, the second in wide layout.
 * @param directory made when missing. @param endsAt end of the six weeks, s.
 */
export async function writeNewcomerWorkbooks(
  directory: string,
  seed: number,
  endsAt: number,
): Promise<NewcomerWorkbook[]> {
  const { timeZone } = describePlant();
  const world = makeWorld(seed, endsAt);
  const line = lineNamed(NEWCOMER_LINE);
  await mkdir(directory, { recursive: true });
  const written: NewcomerWorkbook[] = [];
  for (const [position, shift] of world.truth.schedule.further.entries()) {
    const layout = position === 0 ? 'long' : 'wide';
    const write = layout === 'long' ? writeLongWorkbook : writeWideWorkbook;
    const options = { line, timeZone, heading: shiftHeading(shift, timeZone) };
    const day = DateTime.fromSeconds(shift.startsAt, { zone: timeZone }).toISODate();
    const path = join(directory, `coater-2-${day}-${shift.name}-${layout}.xlsx`);
    await writeFile(path, await write(shiftReadings(world, line.name, shift), options));
    written.push({ path, line: line.name, shift, layout });
  }
  return written;
}
