import type { PlanView } from '@app/contracts';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { PARAMETER_ROWS, STATE_WORDS } from './plan-words';

const parameter = (name: string) => PARAMETER_ROWS.find((row) => row.name === name)?.text ?? (() => '–');

const COLUMNS: FoldingColumn<PlanView>[] = [
  { name: 'Revision', isLead: true, cell: (plan) => `${plan.revision}, ${STATE_WORDS[plan.state]}` },
  { name: 'Proposed by', cell: (plan) => plan.proposedBy ?? '–' },
  { name: 'Approved by', cell: (plan) => plan.approvedBy ?? 'nobody' },
  { name: 'Approved', cell: (plan) => (plan.approvedAt === null ? '–' : <When at={plan.approvedAt} form="short" />) },
  { name: 'Effective period', isNumber: true, cell: parameter('Effective period') },
  { name: 'Control limits', isNumber: true, cell: parameter('Control limits') },
  { name: 'Reason', cell: (plan) => plan.reason },
];

export function EarlierPlans({ plans }: { plans: readonly PlanView[] }) {
  if (plans.length === 0) return null;
  return (
    <Sheet title="Other revisions" isFlush>
      <FoldingTable caption="Other revisions" columns={COLUMNS} items={plans} keyOf={(plan) => plan.id} />
    </Sheet>
  );
}
