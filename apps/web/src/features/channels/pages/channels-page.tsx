import { PageHeading } from '../../../shared/ui/page-heading';

export function ChannelsPage() {
  return <PageHeading title="Channels" />;
}
