import type { ReactNode } from 'react';

export interface FoldingColumn<T> {
  name: string;
  cell: (item: T) => ReactNode;
  isNumber?: boolean;
  /** The row's own name: stands alone on the first line when the table folds. */
  isLead?: boolean;
}

interface FoldingTableProps<T> {
  caption: string;
  columns: readonly FoldingColumn<T>[];
  items: readonly T[];
  keyOf: (item: T) => string | number;
}

/** A plain table whose rows fold to a few named lines on a phone, so that the page never scrolls sideways. */
export function FoldingTable<T>({ caption, columns, items, keyOf }: FoldingTableProps<T>) {
  return (
    <div className="table__wrap">
      <table className="plain folds">
        <caption className="visually-hidden">{caption}</caption>
        <thead>
          <tr>
            {columns.map((column) => (
              <th key={column.name} scope="col" className={column.isNumber ? 'is-number' : undefined}>
                {column.name}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {items.map((item) => (
            <tr key={keyOf(item)}>
              {columns.map((column) => (
                <td
                  key={column.name}
                  className={column.isLead ? 'folds__first' : column.isNumber ? 'is-number' : undefined}
                  data-label={column.isLead ? undefined : column.name}
                >
                  {column.cell(item)}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
