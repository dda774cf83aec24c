import { foldName } from '../reading/names';
import type { SetUpPlaces, SheetKey } from './document';
import { checkNumbers } from './check-numbers';
import { checkShifts } from './check-shifts';
import type { ProblemList } from './problem-list';
import { cellOf, type LooseDocument, type LooseRow, type Say } from './loose';
import { sheetOf, SHEETS } from './sheets';
import { quoted } from './texts';
import { isKnownUnit } from './units';

/** Checks what the rows say of each other; rows and fields that could not be read are passed over. */
export function checkSetUp(
  document: LooseDocument,
  places: SetUpPlaces,
  problems: ProblemList,
  notices: ProblemList,
): void {
  const sayTo =
    (list: ProblemList): Say =>
    (sheet, index, field, code, what, whatToDo) =>
      list.add({ sheet: sheetOf(sheet).name, cell: cellOf(places, sheet, index, field), code, what, whatToDo });
  const say = sayTo(problems);
  checkPlantRows(document, say);
  for (const { key } of SHEETS) checkDoubled(key, document[key] ?? [], places, say);
  checkPlaces(document.channels ?? [], places, say);
  checkReferences(document, say);
  checkShifts(document.shifts ?? [], places.shifts.rows, say);
  checkNumbers(document, say);
  document.characteristics?.forEach(({ unit }, index) => {
    if (typeof unit === 'string' && !isKnownUnit(unit))
      sayTo(notices)(
        'characteristics',
        index,
        'unit',
        'unknown-unit',
        `The unit ${quoted(unit)} is none that is known.`,
        'Check its spelling; it is taken as it stands.',
      );
  });
}

function checkPlantRows({ plant }: LooseDocument, say: Say): void {
  if (!plant) return;
  if (plant.length === 0)
    say('plant', 0, 'name', 'plant-missing', 'The sheet Plant has no row.', 'Write the plant’s values into row 2.');
  if (plant.length > 1)
    say(
      'plant',
      1,
      'name',
      'plant-twice',
      'The sheet Plant has a second row, and a workbook sets up one plant.',
      'Delete it.',
    );
}

function checkDoubled(key: SheetKey, rows: LooseRow[], places: SetUpPlaces, say: Say): void {
  const { identity, thing, columns } = sheetOf(key);
  if (identity.length === 0) return;
  const first = new Map<string, number>();
  rows.forEach((row, index) => {
    const names = identity.map((field) => row[field]);
    if (names.some((name) => typeof name !== 'string')) return;
    const known = first.get(JSON.stringify(names));
    if (known === undefined) return void first.set(JSON.stringify(names), index);
    const field = identity[identity.length - 1];
    const header = columns.find((column) => column.key === field)!.header;
    say(
      key,
      index,
      field,
      'doubled',
      `The ${thing} ${names.map((name) => quoted(name as string)).join(', ')} stands in row ${places[key].rows[known]} already.`,
      `Delete one of both rows, or change ${header}.`,
    );
  });
}

/** Two channels of a line cannot share position and characteristic. */
function checkPlaces(rows: LooseRow[], places: SetUpPlaces, say: Say): void {
  const first = new Map<string, number>();
  rows.forEach(({ line, position, characteristic }, index) => {
    if ([line, position, characteristic].some((name) => typeof name !== 'string')) return;
    const key = JSON.stringify([line, position, characteristic]);
    const known = first.get(key);
    if (known === undefined) first.set(key, index);
    else
      say(
        'channels',
        index,
        'position',
        'place-doubled',
        `Row ${places.channels.rows[known]} measures ${quoted(characteristic as string)} at ${quoted(position as string)} of this line already.`,
        'Name another position.',
      );
  });
}

const REFERENCES: readonly { from: SheetKey; field: string; to: SheetKey; named: string }[] = [
  { from: 'specifications', field: 'product', to: 'products', named: 'code' },
  { from: 'specifications', field: 'characteristic', to: 'characteristics', named: 'name' },
  { from: 'channels', field: 'line', to: 'lines', named: 'name' },
  { from: 'channels', field: 'characteristic', to: 'characteristics', named: 'name' },
  { from: 'channels', field: 'gauge', to: 'gauges', named: 'assetNumber' },
  { from: 'people', field: 'lines', to: 'lines', named: 'name' },
];

function checkReferences(document: LooseDocument, say: Say): void {
  for (const { from, field, to, named } of REFERENCES) {
    const targets = document[to];
    if (!targets) continue;
    const names = targets.map((row) => row[named]).filter((name) => typeof name === 'string');
    const known = new Set(names);
    document[from]?.forEach((row, index) => {
      for (const name of [row[field]].flat()) {
        if (typeof name !== 'string' || known.has(name)) continue;
        const like = names.find((one) => foldName(one) === foldName(name));
        say(
          from,
          index,
          field,
          'unknown-reference',
          `The ${sheetOf(to).thing} ${quoted(name)} is not on the sheet ${sheetOf(to).name}.`,
          like ? `Write it as it stands there: ${quoted(like)}.` : 'Add a row for it there, or name one that is there.',
        );
      }
    });
  }
}
