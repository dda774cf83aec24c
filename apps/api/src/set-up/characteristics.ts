import type { CharacteristicBody, CharacteristicSetUpView, NewCharacteristicBody } from '@app/contracts';
import {
  type CharacteristicSetUpRow,
  findCharacteristicSetUpForUpdate,
  insertCharacteristic,
  type Transaction,
  updateCharacteristic,
} from '@app/data';
import { notFound } from '../access/not-found';
import { auditAdded, auditChanged, type Change, differences, refusal, retiredAt } from './change';

const WORDS = { name: 'name', unit: 'unit', resolution: 'resolution' };

export const characteristicView = (row: CharacteristicSetUpRow): CharacteristicSetUpView => ({
  id: row.id,
  name: row.name,
  unit: row.unit,
  resolution: row.resolution,
  mayChangeUnit: row.mayChangeUnit,
  isRetired: row.isRetired,
});

/** Adds a characteristic; returns its id. */
export async function addCharacteristic(tx: Transaction, change: Change, body: NewCharacteristicBody): Promise<number> {
  const { name, unit, resolution } = body;
  const id = await insertCharacteristic(tx, { plantId: change.plantId, name, unit, resolution });
  const thing = { kind: 'characteristic', id, title: `characteristic ${name}` };
  await auditAdded(tx, change, thing, { name, unit, resolution });
  return id;
}

/** Changes a characteristic, retires it or brings it back. Its unit stays once anything is stated in it. */
export async function changeCharacteristic(
  tx: Transaction,
  change: Change,
  id: number,
  body: CharacteristicBody,
): Promise<void> {
  const row = await findCharacteristicSetUpForUpdate(tx, id);
  if (row?.plantId !== change.plantId) throw notFound();
  const { name, unit, resolution, isRetired } = row;
  const differing = differences({ name, unit, resolution, isRetired }, body);
  if (!differing) return;
  const { after } = differing;
  if (after.unit !== undefined && !row.mayChangeUnit)
    throw refusal(
      'unit-in-use',
      '/unit',
      `Readings or specifications of ${name} are stated in ${unit} already. Add another characteristic for ${after.unit}.`,
    );
  if (after.isRetired) refuseRetiring(row);
  await updateCharacteristic(tx, id, {
    name: after.name,
    unit: after.unit,
    resolution: after.resolution,
    retiredAt: retiredAt(after.isRetired, change.at),
  });
  const thing = { kind: 'characteristic', id, title: `characteristic ${name}`, words: WORDS };
  await auditChanged(tx, change, thing, differing);
}

function refuseRetiring({ name, channelCount, proposalCount }: CharacteristicSetUpRow): void {
  if (channelCount > 0) {
    const channels = channelCount === 1 ? '1 channel measures' : `${channelCount} channels measure`;
    throw refusal('characteristic-in-use', '/isRetired', `${channels} ${name}. Retire what measures it first.`);
  }
  if (proposalCount > 0)
    throw refusal(
      'characteristic-in-use',
      '/isRetired',
      `${name} cannot be retired while a specification of it waits for approval. Approve or withdraw it first.`,
    );
}
