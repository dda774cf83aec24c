import { listOpenHolds } from '@app/data';
import {
  demoBreaks,
  type DemoShift,
  type DemoWorld,
  describePlant,
  lineNamed,
  shiftHeading,
  shiftReadings,
  writeLongWorkbook,
} from '../world';
import type { Stage } from './stage';

const SHIFTS_A_DAY = 3;
/** The plans are proposed once the channels have this many days of readings; none of these days has a bad lot. */
const PLAN_DAY = 20;
const UPLOAD_DELAY_SECONDS = 20 * 60;
const DECISION_DELAY_SECONDS = 90 * 60;

/** A workbook of these shifts of a line. */
function workbookOf(world: DemoWorld, line: string, shifts: DemoShift[]): Promise<Buffer> {
  const { timeZone } = describePlant();
  const readings = shifts.flatMap((shift) => [...shiftReadings(world, line, shift)]);
  return writeLongWorkbook(readings, { line: lineNamed(line), timeZone, heading: shiftHeading(shifts[0], timeZone) });
}

const fileName = (line: string, shift: DemoShift) =>
  `${line.toLowerCase().replaceAll(' ', '-')} ${new Date(shift.startsAt * 1000).toISOString().slice(0, 10)} ${shift.name}.xlsx`;

/** Plays the six weeks but for their last shift: a workbook a day and line, breaks, plans, and each hold decided. */
export async function playHistory(
  stage: Stage,
  world: DemoWorld,
  onDay: (day: number, days: number) => void,
): Promise<void> {
  const shifts = world.truth.schedule.shifts.slice(0, -1);
  const days = Math.ceil(shifts.length / SHIFTS_A_DAY);
  const breaks = demoBreaks(world.truth.schedule.endsAt);
  let declaredUntil = -Infinity;
  for (let day = 0; day < days; day++) {
    const ofDay = shifts.slice(day * SHIFTS_A_DAY, (day + 1) * SHIFTS_A_DAY);
    const endsAt = ofDay[ofDay.length - 1].endsAt;
    stage.clock.set(endsAt + UPLOAD_DELAY_SECONDS);
    for (const declared of breaks.filter(({ at }) => at > declaredUntil && at <= endsAt))
      await stage.breaks.declare(stage.person(declared.who), stage.channelId(declared.line, declared.channel), {
        at: new Date(declared.at * 1000).toISOString(),
        kind: declared.kind,
        reason: declared.reason,
      });
    declaredUntil = endsAt;
    await stage.settle();
    const engineer = stage.person('engineer2@marrowby.example');
    await Promise.all(
      describePlant().lines.map(async ({ name }) =>
        stage.takeIn(engineer, name, fileName(name, ofDay[0]), await workbookOf(world, name, ofDay)),
      ),
    );
    if (day + 1 === PLAN_DAY) await approvePlans(stage);
    stage.clock.set(endsAt + DECISION_DELAY_SECONDS);
    await decideHolds(stage, world);
    onDay(day + 1, days);
  }
}

async function approvePlans(stage: Stage): Promise<void> {
  const engineer = stage.person('engineer@marrowby.example');
  const manager = stage.person('manager@marrowby.example');
  for (const channelId of stage.plant.channelIds.values())
    await stage.approvePlan(
      engineer,
      manager,
      channelId,
      'First plan, from three weeks of readings without a known bad lot.',
    );
  await stage.settle();
}

/** The line lead sets every held lot aside; the quality manager scraps what really was bad and releases the rest. */
async function decideHolds(stage: Stage, world: DemoWorld): Promise<void> {
  const lead = stage.person('lead@marrowby.example');
  const manager = stage.person('manager@marrowby.example');
  for (const hold of await listOpenHolds(stage.database, stage.plant.plantId)) {
    await stage.decisions.setAside(lead, hold.id, 'Quarantine rack');
    const isBad = world.truth.badLots.some((lot) => lot.lot === hold.lotNumber);
    await stage.decisions.decide(manager, hold.id, {
      disposition: isBad ? 'scrap' : 'release',
      reason: isBad
        ? 'Retained samples confirm it.'
        : 'Retained samples are inside specification; the lot fits its neighbours.',
      password: '',
      evidenceVersion: hold.evidenceVersion,
    });
  }
}

/**
 * Takes in the last shift of the six weeks as it would come today: its holds stay open and its mails wait to be sent, with the summary of
 * the week that ended last.
 */
export async function playLastShift(stage: Stage, world: DemoWorld): Promise<void> {
  const last = world.truth.schedule.shifts.at(-1) as DemoShift;
  stage.clock.release();
  const engineer = stage.person('engineer@marrowby.example');
  for (const { name } of describePlant().lines)
    await stage.takeIn(engineer, name, fileName(name, last), await workbookOf(world, name, [last]));
  await stage.dueSummaries.oweDue();
  await stage.settle();
}
