import { compareSetUps, type RowComparison, type SheetComparison, type SheetKey } from '@app/workbook';
import { addCharacteristic, changeCharacteristic } from '../set-up/characteristics';
import { addGauge, changeGauge } from '../set-up/gauges';
import { addLine } from '../set-up/lines';
import { changePlant } from '../set-up/plants';
import { addProduct, changeProduct } from '../set-up/products';
import { changeShifts } from '../set-up/shifts';
import { applyChannels } from './apply-channels';
import { applySpecifications } from './apply-specifications';
import { type Applying, eachRow, pickFields } from './applying';
import type { PeopleOfWorkbook } from './people-of-workbook.service';

/** Does what the workbook says, sheet by sheet, by the same functions as the set-up's pages; refusals become problems at their cells. */
export async function applySetUp(applying: Applying, people: PeopleOfWorkbook): Promise<SheetComparison[]> {
  const comparisons = compareSetUps(applying.present.document, applying.wanted);
  const of = (sheet: SheetKey) => comparisons.find((one) => one.sheet === sheet)!.rows;
  // In another zone every time of the workbook is another instant: without it the rest says nothing.
  if (!(await applyPlant(applying, of('plant')))) return comparisons;
  await applyShifts(
    applying,
    comparisons.find((one) => one.sheet === 'shifts')!,
  );
  const { change } = applying;
  await eachRow(applying, 'lines', of('lines'), 'name', {
    add: (tx, line) => addLine(tx, change, line),
    change: () => Promise.resolve(),
  });
  await eachRow(applying, 'products', of('products'), 'code', {
    add: (tx, product) => addProduct(tx, change, product),
    change: (tx, id, product, { fields }) => changeProduct(tx, change, id, pickFields(product, fields)),
  });
  await eachRow(applying, 'characteristics', of('characteristics'), 'name', {
    add: (tx, characteristic) => addCharacteristic(tx, change, characteristic),
    change: (tx, id, row, { fields }) => changeCharacteristic(tx, change, id, pickFields(row, fields)),
  });
  await applySpecifications(applying, of('specifications'));
  await eachRow(applying, 'gauges', of('gauges'), 'assetNumber', {
    add: (tx, gauge) => addGauge(tx, change, gauge),
    change: (tx, id, gauge, { fields }) => changeGauge(tx, change, id, pickFields(gauge, fields)),
  });
  await applyChannels(applying, of('channels'));
  await people.apply(applying, of('people'));
  return comparisons;
}

/** Whether the sheets that follow can be judged. */
async function applyPlant({ rows, change, wanted }: Applying, [row]: RowComparison[]): Promise<boolean> {
  if (row.kind === 'unchanged') return true;
  const { allowanceNoticePercent, allowanceCapPercent, ...rest } = pickFields(wanted.plant[0], row.fields);
  const share = (percent: number | undefined) =>
    percent === undefined ? undefined : Number((percent / 100).toPrecision(15));
  const body = {
    ...rest,
    ...(allowanceNoticePercent === undefined ? {} : { allowanceNoticeShare: share(allowanceNoticePercent) }),
    ...(allowanceCapPercent === undefined ? {} : { allowanceCapShare: share(allowanceCapPercent) }),
  };
  const isDone = await rows.attempt('plant', 0, 'name', (tx) => changePlant(tx, change, body).then(() => true));
  return isDone === true || !row.fields.includes('timeZone');
}

/** A calendar is one thing: it is put in force as a whole where a shift differs, is new, or is gone. */
async function applyShifts({ rows, change, wanted }: Applying, comparison: SheetComparison): Promise<void> {
  const differing = comparison.rows.find((row) => row.kind !== 'unchanged');
  const isGone = comparison.left.length > 0 && wanted.shifts.length > 0;
  if (!differing && !isGone) return;
  const [{ validFrom }] = wanted.shifts;
  const shifts = wanted.shifts.map(({ name, startsAt, endsAt }) => ({ name, startsAt, endsAt }));
  await rows.attempt('shifts', differing?.index ?? 0, 'validFrom', (tx) =>
    changeShifts(tx, change, { validFrom, shifts }),
  );
}
