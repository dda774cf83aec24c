import { PageHeading } from '../../../shared/ui/page-heading';

export function IntakePage() {
  return <PageHeading title="…" />;
}
