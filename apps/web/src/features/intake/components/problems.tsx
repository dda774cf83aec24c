import type { IntakeView } from '@app/contracts';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { cellName, counted, groupProblems, SEVERITIES, SEVERITY_WORDS, type ProblemGroup } from './intake-words';

const SHOWN = 25;

/** Every problem with its sheet and cell, grouped; the gravest first and open. What is asked stands with the questions. */
export function Problems({ intake }: { intake: IntakeView }) {
  const asked = new Set(intake.questions.map(({ code }) => code));
  const groups = groupProblems(intake).filter(({ code, severity }) => !(severity === 'blocking' && asked.has(code)));
  if (groups.length === 0) return <EmptyNote>Nothing in the workbook was in doubt.</EmptyNote>;
  return (
    <>
      {SEVERITIES.map((severity) => {
        const own = groups.filter((group) => group.severity === severity);
        if (own.length === 0) return null;
        return (
          <section key={severity} className="problem-section">
            <h3 className={severity === 'blocking' ? 'is-blocking' : undefined}>{headingOf(severity, own)}</h3>
            {own.map((group) => (
              <Group key={group.code} group={group} />
            ))}
          </section>
        );
      })}
    </>
  );
}

function headingOf(severity: ProblemGroup['severity'], groups: ProblemGroup[]): string {
  const count = groups.reduce((sum, group) => sum + group.count, 0);
  const words = SEVERITY_WORDS[severity];
  return `${words[0].toUpperCase()}${words.slice(1)}: ${count.toLocaleString('en-GB')}`;
}

function Group({ group }: { group: ProblemGroup }) {
  const [first] = group.problems;
  if (first === undefined) return null;
  if (group.count === 1) {
    return (
      <p className="problem-line">
        <code>{cellName(first)}</code> {first.detail}
      </p>
    );
  }
  const shown = group.problems.slice(0, SHOWN);
  return (
    <details className="problem-group" open={group.severity === 'blocking'}>
      <summary>
        {counted(group.count, 'time', 'times')}, first at <code>{cellName(first)}</code>: {first.detail}
      </summary>
      <ul>
        {shown.map((problem) => (
          <li key={`${cellName(problem)} ${problem.detail}`}>
            <code>{cellName(problem)}</code> {problem.detail}
          </li>
        ))}
        {group.count > shown.length && (
          <li className="soft">
            and {(group.count - shown.length).toLocaleString('en-GB')} more; the marked workbook shows them all.
          </li>
        )}
      </ul>
    </details>
  );
}
