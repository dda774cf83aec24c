import { findRow, type Queryable, rows, type Transaction } from './database';

export interface SpecificationProposalRow {
  id: number;
  plantId: number;
  productId: number;
  productCode: string;
  characteristicId: number;
  characteristicName: string;
  unit: string;
  resolution: number;
  nominal: number;
  lower: number | null;
  upper: number | null;
  appliesToIndividuals: boolean;
  validFrom: Date;
  reason: string;
  state: 'proposed' | 'approved' | 'withdrawn';
  proposedBy: number;
  proposedByName: string;
  proposedAt: Date;
}

const SELECT = `
  select o.id, o.plant_id as "plantId", o.product_id as "productId", p.code as "productCode", o.characteristic_id as "characteristicId",
    x.name as "characteristicName", x.unit, x.resolution, o.nominal, o.lower, o.upper, o.applies_to_individuals as "appliesToIndividuals",
    o.valid_from as "validFrom", o.reason, o.state, o.proposed_by as "proposedBy", b.name as "proposedByName", o.proposed_at as "proposedAt"
  from specification_proposals o join products p on p.id = o.product_id join characteristics x on x.id = o.characteristic_id
  join people b on b.id = o.proposed_by`;

/** Those that wait for approval. */
export function listSpecificationProposals(db: Queryable, plantId: number): Promise<SpecificationProposalRow[]> {
  return rows<SpecificationProposalRow>(
    db,
    `${SELECT} where o.plant_id = :plantId and o.state = 'proposed' order by o.proposed_at, o.id`,
    { plantId },
  );
}

export function findSpecificationProposal(db: Queryable, id: number): Promise<SpecificationProposalRow | undefined> {
  return findRow<SpecificationProposalRow>(db, `${SELECT} where o.id = :id`, { id });
}

export function findSpecificationProposalForUpdate(
  tx: Transaction,
  id: number,
): Promise<SpecificationProposalRow | undefined> {
  return findRow<SpecificationProposalRow>(tx, `${SELECT} where o.id = :id for update of o`, { id });
}

export async function insertSpecificationProposal(
  tx: Transaction,
  proposal: {
    plantId: number;
    productId: number;
    characteristicId: number;
    nominal: number;
    lower: number | null;
    upper: number | null;
    appliesToIndividuals: boolean;
    validFrom: Date;
    reason: string;
    proposedBy: number;
    proposedAt: Date;
  },
): Promise<number> {
  const [{ id }] = await rows<{ id: number }>(
    tx,
    `insert into specification_proposals (plant_id, product_id, characteristic_id, nominal, lower, upper, applies_to_individuals, valid_from,
       reason, proposed_by, proposed_at)
     values (:plantId, :productId, :characteristicId, :nominal, :lower, :upper, :appliesToIndividuals, :validFrom, :reason, :proposedBy, :proposedAt)
     returning id`,
    proposal,
  );
  return id;
}

/** Ends one that waits: approved as the version given, or withdrawn. */
export async function updateSpecificationProposalEnded(
  tx: Transaction,
  id: number,
  ended: { state: 'approved' | 'withdrawn'; by: number; at: Date; specificationId: number | null },
): Promise<void> {
  await tx('specification_proposals')
    .where({ id, state: 'proposed' })
    .update({ state: ended.state, ended_by: ended.by, ended_at: ended.at, specification_id: ended.specificationId });
}
