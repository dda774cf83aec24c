import { lotsInWords, type SummaryView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { FoldingTable } from '../../../shared/ui/folding-table';
import { Sheet } from '../../../shared/ui/sheet';
import { figureLink } from '../figure-links';

/** Lots without a score, and why. */
export function NotScored({ summary }: { summary: SummaryView }) {
  const { notScored, week } = summary;
  return (
    <Sheet
      title="Not scored, and why"
      isFlush={notScored.length > 0}
      margin={
        <p>
          A lot without a score on a channel has no verdict on its control limits there. What values it has are still
          judged against the specification.
        </p>
      }
    >
      {notScored.length === 0 ? (
        <EmptyNote>Every lot was scored on every channel on which it was measured.</EmptyNote>
      ) : (
        <FoldingTable
          caption="Lots without a score by channel and reason"
          items={notScored}
          keyOf={({ channel, reason }) => `${channel.id} ${reason}`}
          columns={[
            {
              name: 'Channel',
              isLead: true,
              cell: ({ channel, line }) => (
                <>
                  <Link to={urls.channel(channel.id)}>{channel.name}</Link>, {line.name}
                </>
              ),
            },
            {
              name: 'Lots',
              cell: (row) => <Link to={figureLink(row, row.line.id, week.startsOn)}>{lotsInWords(row.lots)}</Link>,
            },
            { name: 'Last week', cell: ({ lastWeekLots }) => <span className="number">{lastWeekLots}</span> },
            { name: 'Why', cell: ({ sentence }) => sentence },
          ]}
        />
      )}
    </Sheet>
  );
}
