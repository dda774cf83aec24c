import type { NewPlantBody, PlantSetUpBody, PlantSetUpView } from '@app/contracts';
import {
  findPlantSetUpForUpdate,
  findTimeZone,
  insertPlant,
  type PlantSetUpRow,
  type Queryable,
  type Transaction,
  updatePlantSetUp,
} from '@app/data';
import { IANAZone } from 'luxon';
import { notFound } from '../access/not-found';
import { auditAdded, auditChanged, badField, type Change, differences, refusal } from './change';

const WORDS = {
  name: 'name',
  timeZone: 'time zone',
  currency: 'currency',
  engineerMayRelease: 'engineers may release',
  reminderManagerHours: 'hours until quality managers are reminded',
  reminderDirectorHours: 'hours until directors are reminded',
  allowanceNoticeShare: 'share of the tolerance that is told',
  allowanceCapShare: 'share of the tolerance beyond which lots are not scored',
};

export function plantSetUpView({ plantId: _plantId, ...view }: PlantSetUpRow): PlantSetUpView {
  return view;
}

/** Makes a plant, of which the person becomes administrator; returns its id. */
export async function addPlant(
  tx: Transaction,
  { person, at }: Omit<Change, 'plantId'>,
  body: NewPlantBody,
): Promise<number> {
  const plant = { name: body.name, timeZone: await knownZone(tx, body.timeZone), currency: body.currency ?? null };
  const id = await insertPlant(tx, { ...plant, createdAt: at, administratorId: person.id });
  const change = { plantId: id, person, at };
  const title = `the plant ${plant.name} and is its administrator`;
  await auditAdded(tx, change, { kind: 'plant', id, title }, plant);
  return id;
}

/** Changes the plant's own settings. Its zone stays once workbooks were read in it. */
export async function changePlant(tx: Transaction, change: Change, body: PlantSetUpBody): Promise<void> {
  const plant = await findPlantSetUpForUpdate(tx, change.plantId);
  if (!plant) throw notFound();
  const { id, plantId: _plantId, mayChangeTimeZone, ...now } = plant;
  const timeZone = body.timeZone === undefined ? undefined : await knownZone(tx, body.timeZone);
  const differing = differences(now, { ...body, timeZone });
  if (!differing) return;
  const { after } = differing;
  if (after.timeZone !== undefined && !mayChangeTimeZone)
    throw refusal(
      'zone-in-use',
      '/timeZone',
      `Workbooks of ${now.name} were read in the zone ${now.timeZone}: it stays, so that their times keep their meaning.`,
    );
  checkOrder({ ...now, ...after });
  await updatePlantSetUp(tx, id, after);
  await auditChanged(tx, change, { kind: 'plant', id, title: `the plant ${now.name}`, words: WORDS }, differing);
}

function checkOrder(plant: Omit<PlantSetUpRow, 'id' | 'plantId' | 'mayChangeTimeZone'>): void {
  if (!(plant.reminderDirectorHours >= plant.reminderManagerHours))
    throw badField(
      'directors-before-managers',
      '/reminderDirectorHours',
      `Quality managers are reminded after ${plant.reminderManagerHours} h; directors not before.`,
    );
  if (!(plant.allowanceCapShare >= plant.allowanceNoticeShare))
    throw badField(
      'cap-below-notice',
      '/allowanceCapShare',
      `A movement of ${plant.allowanceNoticeShare} of the tolerance is told; lots stay scored at least that far.`,
    );
}

/** The zone as the database spells it, which luxon must know too. */
async function knownZone(db: Queryable, name: string): Promise<string> {
  const zone = IANAZone.isValidZone(name) ? await findTimeZone(db, name) : undefined;
  if (zone === undefined)
    throw badField(
      'unknown-zone',
      '/timeZone',
      `There is no time zone ${name}. Give its IANA name, such as Europe/London.`,
    );
  return zone;
}
