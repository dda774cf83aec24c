import type { SetUpWorkbookProblem, SetUpWorkbookView } from '@app/contracts';
import { Action } from '../../../shared/ui/action';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import type { WorkbookState } from './use-workbook';
import { counted, outcomeHeading, placeWords } from './workbook-words';

const COLUMNS: FoldingColumn<SetUpWorkbookProblem>[] = [
  { name: 'Where', isLead: true, cell: (problem) => placeWords(problem) },
  { name: 'What is wrong', cell: (problem) => problem.what },
  { name: 'What to do', cell: (problem) => problem.whatToDo },
];
const NOTICE_COLUMNS = COLUMNS.map((column) =>
  column.name === 'What is wrong' ? { ...column, name: 'What was found' } : column,
);

interface OutcomeProps {
  fileName: string;
  view: SetUpWorkbookView;
  workbook: WorkbookState;
}

/** Problems by cell, or what would change and the one thing to press. */
export function WorkbookOutcome({ fileName, view, workbook }: OutcomeProps) {
  const { problems, notices, isApplied } = view;
  return (
    <div className="set-up-outcome">
      <p className="set-up-outcome__heading" role="status">
        {outcomeHeading(fileName, view)}
      </p>
      {problems.length > 0 ? <Table caption="Problems" columns={COLUMNS} items={problems} /> : <Changes view={view} />}
      {notices.length > 0 && (
        <>
          <h3>Passed over or doubtful: {notices.length}</h3>
          <Table caption="Passed over or doubtful" columns={NOTICE_COLUMNS} items={notices} />
        </>
      )}
      {!isApplied && problems.length === 0 && view.changeCount > 0 && (
        <div className="set-up-outcome__actions">
          <Action isBusy={workbook.doing === 'applying'} onPress={() => void workbook.apply()}>
            {workbook.doing === 'applying' ? 'Applying…' : 'Apply the workbook'}
          </Action>
          <Action kind="plain" isDisabled={workbook.doing !== 'nothing'} onPress={workbook.discard}>
            Leave all as it is
          </Action>
        </div>
      )}
    </div>
  );
}

function Table({
  caption,
  columns,
  items,
}: {
  caption: string;
  columns: readonly FoldingColumn<SetUpWorkbookProblem>[];
  items: readonly SetUpWorkbookProblem[];
}) {
  const keyOf = (problem: SetUpWorkbookProblem) => `${placeWords(problem)} ${problem.code} ${problem.what}`;
  return <FoldingTable caption={caption} columns={columns} items={items} keyOf={keyOf} />;
}

function Changes({ view: { summary, changes, changeCount } }: { view: SetUpWorkbookView }) {
  return (
    <>
      <ul className="set-up-outcome__list">
        {summary.map((sentence) => (
          <li key={sentence}>{sentence}</li>
        ))}
      </ul>
      {changes.length > 0 && (
        <details open={changes.length <= 20}>
          <summary>{counted(changeCount, 'row that is added or changed', 'rows that are added or changed')}</summary>
          <ul className="set-up-outcome__list">
            {changes.map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
            {changeCount > changes.length && <li className="soft">and {changeCount - changes.length} more</li>}
          </ul>
        </details>
      )}
    </>
  );
}
