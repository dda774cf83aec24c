import type { SpecificationLimits, SpecificationProposalBody } from '@app/contracts';
import {
  findCharacteristicSetUpForUpdate,
  findProductSetUpForUpdate,
  insertAuditEntry,
  insertSpecificationProposal,
  listSpecificationVersions,
  type Transaction,
} from '@app/data';
import { badField, type Change, refusal, usable } from './change';

/** Proposes the next version of a specification; returns the proposal's id. It holds once another person approves it. */
export async function proposeSpecification(
  tx: Transaction,
  change: Change,
  body: SpecificationProposalBody,
): Promise<number> {
  const { plantId, person, at } = change;
  const product = usable(await findProductSetUpForUpdate(tx, body.productId), change, 'product', '/productId');
  const characteristic = usable(
    await findCharacteristicSetUpForUpdate(tx, body.characteristicId),
    change,
    'characteristic',
    '/characteristicId',
  );
  checkLimits(body);
  const only = { productId: product.id, characteristicId: characteristic.id };
  const [newest] = await listSpecificationVersions(tx, plantId, only);
  const validFrom = new Date(body.validFrom);
  if (newest && validFrom <= newest.validFrom)
    throw refusal(
      'before-newest-version',
      '/validFrom',
      `Version ${newest.version} holds from ${newest.validFrom.toISOString()} on. The next one begins later.`,
    );
  const { nominal, lower, upper, appliesToIndividuals, reason } = body;
  const limits = { nominal, lower, upper, appliesToIndividuals };
  const id = await insertSpecificationProposal(tx, {
    plantId,
    ...only,
    ...limits,
    validFrom,
    reason,
    proposedBy: person.id,
    proposedAt: at,
  });
  await insertAuditEntry(tx, {
    plantId,
    at,
    actor: person,
    action: 'propose',
    thingKind: 'specification_proposal',
    thingId: id,
    sentence: `${person.name} proposed ${characteristic.name} of ${product.code} as ${limitsText(limits, characteristic)}: ${reason}`,
    before: newest ? limitsOf(newest) : undefined,
    after: { ...limits, validFrom: validFrom.toISOString(), reason },
  });
  return id;
}

function checkLimits({ nominal, lower, upper }: SpecificationLimits): void {
  if (lower === null && upper === null)
    throw badField('limits-missing', '/lower', 'Give a lower or an upper specification limit, or both.');
  if (lower !== null && upper !== null && !(lower < upper))
    throw badField('limits-swapped', '/upper', 'The upper specification limit lies above the lower one.');
  if ((lower !== null && nominal < lower) || (upper !== null && nominal > upper))
    throw badField('nominal-outside', '/nominal', 'The nominal value does not lie beyond a specification limit.');
}

export const limitsOf = ({
  nominal,
  lower,
  upper,
  appliesToIndividuals,
}: SpecificationLimits): SpecificationLimits => ({
  nominal,
  lower,
  upper,
  appliesToIndividuals,
});

/** "60 g/m², 58.8 to 61.2 g/m²", every digit as given. */
export function limitsText({ nominal, lower, upper }: SpecificationLimits, { unit }: { unit: string }): string {
  const text = (value: string | number) => `${value} ${unit}`.trim();
  const one = lower === null ? `at most ${text(upper as number)}` : `at least ${text(lower)}`;
  return `${text(nominal)}, ${lower !== null && upper !== null ? text(`${lower} to ${upper}`) : one}`;
}
