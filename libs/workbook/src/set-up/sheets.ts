import { ROLE_NAMES, ROLES } from '@app/contracts';
import * as read from './cell-values';
import type { SetUpDocument, SheetKey } from './document';

/** How a column's values are written. */
export type CellStyle = 'text' | 'number' | 'yes_no' | 'clock' | 'day' | 'stamp' | 'list' | 'roles';

export interface ColumnDefinition {
  /** Of the row's field. */
  key: string;
  header: string;
  unit?: string;
  style: CellStyle;
  isRequired: boolean;
  read: read.CellReader;
  /** In characters. */
  width: number;
  /** A plain sentence: what the column wants. */
  wants: string;
  example: string;
  /** The sheet and its column whose values may stand here, for a list to choose from. */
  choices?: { sheet: SheetKey; key: string };
}

export interface SheetDefinition {
  key: SheetKey;
  name: string;
  /** A row, for sentences: "line". */
  thing: string;
  /** What the sheet is for, in a sentence. */
  about: string;
  columns: ColumnDefinition[];
  /** Fields that together name a row; no two rows share them. */
  identity: string[];
}

type Options = Pick<ColumnDefinition, 'wants' | 'example'> &
  Partial<Pick<ColumnDefinition, 'unit' | 'width' | 'isRequired' | 'choices' | 'read'>>;

const column =
  <K extends SheetKey>() =>
  (
    key: keyof SetUpDocument[K][number] & string,
    header: string,
    style: CellStyle,
    { isRequired = true, width = 18, read: reader = READERS[style], ...options }: Options,
  ): ColumnDefinition => ({ key, header, style, isRequired, width, read: reader, ...options });

const READERS: Record<CellStyle, read.CellReader> = {
  text: read.text(100),
  number: read.number(),
  yes_no: read.yesNo,
  clock: read.clock,
  day: read.day,
  stamp: read.stamp,
  list: read.list,
  roles: read.roles,
};

const positive = read.number({ isPositive: true });
const percent = read.number({ isPositive: true, isPercent: true });

const plant = column<'plant'>();
const shift = column<'shifts'>();
const line = column<'lines'>();
const product = column<'products'>();
const characteristic = column<'characteristics'>();
const specification = column<'specifications'>();
const gauge = column<'gauges'>();
const channel = column<'channels'>();
const person = column<'people'>();

/** The sheets in the order of the workbook; a sheet names only what stands on sheets before it. */
export const SHEETS: readonly SheetDefinition[] = [
  {
    key: 'plant',
    name: 'Plant',
    thing: 'plant',
    about: 'The plant itself: one row.',
    identity: [],
    columns: [
      plant('name', 'Name', 'text', { wants: 'The plant’s name.', example: 'Marrowby Works', width: 24 }),
      plant('timeZone', 'Time zone', 'text', {
        read: read.timeZone,
        wants:
          'The zone of all times in this workbook, by its IANA name. It stays as it is once the plant has readings.',
        example: 'Europe/London',
      }),
      plant('currency', 'Currency', 'text', {
        read: read.currency,
        isRequired: false,
        width: 10,
        wants: 'What values of products are stated in, as three capital letters; empty when none are stated.',
        example: 'GBP',
      }),
      plant('engineerMayRelease', 'Engineers may release', 'yes_no', {
        wants: 'Whether quality engineers may release lots held for control limits alone: yes or no.',
        example: 'no',
      }),
      plant('reminderManagerHours', 'Reminder to quality managers', 'number', {
        read: positive,
        unit: 'h',
        wants: 'Age of an open hold at which quality managers are reminded.',
        example: '8',
      }),
      plant('reminderDirectorHours', 'Reminder to directors', 'number', {
        read: positive,
        unit: 'h',
        wants: 'Age of an open hold at which directors are reminded; not below that of quality managers.',
        example: '24',
      }),
      plant('allowanceNoticePercent', 'Allowance, notice', 'number', {
        read: percent,
        unit: '% of tolerance',
        wants: 'Movement of a baseline that is told.',
        example: '10',
      }),
      plant('allowanceCapPercent', 'Allowance, cap', 'number', {
        read: percent,
        unit: '% of tolerance',
        wants: 'Movement of a baseline beyond which lots are not scored; not below the notice.',
        example: '25',
      }),
    ],
  },
  {
    key: 'shifts',
    name: 'Shifts',
    thing: 'shift',
    about:
      'The newest shift calendar: a row a shift. Shifts do not overlap. Where anything differs, the calendar is replaced as a whole.',
    identity: ['name'],
    columns: [
      shift('name', 'Name', 'text', { wants: 'The shift’s name.', example: 'early' }),
      shift('startsAt', 'Starts', 'clock', { wants: 'Time of day at which it begins.', example: '06:00', width: 10 }),
      shift('endsAt', 'Ends', 'clock', {
        wants: 'Time of day at which it ends; at or before the start means the next day.',
        example: '14:00',
        width: 10,
      }),
      shift('validFrom', 'Valid from', 'day', {
        wants: 'First day of this calendar, the same in every row. Change it whenever a shift changes.',
        example: '2026-01-05',
        width: 14,
      }),
    ],
  },
  {
    key: 'lines',
    name: 'Lines',
    thing: 'line',
    about: 'The production lines. A line is known by its name: another name is another line.',
    identity: ['name'],
    columns: [line('name', 'Name', 'text', { wants: 'The line’s name.', example: 'Coater 2', width: 24 })],
  },
  {
    key: 'products',
    name: 'Products',
    thing: 'product',
    about: 'What lots are made of. A product is known by its code.',
    identity: ['code'],
    columns: [
      product('code', 'Code', 'text', { wants: 'The code as readings name it.', example: 'SEP-16' }),
      product('name', 'Name', 'text', { wants: 'The name as people say it.', example: 'Separator 16 µm', width: 30 }),
      product('valuePerUnit', 'Value per unit', 'number', {
        read: positive,
        isRequired: false,
        unit: 'currency of the plant',
        width: 30,
        wants: 'What one unit of a lot’s quantity is worth; empty when it is not stated.',
        example: '0.42',
      }),
    ],
  },
  {
    key: 'characteristics',
    name: 'Characteristics',
    thing: 'characteristic',
    about: 'What is measured. A characteristic is known by its name.',
    identity: ['name'],
    columns: [
      characteristic('name', 'Name', 'text', {
        wants: 'The characteristic’s name.',
        example: 'Coat weight',
        width: 28,
      }),
      characteristic('unit', 'Unit', 'text', {
        isRequired: false,
        read: read.text(30),
        wants:
          'Its unit; empty for one without, such as pH. It stays as it is once there are readings or a specification.',
        example: 'g/m²',
        width: 12,
      }),
      characteristic('resolution', 'Resolution', 'number', {
        read: positive,
        unit: 'unit of the characteristic',
        wants: 'Smallest step of an indication.',
        example: '0.01',
        width: 28,
      }),
    ],
  },
  {
    key: 'specifications',
    name: 'Specifications',
    thing: 'specification',
    about:
      'Nominal value and specification limits, a row a product and characteristic: the version that waits for approval, or else the newest. What differs is proposed, and holds once a second person has approved it.',
    identity: ['product', 'characteristic'],
    columns: [
      specification('product', 'Product', 'text', {
        wants: 'Code of a product on the sheet Products.',
        example: 'SEP-16',
        choices: { sheet: 'products', key: 'code' },
      }),
      specification('characteristic', 'Characteristic', 'text', {
        wants: 'Name of a characteristic on the sheet Characteristics.',
        example: 'Coat weight',
        width: 28,
        choices: { sheet: 'characteristics', key: 'name' },
      }),
      specification('nominal', 'Nominal value', 'number', {
        unit: 'unit of the characteristic',
        wants: 'The value aimed at.',
        example: '60',
        width: 26,
      }),
      specification('lower', 'Lower specification limit', 'number', {
        isRequired: false,
        unit: 'unit of the characteristic',
        wants: 'Empty when there is none; one of both limits is needed.',
        example: '58.8',
        width: 26,
      }),
      specification('upper', 'Upper specification limit', 'number', {
        isRequired: false,
        unit: 'unit of the characteristic',
        wants: 'Empty when there is none; above the lower one.',
        example: '61.2',
        width: 26,
      }),
      specification('appliesToIndividuals', 'Applies to every reading', 'yes_no', {
        wants: 'Whether every reading is compared with the specification limits, not only the lot mean: yes or no.',
        example: 'yes',
      }),
      specification('validFrom', 'Valid from', 'stamp', {
        isRequired: false,
        wants:
          'Plant time from which these values hold; empty: from the import on. Change or empty it whenever a value changes.',
        example: '2026-01-05 06:00',
        width: 20,
      }),
    ],
  },
  {
    key: 'gauges',
    name: 'Gauges',
    thing: 'gauge',
    about: 'The measuring instruments. A gauge is known by its asset number.',
    identity: ['assetNumber'],
    columns: [
      gauge('assetNumber', 'Asset number', 'text', { wants: 'The number on its label.', example: 'MW-0217' }),
      gauge('kind', 'Kind', 'text', { wants: 'What kind of instrument it is.', example: 'beta gauge', width: 28 }),
    ],
  },
  {
    key: 'channels',
    name: 'Channels',
    thing: 'channel',
    about:
      'Which gauge measures which characteristic on which line. A channel is known by its line and name; one gauge may serve several.',
    identity: ['line', 'name'],
    columns: [
      channel('line', 'Line', 'text', {
        wants: 'Name of a line on the sheet Lines.',
        example: 'Coater 2',
        choices: { sheet: 'lines', key: 'name' },
      }),
      channel('name', 'Name', 'text', {
        wants: 'The channel’s name, one of its kind on the line.',
        example: 'Coat weight',
        width: 24,
      }),
      channel('characteristic', 'Characteristic', 'text', {
        wants: 'Name of a characteristic on the sheet Characteristics. A channel keeps it for good.',
        example: 'Coat weight',
        width: 28,
        choices: { sheet: 'characteristics', key: 'name' },
      }),
      channel('position', 'Position', 'text', { wants: 'Where the gauge stands.', example: 'exit', width: 14 }),
      channel('gauge', 'Gauge', 'text', {
        isRequired: false,
        wants: 'Asset number of the gauge that serves now, from the sheet Gauges. A new channel needs one.',
        example: 'MW-0217',
        choices: { sheet: 'gauges', key: 'assetNumber' },
      }),
      channel('gaugeSince', 'Gauge since', 'stamp', {
        isRequired: false,
        wants: 'Plant time since which this gauge serves here: not after the first readings that you will upload.',
        example: '2026-01-05 06:00',
        width: 20,
      }),
    ],
  },
  {
    key: 'people',
    name: 'People',
    thing: 'person',
    about: 'Who may do what. A person is known by the mail address; who is new gets an invitation by mail.',
    identity: ['email'],
    columns: [
      person('email', 'Mail address', 'text', {
        read: read.email,
        wants: 'One address.',
        example: 'lena.ahrens@marrowby.example',
        width: 34,
      }),
      person('name', 'Name', 'text', {
        wants: 'First and family name. Whoever has signed in before keeps the name they have.',
        example: 'Lena Ahrens',
        width: 24,
      }),
      person('roles', 'Roles', 'roles', {
        wants: `One or more of these, with a semicolon between: ${ROLES.map((role) => ROLE_NAMES[role]).join('; ')}.`,
        example: 'quality engineer; line lead',
        width: 34,
      }),
      person('lines', 'Lines', 'list', {
        isRequired: false,
        wants: 'Names of lines on the sheet Lines, with a semicolon between: whose mail the person gets.',
        example: 'Coater 2; Calender 1',
        width: 34,
      }),
    ],
  },
];

export const headerOf = ({ header, unit }: ColumnDefinition): string => (unit ? `${header} [${unit}]` : header);

export const sheetOf = (key: SheetKey): SheetDefinition => SHEETS.find((sheet) => sheet.key === key)!;

/** The sheet that explains the others; it is not read. */
export const EXPLANATION_SHEET = 'Read this first';
