import type { SummaryView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { Sheet } from '../../../shared/ui/sheet';

/** The one thing to know, then what to ask whom. */
export function Headline({ summary }: { summary: SummaryView }) {
  const { headline, whatToAsk } = summary;
  return (
    <Sheet
      tone={summary.total.week.stillOpen.lots > 0 ? 'held' : 'plain'}
      margin={
        <p>
          Figures are those of the week as they stood when this version was made. A lot is of the week in which it
          ended.
        </p>
      }
    >
      <p className="summary__headline">{headline}</p>
      {whatToAsk.length > 0 && (
        <>
          <h3 className="summary__ask">What to ask whom</h3>
          <ul className="summary__questions">
            {whatToAsk.map(({ whom, question, path }) => (
              <li key={`${whom} ${question}`}>
                Ask {whom}: {path === null ? question : <Link to={path}>{question}</Link>}
              </li>
            ))}
          </ul>
        </>
      )}
    </Sheet>
  );
}
