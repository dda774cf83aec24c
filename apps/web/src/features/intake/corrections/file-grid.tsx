import { ROLE_WORDS, type SheetGrid } from '@app/contracts';
import { Action } from '../../../shared/ui/action';
import { ColumnChoice } from './column-choice';
import { layoutWith, lettersOf, withColumn, withHeader } from './corrections';
import { SheetAnswers } from './sheet-answers';
import type { Draft } from './use-draft';

interface FileGridProps {
  grid: SheetGrid;
  draft: Draft;
  channels: { id: number; name: string; unit: string }[];
  /** May be corrected now. */
  isOpen: boolean;
}

/** A sheet's first rows as they stand in the file, with what each column is read as, to be corrected there. */
export function FileGrid({ grid, draft, channels, isOpen }: FileGridProps) {
  const { sheet, rows, isHidden, isRemembered } = grid;
  const layout = layoutWith(grid, draft.answers);
  const letters = lettersOf(grid);
  const isRead = layout.headerRow != null;
  const header = layout.headerRow ?? null;
  const channelName = (id: number | undefined) => channels.find((channel) => channel.id === id)?.name ?? 'a channel';
  return (
    <div className="grid-frame">
      <h3>
        {sheet}
        {isHidden && <span className="soft">, a hidden sheet</span>}
        {isRemembered && <span className="soft">, read as it was confirmed before</span>}
      </h3>
      {!isRead && (
        <p className="soft">
          Nothing on this sheet is read
          {isOpen && rows.length > 0 ? '. Say which row is its header to have it read' : ''}.
        </p>
      )}
      {rows.length > 0 && (
        <div className="table__wrap" tabIndex={0} role="region" aria-label={`First rows of ${sheet}, as in the file`}>
          <table className="sheet-grid">
            <thead>
              <tr>
                <td />
                {letters.map((column) => (
                  <th key={column} scope="col">
                    {column}
                  </th>
                ))}
              </tr>
              {isRead && (
                <tr className="sheet-grid__roles">
                  <th scope="row">read as</th>
                  {letters.map((column) => {
                    const answer = layout.columns?.[column];
                    return (
                      <td key={column} className={(answer?.role ?? 'ignored') === 'ignored' ? 'is-unused' : undefined}>
                        {isOpen ? (
                          <ColumnChoice
                            name={`column ${column} of ${sheet}`}
                            answer={answer}
                            channels={channels}
                            isDisabled={draft.isBusy}
                            onChange={(next) => draft.change(withColumn(draft.answers, sheet, column, next))}
                          />
                        ) : answer?.role === 'channel_values' ? (
                          <b>{channelName(answer.channelId)}</b>
                        ) : (
                          ROLE_WORDS[answer?.role ?? 'ignored']
                        )}
                      </td>
                    );
                  })}
                </tr>
              )}
            </thead>
            <tbody>
              {rows.map(({ row, cells, isHidden: isRowHidden }) => (
                <tr key={row} className={rowClass(row, header, isRowHidden)}>
                  <th scope="row">
                    {isOpen && row !== header ? (
                      <button
                        type="button"
                        className="sheet-grid__row"
                        title="Read this row as the header"
                        aria-label={`Row ${row}: read it as the header of ${sheet}`}
                        disabled={draft.isBusy}
                        onClick={() => draft.change(withHeader(draft.answers, sheet, row))}
                      >
                        {row}
                      </button>
                    ) : (
                      row
                    )}
                  </th>
                  {letters.map((column) => (
                    <td key={column}>{cells[column] ?? ''}</td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      {isOpen && (
        <p className="grid-frame__help">
          {isRead ? (
            <>
              Row {header} is the header; press another row’s number if it is that one.{' '}
              <Action
                kind="plain"
                isDisabled={draft.isBusy}
                onPress={() => draft.change(withHeader(draft.answers, sheet, null))}
              >
                Read nothing of {sheet}
              </Action>
            </>
          ) : (
            'Press the number of the row that names the columns.'
          )}
        </p>
      )}
      {isOpen && isRead && <SheetAnswers layout={layout} sheet={sheet} draft={draft} />}
    </div>
  );
}

function rowClass(row: number, header: number | null, isHidden: boolean): string | undefined {
  if (row === header) return 'sheet-grid__header';
  if (header !== null && row < header) return 'is-above';
  return isHidden ? 'is-hidden-row' : undefined;
}
