import { PageHeading } from '../../../shared/ui/page-heading';

export function DeskPage() {
  return <PageHeading title="Desk" />;
}
