import { PageHeading } from '../../../shared/ui/page-heading';

export function IntakesPage() {
  return <PageHeading title="…" />;
}
