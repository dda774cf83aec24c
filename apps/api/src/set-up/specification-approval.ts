import { DomainError, JOBS, type Role } from '@app/contracts';
import {
  findSpecificationProposal,
  findSpecificationProposalForUpdate,
  getBaselineReach,
  insertAuditEntry,
  insertOwedJob,
  insertSpecificationVersion,
  listLineIdsOfCharacteristic,
  listSpecificationVersions,
  lockStoring,
  type SpecificationProposalRow,
  type Transaction,
  updateSpecificationProposalEnded,
  updateSpecificationsOfLots,
} from '@app/data';
import { notFound } from '../access/not-found';
import type { Change } from './change';
import { mayWithdraw, reasonNotToApproveSpecification } from './specification-view';
import { limitsOf, limitsText } from './specifications';

/** Throws unless the person may approve the proposal now. */
export function refuseApproval(
  proposal: SpecificationProposalRow,
  viewer: { id: number; roles: readonly Role[] },
): void {
  const why = reasonNotToApproveSpecification(proposal, viewer);
  if (why === null) return;
  if (proposal.state === 'proposed' && proposal.proposedBy === viewer.id)
    throw new DomainError('forbidden', 'own-proposal', why);
  throw new DomainError('conflict', 'not-approvable', why);
}

/**
 * Puts a proposed specification in force as the next version. Lots that began since it holds are compared with it anew: returns the jobs
 * that are owed for judging them again.
 */
export async function approveSpecification(
  tx: Transaction,
  change: Change & { roles: readonly Role[] },
  id: number,
): Promise<number[]> {
  const { plantId, person, at } = change;
  const found = await findSpecificationProposal(tx, id);
  if (found?.plantId !== plantId) throw notFound();
  await lockStoring(tx, await listLineIdsOfCharacteristic(tx, found.characteristicId));
  const proposal = (await findSpecificationProposalForUpdate(tx, id)) ?? found;
  refuseApproval(proposal, { id: person.id, roles: change.roles });
  const { productId, characteristicId, validFrom } = proposal;
  const [former] = await listSpecificationVersions(tx, plantId, { productId, characteristicId });
  const limits = limitsOf(proposal);
  const inserted = await insertSpecificationVersion(tx, {
    plantId,
    productId,
    characteristicId,
    ...limits,
    validFrom,
    proposedBy: proposal.proposedBy,
    approvedBy: person.id,
    approvedAt: at,
  });
  await updateSpecificationProposalEnded(tx, id, {
    state: 'approved',
    by: person.id,
    at,
    specificationId: inserted.id,
  });
  await insertAuditEntry(tx, {
    plantId,
    at,
    actor: person,
    action: 'approve',
    thingKind: 'specification_proposal',
    thingId: id,
    sentence: `${person.name} approved version ${inserted.version} of ${proposal.characteristicName} of ${proposal.productCode}: ${limitsText(limits, proposal)}, proposed by ${proposal.proposedByName}.`,
    before: former ? { version: former.version, ...limitsOf(former) } : undefined,
    after: {
      version: inserted.version,
      ...limits,
      validFrom: validFrom.toISOString(),
      signature: { name: person.name, meaning: 'approved', at: at.toISOString() },
    },
  });
  return owedFor(tx, change, proposal);
}

/** Lots stored before the approval are compared with the version of their start; the baseline reaches to either side of it. */
async function owedFor(tx: Transaction, change: Change, proposal: SpecificationProposalRow): Promise<number[]> {
  const { productId, characteristicId, validFrom } = proposal;
  const channelIds = await updateSpecificationsOfLots(tx, { productId, characteristicId, from: validFrom });
  if (channelIds.length === 0) return [];
  const reachSeconds = await getBaselineReach(tx, channelIds);
  const owedJobId = await insertOwedJob(tx, {
    plantId: change.plantId,
    name: JOBS.scoreChannels,
    subject: {
      channelIds,
      reason: `the specification of ${proposal.characteristicName} of ${proposal.productCode}`,
      rejudgeFrom: new Date(validFrom.getTime() - reachSeconds * 1000).toISOString(),
    },
    at: change.at,
  });
  return [owedJobId];
}

/** Takes a proposal back: its proposer may, and quality managers. */
export async function withdrawSpecification(
  tx: Transaction,
  change: Change & { roles: readonly Role[] },
  id: number,
): Promise<void> {
  const { plantId, person, at } = change;
  const proposal = await findSpecificationProposalForUpdate(tx, id);
  if (proposal?.plantId !== plantId) throw notFound();
  if (!mayWithdraw(proposal, { id: person.id, roles: change.roles }))
    throw new DomainError(
      'forbidden',
      'not-own-proposal',
      `${proposal.proposedByName} proposed this: they withdraw it, or a quality manager does.`,
    );
  if (proposal.state !== 'proposed')
    throw new DomainError('conflict', 'not-pending', `This proposal is ${proposal.state} already.`);
  await updateSpecificationProposalEnded(tx, id, { state: 'withdrawn', by: person.id, at, specificationId: null });
  await insertAuditEntry(tx, {
    plantId,
    at,
    actor: person,
    action: 'withdraw',
    thingKind: 'specification_proposal',
    thingId: id,
    sentence: `${person.name} withdrew the proposed specification of ${proposal.characteristicName} of ${proposal.productCode}.`,
    before: { state: 'proposed', ...limitsOf(proposal) },
    after: { state: 'withdrawn' },
  });
}
