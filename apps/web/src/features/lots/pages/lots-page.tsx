import { PageHeading } from '../../../shared/ui/page-heading';

export function LotsPage() {
  return <PageHeading title="Lots" />;
}
