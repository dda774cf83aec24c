import type { Characteristic, SpecificationProposalView } from '@app/contracts';
import { When } from '../../../shared/ui/when';
import { appliesWords, limitsWords } from '../specification-words';

/** What waits for a second person, and why the reader may not be that person. */
export function ProposalNote({
  proposal,
  characteristic,
}: {
  proposal: SpecificationProposalView;
  characteristic: Characteristic;
}) {
  return (
    <div className="proposal">
      <p>
        Proposed: {limitsWords(proposal, characteristic)}, {appliesWords(proposal)}, from{' '}
        <When at={proposal.validFrom} form="full" />. By {proposal.proposedBy} on{' '}
        <When at={proposal.proposedAt} form="short" />: {proposal.reason}
      </p>
      {!proposal.mayApprove && (
        <p className="soft">{proposal.whyNot ?? 'It waits for a quality manager who did not propose it.'}</p>
      )}
    </div>
  );
}
