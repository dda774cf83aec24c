import type { LineBody, LineSetUpView, NewLineBody } from '@app/contracts';
import { findLineSetUpForUpdate, insertLine, type LineSetUpRow, type Transaction, updateLine } from '@app/data';
import { notFound } from '../access/not-found';
import { auditAdded, auditChanged, type Change, differences, refusal, retiredAt } from './change';

export const lineView = ({ id, name, channelCount, isRetired }: LineSetUpRow): LineSetUpView => ({
  id,
  name,
  channelCount,
  isRetired,
});

/** Adds a line; returns its id. */
export async function addLine(tx: Transaction, change: Change, { name }: NewLineBody): Promise<number> {
  const id = await insertLine(tx, { plantId: change.plantId, name });
  await auditAdded(tx, change, { kind: 'line', id, title: `line ${name}` }, { name });
  return id;
}

/** Renames a line, retires it or brings it back. */
export async function changeLine(tx: Transaction, change: Change, id: number, body: LineBody): Promise<void> {
  const line = await findLineSetUpForUpdate(tx, id);
  if (line?.plantId !== change.plantId) throw notFound();
  const differing = differences({ name: line.name, isRetired: line.isRetired }, body);
  if (!differing) return;
  const { after } = differing;
  if (after.isRetired) refuseRetiring(line);
  await updateLine(tx, id, { name: after.name, retiredAt: retiredAt(after.isRetired, change.at) });
  const thing = { kind: 'line', id, title: `line ${line.name}`, words: { name: 'name' } };
  await auditChanged(tx, change, thing, differing);
}

function refuseRetiring(line: LineSetUpRow): void {
  if (line.channelCount > 0)
    throw refusal(
      'line-in-use',
      '/isRetired',
      `${line.name} has ${counted(line.channelCount, 'channel')} in use. Retire its channels first.`,
    );
  if (line.openHoldCount > 0)
    throw refusal(
      'line-in-use',
      '/isRetired',
      `${line.name} has ${counted(line.openHoldCount, 'held lot')} that nobody has decided. Decide them first.`,
    );
}

const counted = (count: number, what: string) => `${count} ${what}${count === 1 ? '' : 's'}`;
