import { NO_GAUGE_CHECKS, type ChannelView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { When } from '../../../shared/ui/when';

/** What explains the panes: the plan in force, the caution, the words. */
export function RecordMargin({ channel }: { channel: ChannelView }) {
  const { planInForce, planPending, gauge, retiredSince } = channel;
  return (
    <>
      {retiredSince !== null && (
        <p>
          Retired since <When at={retiredSince} form="date" />: no new readings are taken. What was recorded stays.
        </p>
      )}
      <div>
        <h3>Plan</h3>
        {planInForce === null ? (
          <p>No plan is in force: lots are not scored.</p>
        ) : (
          <p>
            Revision {planInForce.revision}, in force since <When at={planInForce.since} form="day" />.
          </p>
        )}
        <p>
          <Link to={urls.plans(channel.id)}>
            {planPending === null
              ? 'See the plan’s revisions'
              : `Revision ${planPending.revision} is ${planPending.state === 'draft' ? 'being drafted' : 'proposed'}`}
          </Link>
        </p>
      </div>
      <div>
        <h3>Gauge or process?</h3>
        <p>{NO_GAUGE_CHECKS}</p>
        {gauge !== null && (
          <p>
            {gauge.kind}, asset {gauge.assetNumber}, {gauge.position}.
          </p>
        )}
      </div>
      <div>
        <h3>What the words mean</h3>
        <p>
          <b>Baseline:</b> the fitted slow movement of this channel, with its 95 % band. It starts afresh at each break.
        </p>
        <p>
          <b>Score:</b> how far a lot lies from the baseline fitted without it, in standard deviations of that
          difference.
        </p>
        <p>
          <b>Provisional</b> lots are drawn hollow: later readings may still move their verdict.
        </p>
        <p>Verdicts support a decision; they do not replace inspection or the person authorised to release the lot.</p>
      </div>
    </>
  );
}
