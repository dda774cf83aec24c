import {
  type DemoShift,
  type DemoWorld,
  describePlant,
  lineNamed,
  shiftHeading,
  shiftReadings,
  writeLongWorkbook,
  writeWideWorkbook,
} from '../../../tools/demo/world';

export const LINE = 'Coater 2';

/** The workbook that the line would hand in for these shifts. */
export function writeShifts(world: DemoWorld, shifts: DemoShift[], layout: 'long' | 'wide'): Promise<Buffer> {
  const { timeZone } = describePlant();
  const readings = shifts.flatMap((shift) => [...shiftReadings(world, LINE, shift)]);
  const options = { line: lineNamed(LINE), timeZone, heading: shiftHeading(shifts[0], timeZone) };
  return layout === 'long' ? writeLongWorkbook(readings, options) : writeWideWorkbook(readings, options);
}
