import { useParams } from 'react-router-dom';
import { useLine } from '../../../shared/line-context/line-context';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { useChannels } from '../api/channels';
import { ChannelTable } from '../components/channel-table';

/** What is measured on this line, by which gauge, and by which plan is it judged? */
export function ChannelsPage() {
  const lineId = Number(useParams().lineId);
  const { lines } = useLine();
  const query = useChannels(lineId);
  const name = lines.find((line) => line.id === lineId)?.name;
  return (
    <>
      <PageHeading title={name === undefined ? 'Channels' : `Channels of ${name}`} />
      <Sheet margin={<ChannelsMargin />} isFlush>
        <Loaded
          query={query}
          failure="The channels could not be loaded."
          isEmpty={(channels) => channels.length === 0}
          empty={<EmptyNote>This line measures nothing yet. An administrator sets up its channels.</EmptyNote>}
        >
          {(channels) => <ChannelTable channels={channels} />}
        </Loaded>
      </Sheet>
    </>
  );
}

function ChannelsMargin() {
  return (
    <>
      <p>
        A channel is one gauge that measures one characteristic on one line. It has a baseline, a plan and control
        limits of its own.
      </p>
      <p>Its record shows what the gauge and the process did.</p>
    </>
  );
}
