import type { IntakeView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import { formatInstant } from '../../../shared/time/plant-time';
import { roleWords } from './intake-words';
import { sheetGrids, type SheetGrid } from './sheet-grid';

/** Each sheet on its own grid: letters, headers, what each column is read as, and the first rows as they were understood. */
export function Recognised({ intake }: { intake: IntakeView }) {
  const { plant } = useSession();
  const grids = sheetGrids(intake.columns, intake.firstRows, {
    time: (at, form) => formatInstant(at, plant.timeZone, form),
  });
  return (
    <>
      {grids.map((grid) => (
        <Grid key={grid.sheet} grid={grid} />
      ))}
    </>
  );
}

function Grid({ grid }: { grid: SheetGrid }) {
  return (
    <div className="grid-frame">
      <h3>{grid.sheet}</h3>
      <div className="table__wrap" tabIndex={0} role="region" aria-label={`Columns and first rows of ${grid.sheet}`}>
        <table className="sheet-grid">
          <thead>
            <tr>
              <td />
              {grid.columns.map((column) => (
                <th key={column.column} scope="col">
                  {column.column}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            <tr className="sheet-grid__header">
              <th scope="row">header</th>
              {grid.columns.map((column) => (
                <td key={column.column}>{column.header}</td>
              ))}
            </tr>
            <tr className="sheet-grid__roles">
              <th scope="row">read as</th>
              {grid.columns.map((column) => (
                <td key={column.column} className={column.role === 'ignored' ? 'is-unused' : undefined}>
                  {roleWords(column.role)}
                  {column.channel !== null && <b> {column.channel.name}</b>}
                  {column.unit !== null && <span>, {column.unit}</span>}
                </td>
              ))}
            </tr>
            {grid.rows.map((row) => (
              <tr key={row.row}>
                <th scope="row">{row.row}</th>
                {row.cells.map((cell, i) => (
                  <td
                    key={grid.columns[i].column}
                    className={isNumeric(grid.columns[i].role) ? 'is-number' : undefined}
                  >
                    {cell}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </div>
  );
}

const isNumeric = (role: string) => role === 'value' || role === 'channel_values' || role === 'quantity';
