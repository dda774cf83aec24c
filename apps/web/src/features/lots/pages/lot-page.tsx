import { PageHeading } from '../../../shared/ui/page-heading';

export function LotPage() {
  return <PageHeading title="Lot" />;
}
