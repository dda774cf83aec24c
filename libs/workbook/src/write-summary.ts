import { DISPOSITIONS, type Measure, type SummaryContent, type SummaryLine, type WeekFigures } from '@app/contracts';
import { type TableColumn, type TableOptions, writeTables } from './write-table';

type Sheet = Omit<TableOptions, 'timeZone'>;

const text = (header: string, width?: number): TableColumn => ({ header, type: 'text', width });
const count = (header: string): TableColumn => ({ header, type: 'number', format: '0' });
const amount = (header: string, unit?: string): TableColumn => ({ header, unit, type: 'number', format: '#,##0.##' });
const share = (header: string): TableColumn => ({ header, type: 'number', format: '0%' });
const time = (header: string): TableColumn => ({ header, type: 'datetime', width: 20 });

/** A week's summary as an .xlsx file: a sheet for each of its lists, times as the plant's wall clock, shares as per cent. */
export function writeSummary(content: SummaryContent): Promise<Buffer> {
  const sheets = [
    overview(content),
    lines(content),
    quantities(content),
    openHolds(content),
    changedLots(content),
    gauges(content),
    notScored(content),
    intakes(content),
  ];
  return writeTables(sheets.map((sheet) => ({ ...sheet, timeZone: content.plant.timeZone })));
}

function overview({ plant, week, headline, whatToAsk }: SummaryContent): Sheet {
  return {
    sheetName: 'Week',
    columns: [text('What', 20), text('Said', 110)],
    rows: [
      ['Plant', `${plant.name}, ${plant.timeZone}`],
      ['Week from', week.startsOn],
      ['First to know', headline],
      ...whatToAsk.map(({ whom, question }) => [`Ask ${whom}`, question]),
    ],
  };
}

const WEEKS = [
  ['week', 'this week'],
  ['lastWeek', 'week before'],
] as const;

/** Every line in either week, the plant's total last. */
function eachWeek({ lines: all, total }: SummaryContent): { line: string; week: string; figures: WeekFigures }[] {
  const places: (Pick<SummaryLine, 'week' | 'lastWeek'> & { name: string })[] = [
    ...all.map(({ line, ...figures }) => ({ ...figures, name: line.name })),
    { ...total, name: 'All lines' },
  ];
  return places.flatMap((place) =>
    WEEKS.flatMap(([key, week]) => {
      const figures = place[key];
      return figures === null ? [] : [{ line: place.name, week, figures }];
    }),
  );
}

function lines(content: SummaryContent): Sheet {
  const ages = content.total.week.stillOpenByAge.map(({ fromHours, toHours }) =>
    count(toHours === null ? `Open over ${fromHours} h` : `Open ${fromHours} to ${toHours} h`),
  );
  return {
    sheetName: 'Lots by line',
    columns: [
      text('Line', 20),
      text('Week', 14),
      ...['Measured', 'Scored', 'Without a score on a channel', 'Held in the week'].map(count),
      ...DISPOSITIONS.map((disposition) => count(`Decided: ${disposition}`)),
      count('Open at the end'),
      ...ages,
    ],
    rows: eachWeek(content).map(({ line, week, figures }) => [
      line,
      week,
      figures.measured.lots,
      figures.scored.lots,
      figures.notFullyScored,
      figures.held.lots,
      ...DISPOSITIONS.map((disposition) => figures.decided.find((of) => of.disposition === disposition)?.lots ?? 0),
      figures.stillOpen.lots,
      ...figures.stillOpenByAge.map(({ lots }) => lots),
    ]),
  };
}

function quantities(content: SummaryContent): Sheet {
  const { currency } = content.plant;
  const rows = eachWeek(content).flatMap(({ line, week, figures }) => {
    const kinds: [string, Measure][] = [
      ['measured', figures.measured],
      ['scored', figures.scored],
      ['held in the week', figures.held],
      ...figures.decided.map((measure): [string, Measure] => [`decided: ${measure.disposition}`, measure]),
      ['open at the end', figures.stillOpen],
    ];
    return kinds.flatMap(([kind, measure]) => measure.quantities.map((of) => [line, week, kind, of.amount, of.unit]));
  });
  const values = eachWeek(content).flatMap(({ line, week, figures }) =>
    figures.stillOpen.value === null || currency === null
      ? []
      : [[line, week, 'value open at the end', figures.stillOpen.value.amount, currency]],
  );
  return {
    sheetName: 'Quantities',
    columns: [text('Line', 20), text('Week', 14), text('Of lots', 24), amount('Quantity'), text('Unit')],
    rows: [...rows, ...values],
  };
}

function openHolds({ openHolds: { holds }, plant }: SummaryContent): Sheet {
  return {
    sheetName: 'Open holds',
    columns: [
      text('Lot'),
      text('Line', 20),
      text('Product'),
      amount('Quantity'),
      text('Unit'),
      amount('Value', plant.currency ?? undefined),
      time('Held since'),
      { header: 'Age at the week’s end', unit: 'h', type: 'number', format: '0.0' },
      text('Set aside'),
      text('Decided since'),
      text('Why', 80),
    ],
    rows: holds.map((hold) => [
      hold.lot.number,
      hold.line.name,
      hold.product,
      hold.quantity,
      hold.quantityUnit,
      hold.value,
      new Date(hold.openedAt),
      hold.ageHours,
      hold.isSetAside ? 'yes' : 'not confirmed',
      hold.decidedSince,
      hold.sentence,
    ]),
  };
}

function changedLots({ changedByBaseline }: SummaryContent): Sheet {
  const groups = [
    ['only unadjusted limits would have held it', changedByBaseline.onlyUnadjusted.lots],
    ['only the plan found it', changedByBaseline.onlyPlan.lots],
  ] as const;
  return {
    sheetName: 'Slow movement removed',
    columns: [
      text('Lot'),
      text('Line', 20),
      text('Product'),
      amount('Quantity'),
      text('Unit'),
      time('Ended'),
      text('Channels', 30),
      text('Difference', 42),
      text('Hold'),
      text('Disposition', 20),
    ],
    rows: groups.flatMap(([difference, lots]) =>
      lots.map((lot) => [
        lot.lot.number,
        lot.line.name,
        lot.product,
        lot.quantity,
        lot.quantityUnit,
        new Date(lot.endsAt),
        lot.channels.join(', '),
        difference,
        lot.hold?.state ?? 'never held',
        lot.hold?.dispositions.join(', '),
      ]),
    ),
  };
}

function gauges(content: SummaryContent): Sheet {
  return {
    sheetName: 'Slow movement',
    columns: [
      text('Channel', 24),
      text('Line', 20),
      text('Gauge'),
      { header: 'Movement', type: 'number', format: '0.####' },
      { header: 'Allowance', type: 'number', format: '0.####' },
      text('Unit'),
      share('Share of the allowance'),
      share('Week before'),
    ],
    rows: content.gauges.map((gauge) => [
      gauge.channel.name,
      gauge.line.name,
      gauge.gaugeAssetNumber,
      gauge.movement,
      gauge.cap,
      gauge.unit,
      gauge.share,
      gauge.lastWeekShare,
    ]),
  };
}

function notScored(content: SummaryContent): Sheet {
  return {
    sheetName: 'Without a score',
    columns: [text('Line', 20), text('Channel', 24), count('Lots'), count('Week before'), text('Why', 70)],
    rows: content.notScored.map((of) => [of.line.name, of.channel.name, of.lots, of.lastWeekLots, of.sentence]),
  };
}

function intakes(content: SummaryContent): Sheet {
  return {
    sheetName: 'Workbooks',
    columns: [
      text('File', 40),
      text('Line', 20),
      text('State', 18),
      time('Received'),
      text('From', 24),
      text('What', 70),
    ],
    rows: content.intakes.intakes.map((of) => [
      of.fileName,
      of.line.name,
      of.state === 'refused' ? 'refused' : 'needs attention',
      new Date(of.receivedAt),
      of.receivedBy,
      of.sentence,
    ]),
  };
}
