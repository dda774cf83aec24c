import { PageHeading } from '../../../shared/ui/page-heading';

export function PlanPage() {
  return <PageHeading title="…" />;
}
