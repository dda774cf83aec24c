import type { IntakeOutcome, IntakeView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useSession } from '../../../shared/session/session';
import { When } from '../../../shared/ui/when';
import { counted } from './intake-words';

/** What came of a scored intake: the holds as sentences. */
export function Outcome({ intake }: { intake: IntakeView }) {
  const { outcome, scoredAt } = intake;
  if (outcome === null) return <p>The intake is scored.</p>;
  const { lotsHeld, lotsScored } = outcome;
  return (
    <>
      <p>
        {counted(lotsScored, 'lot')} scored
        {scoredAt !== null && (
          <>
            {' '}
            on <When at={scoredAt} form="short" />
          </>
        )}
        ; {lotsHeld.length === 0 ? 'none is held.' : `${counted(lotsHeld.length, 'is', 'are')} held:`}
      </p>
      <ul className="outcome">
        {lotsHeld.map((held) => (
          <li key={held.holdId}>
            {held.sentence} <Link to={urls.hold(held.holdId)}>Open the hold of lot {held.lotNumber}</Link>
          </li>
        ))}
      </ul>
      {outcome.notScored.map((notScored) => (
        <NotScored key={`${notScored.channel.id} ${notScored.reason}`} notScored={notScored} />
      ))}
      <BeforeFirstPlan lots={outcome.beforeFirstPlan} />
      <p className="soft">
        {counted(intake.readingsStored, 'reading')} stored, {intake.readingsAlreadyThere.toLocaleString('en-GB')} were
        there already and changed nothing.
      </p>
    </>
  );
}

/** Why lots have no score, and where that is seen to. */
function NotScored({ notScored }: { notScored: IntakeOutcome['notScored'][number] }) {
  const { can } = useSession();
  const { channel, reason, sentence, lots } = notScored;
  const wantsPlan = reason === 'no_plan_in_force';
  const propose = can('propose_plan') ? `Propose a plan for ${channel.name}` : `Plan of ${channel.name}`;
  return (
    <p className="outcome__note">
      {counted(lots, 'lot is', 'lots are')} not scored in {channel.name}: {sentence}.{' '}
      <Link to={wantsPlan ? urls.plans(channel.id) : urls.channel(channel.id)}>
        {wantsPlan ? propose : `Record of ${channel.name}`}
      </Link>
    </p>
  );
}

function BeforeFirstPlan({ lots }: { lots: IntakeOutcome['beforeFirstPlan'] }) {
  if (lots.length === 0) return null;
  const isOne = lots.length === 1;
  return (
    <p className="outcome__note">
      {isOne ? 'Lot' : 'Lots'}{' '}
      {lots.map(({ id, number }, index) => (
        <span key={id}>
          {index > 0 && (index === lots.length - 1 ? ' and ' : ', ')}
          <Link to={urls.lot(id)}>{number}</Link>
        </span>
      ))}{' '}
      {isOne ? 'lies outside its' : 'lie outside their'} control limits and {isOne ? 'is' : 'are'} not held:{' '}
      {isOne ? 'it was' : 'they were'} made before the channel’s first plan was approved.
    </p>
  );
}
