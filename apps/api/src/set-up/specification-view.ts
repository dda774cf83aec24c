import type { Role, SpecificationProposalView, SpecificationSetUpView, SpecificationVersionView } from '@app/contracts';
import type {
  CharacteristicSetUpRow,
  ProductSetUpRow,
  SpecificationProposalRow,
  SpecificationVersionRow,
} from '@app/data';

interface Viewer {
  id: number;
  roles: readonly Role[];
}

export interface SpecificationRows {
  products: ProductSetUpRow[];
  characteristics: CharacteristicSetUpRow[];
  versions: SpecificationVersionRow[];
  proposals: SpecificationProposalRow[];
}

type Pair = { productId: number; characteristicId: number };

/** A product and characteristic with a version or a proposal each, in order of product code and characteristic. */
export function specificationViews(rows: SpecificationRows, viewer: Viewer): SpecificationSetUpView[] {
  return rows.products
    .flatMap((product) =>
      rows.characteristics.map((characteristic) =>
        specificationView(rows, { productId: product.id, characteristicId: characteristic.id }, viewer),
      ),
    )
    .filter(({ versions, proposal }) => versions.length > 0 || proposal !== null);
}

/** One product and characteristic. */
export function specificationView(rows: SpecificationRows, pair: Pair, viewer: Viewer): SpecificationSetUpView {
  const isOfPair = (row: Pair) => row.productId === pair.productId && row.characteristicId === pair.characteristicId;
  const product = rows.products.find(({ id }) => id === pair.productId) as ProductSetUpRow;
  const { id, name, unit, resolution } = rows.characteristics.find(
    (row) => row.id === pair.characteristicId,
  ) as CharacteristicSetUpRow;
  const proposal = rows.proposals.find(isOfPair);
  return {
    product: { id: product.id, code: product.code, name: product.name },
    characteristic: { id, name, unit, resolution },
    versions: rows.versions.filter(isOfPair).map(versionView),
    proposal: proposal ? proposalView(proposal, viewer) : null,
  };
}

const versionView = (row: SpecificationVersionRow): SpecificationVersionView => ({
  id: row.id,
  version: row.version,
  nominal: row.nominal,
  lower: row.lower,
  upper: row.upper,
  appliesToIndividuals: row.appliesToIndividuals,
  validFrom: row.validFrom.toISOString(),
  until: row.until?.toISOString() ?? null,
  proposedBy: row.proposedByName,
  approvedBy: row.approvedByName,
  approvedAt: row.approvedAt.toISOString(),
});

function proposalView(row: SpecificationProposalRow, viewer: Viewer): SpecificationProposalView {
  const whyNot = reasonNotToApproveSpecification(row, viewer);
  return {
    id: row.id,
    nominal: row.nominal,
    lower: row.lower,
    upper: row.upper,
    appliesToIndividuals: row.appliesToIndividuals,
    validFrom: row.validFrom.toISOString(),
    reason: row.reason,
    proposedBy: row.proposedByName,
    proposedAt: row.proposedAt.toISOString(),
    mayApprove: whyNot === null,
    whyNot,
    mayWithdraw: mayWithdraw(row, viewer),
  };
}

/** Null when the person may approve the proposal now. */
export function reasonNotToApproveSpecification(proposal: SpecificationProposalRow, viewer: Viewer): string | null {
  if (proposal.state === 'approved') return 'This proposal is approved.';
  if (proposal.state === 'withdrawn') return 'This proposal was withdrawn.';
  if (!viewer.roles.includes('quality_manager')) return 'A quality manager approves specifications.';
  if (proposal.proposedBy === viewer.id) return 'You proposed this specification: somebody else approves it.';
  return null;
}

/** Its proposer, and quality managers. */
export function mayWithdraw(proposal: SpecificationProposalRow, viewer: Viewer): boolean {
  return proposal.proposedBy === viewer.id || viewer.roles.includes('quality_manager');
}
