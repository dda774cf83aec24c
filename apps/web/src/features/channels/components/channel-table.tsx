import type { ChannelView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { When } from '../../../shared/ui/when';
import { pendingWords } from '../pending-words';

export function ChannelTable({ channels }: { channels: ChannelView[] }) {
  return (
    <table className="plain folds channels">
      <thead>
        <tr>
          <th>Channel</th>
          <th>Gauge</th>
          <th>Position</th>
          <th>Plan in force</th>
          <th>Waiting</th>
        </tr>
      </thead>
      <tbody>
        {channels.map((channel) => (
          <ChannelRow key={channel.id} channel={channel} />
        ))}
      </tbody>
    </table>
  );
}

function ChannelRow({ channel }: { channel: ChannelView }) {
  const { characteristic, gauge, planInForce, planPending, retiredSince } = channel;
  return (
    <tr>
      <td className="folds__first">
        <Link to={urls.channel(channel.id)}>{channel.name}</Link> <span className="soft">{characteristic.unit}</span>
        {retiredSince !== null && (
          <span className="soft">
            , retired since <When at={retiredSince} form="date" />
          </span>
        )}
      </td>
      <td data-label="Gauge">
        {gauge === null ? <span className="soft">no gauge now</span> : `${gauge.assetNumber}, ${gauge.kind}`}
      </td>
      <td data-label="Position" className={gauge === null ? 'is-nothing' : undefined}>
        {gauge?.position ?? '–'}
      </td>
      <td data-label="Plan in force">
        <Link to={urls.plans(channel.id)} aria-label={`Plans of ${channel.name}`}>
          {planInForce === null ? 'none' : `revision ${planInForce.revision}`}
        </Link>
        {planInForce !== null && (
          <span className="soft">
            {' since '}
            <When at={planInForce.since} form="day" />
          </span>
        )}
      </td>
      <td data-label="Waiting" className={planPending === null ? 'is-nothing' : undefined}>
        {planPending === null ? <span className="soft">–</span> : pendingWords(planPending)}
      </td>
    </tr>
  );
}
