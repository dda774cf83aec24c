import type { PlanView } from '@app/contracts';
import { PARAMETER_ROWS, STATE_WORDS } from './plan-words';

/** The numbers of a plan, or of two side by side; where they differ they stand out. */
export function ParameterTable({ plans }: { plans: readonly PlanView[] }) {
  return (
    <table className="plain parameters">
      <caption className="visually-hidden">Parameters by revision</caption>
      <thead>
        <tr>
          <th scope="col">Parameter</th>
          {plans.map((plan) => (
            <th key={plan.id} scope="col" className="is-number">
              Revision {plan.revision}, {STATE_WORDS[plan.state]}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {PARAMETER_ROWS.map((row) => {
          const texts = plans.map((plan) => row.text(plan));
          const isDifferent = new Set(texts).size > 1;
          return (
            <tr key={row.name}>
              <td>
                {row.name} <span className="parameters__meaning">{row.meaning}</span>
              </td>
              {texts.map((text, i) => (
                <td key={plans[i].id} className={isDifferent ? 'is-number is-different' : 'is-number'}>
                  {text}
                </td>
              ))}
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}
