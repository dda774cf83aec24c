import { Fragment, useEffect, useId, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';
import type { FoldingColumn } from '../../../shared/ui/folding-table';
import { Action } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';

/** What can be done with a row: its words, and the form or question that opens below the row. */
export interface RowAction {
  words: string;
  /** Its words beside the row's name, for those who hear them alone. */
  label: string;
  panel: (onDone: () => void) => ReactNode;
}

interface RowTableProps<T> {
  caption: string;
  columns: readonly FoldingColumn<T>[];
  items: readonly T[];
  keyOf: (item: T) => string | number;
  /** One sentence that says what would be here and how it comes. */
  empty: string;
  isSoft?: (item: T) => boolean;
  actionsOf?: (item: T) => readonly RowAction[];
  /** Always shown below a row, such as what waits there for a word. */
  below?: (item: T) => ReactNode;
  /** The form of a new row. */
  add?: { words: string; kind?: 'plain'; form: (onDone: () => void) => ReactNode };
}

const ADDING = 'add';

/** A dense table in which one row at a time is changed or added, in a form row of its own. */
export function RowTable<T>(props: RowTableProps<T>) {
  const { caption, columns, items, keyOf, empty, isSoft, actionsOf, below, add } = props;
  const { opened, open, close, box } = useOnePanel();
  const id = useId();
  const hasActions = actionsOf !== undefined && items.some((item) => actionsOf(item).length > 0);
  const width = columns.length + (hasActions ? 1 : 0);
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key === 'Escape' && opened !== null) close();
  };
  return (
    <div className="rows" ref={box} onKeyDown={onKeyDown}>
      {items.length === 0 ? (
        <div className="rows__empty">
          <EmptyNote>{empty}</EmptyNote>
        </div>
      ) : (
        <table className="plain folds">
          <caption className="visually-hidden">{caption}</caption>
          <thead>
            <tr>
              {columns.map((column) => (
                <th key={column.name} scope="col" className={column.isNumber ? 'is-number' : undefined}>
                  {column.name}
                </th>
              ))}
              {hasActions && (
                <th scope="col">
                  <span className="visually-hidden">What can be done</span>
                </th>
              )}
            </tr>
          </thead>
          <tbody>
            {items.map((item) => {
              const actions = actionsOf?.(item) ?? [];
              const panelOf = (action: RowAction) => `${keyOf(item)} ${action.words}`;
              const panel = actions.find((action) => panelOf(action) === opened);
              const under = below?.(item);
              const hasUnder = under !== undefined && under !== null;
              const names = [
                isSoft?.(item) === true && 'soft',
                (panel !== undefined || hasUnder) && 'is-opened',
              ].filter(Boolean);
              return (
                <Fragment key={keyOf(item)}>
                  <tr className={names.join(' ') || undefined}>
                    {columns.map((column) => (
                      <td
                        key={column.name}
                        className={column.isLead ? 'folds__first' : column.isNumber ? 'is-number' : undefined}
                        data-label={column.isLead ? undefined : column.name}
                      >
                        {column.cell(item)}
                      </td>
                    ))}
                    {hasActions && (
                      <td className="rows__actions">
                        {actions.map((action) => (
                          <Action
                            key={action.words}
                            kind="plain"
                            label={action.label}
                            onPress={() => (panel === action ? close() : open(panelOf(action)))}
                          >
                            {action.words}
                          </Action>
                        ))}
                      </td>
                    )}
                  </tr>
                  {hasUnder && (
                    <tr className={panel === undefined ? 'rows__below' : 'rows__below is-opened'}>
                      <td colSpan={width}>{under}</td>
                    </tr>
                  )}
                  {panel !== undefined && (
                    <tr className="rows__panel">
                      <td colSpan={width}>{panel.panel(close)}</td>
                    </tr>
                  )}
                </Fragment>
              );
            })}
          </tbody>
        </table>
      )}
      {add !== undefined && (
        <div className="rows__add" id={id}>
          {opened === ADDING ? (
            add.form(close)
          ) : (
            <Action kind={add.kind ?? 'quiet'} onPress={() => open(ADDING)}>
              {add.words}
            </Action>
          )}
        </div>
      )}
    </div>
  );
}

/** At most one panel is open; when it closes, the focus goes back to where it was opened from, or to the button that adds. */
function useOnePanel() {
  const [opened, setOpened] = useState<string | null>(null);
  const box = useRef<HTMLDivElement>(null);
  const opener = useRef<HTMLElement | null>(null);
  const wasOpen = useRef(false);
  useEffect(() => {
    if (opened !== null) {
      const panel = box.current?.querySelector(opened === ADDING ? '.rows__add' : '.rows__panel');
      panel?.querySelector<HTMLElement>('input, select, button')?.focus();
    } else if (wasOpen.current) {
      const back = opener.current?.isConnected === true ? opener.current : null;
      (back ?? box.current?.querySelector<HTMLElement>('.rows__add button'))?.focus();
    }
    wasOpen.current = opened !== null;
  }, [opened]);
  const open = (panel: string) => {
    opener.current = document.activeElement instanceof HTMLElement ? document.activeElement : null;
    setOpened(panel);
  };
  return { opened, open, close: () => setOpened(null), box };
}
