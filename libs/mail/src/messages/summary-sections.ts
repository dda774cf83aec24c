import {
  ageInWords,
  ageSpanInWords,
  type ChangedLots,
  formatQuantity,
  formatValue,
  lotsInWords,
  type Measure,
  measureInWords,
  percentInWords,
  quantitiesInWords,
  SIGNATURE_MEANINGS,
  type SummaryContent,
  valueInWords,
  type WeekFigures,
} from '@app/contracts';

/** A part of the summary, said the same in HTML and in plain text. */
export interface SummarySection {
  title: string;
  /** With the page behind it: a path of ours, or its whole address. */
  sentences: { text: string; path?: string | null; url?: string }[];
  table?: { head: string[]; rows: string[][] };
}

const MOST_NAMED = 6;

/** The figures behind the answers, in the order of what matters. */
export function summarySections(content: SummaryContent): SummarySection[] {
  return [
    openSection(content),
    linesSection(content),
    gaugesSection(content),
    changedSection(content),
    notScoredSection(content),
    intakesSection(content),
  ].filter((section) => section.sentences.length > 0 || section.table !== undefined);
}

/** "12, 11 the week before". */
const beside = (now: number, last: number | undefined): string =>
  `${now}${last === undefined ? '' : `, ${last} the week before`}`;

function linesSection({ lines, total }: SummaryContent): SummarySection {
  const row = (name: string, week: WeekFigures, last: WeekFigures | null): string[] => [
    name,
    beside(week.scored.lots, last?.scored.lots),
    `${beside(week.held.lots, last?.held.lots)}${amountOf(week.held)}`,
    decidedInWords(week),
    `${beside(week.stillOpen.lots, last?.stillOpen.lots)}${amountOf(week.stillOpen)}`,
  ];
  const rows = lines.map(({ line, week, lastWeek }) => row(line.name, week, lastWeek));
  if (lines.length > 1) rows.push(row('All lines', total.week, total.lastWeek));
  return {
    title: 'Lots of each line',
    sentences: [],
    table: { head: ['Line', 'Scored', 'Held in the week', 'Decided in the week', 'Open at its end'], rows },
  };
}

function amountOf(measure: Measure): string {
  const parts = [quantitiesInWords(measure), valueInWords(measure)].filter((part) => part !== '');
  return parts.length === 0 ? '' : `: ${parts.join(', ')}`;
}

const decidedInWords = ({ decided }: WeekFigures): string =>
  decided.length === 0
    ? 'none'
    : decided.map((measure) => `${measure.lots} ${SIGNATURE_MEANINGS[measure.disposition]}`).join(', ');

function openSection({ openHolds, total, lines }: SummaryContent): SummarySection {
  if (openHolds.count === 0) return { title: 'Held and undecided', sentences: [] };
  const agesOf = (week: WeekFigures, words: (measure: Measure) => string) =>
    week.stillOpenByAge
      .filter(({ lots }) => lots > 0)
      .map((age) => `${ageSpanInWords(age)}: ${words(age)}`)
      .join('; ');
  const byLine = lines
    .filter(({ week }) => week.stillOpen.lots > 0)
    .map(({ line, week }) => ({
      text: `${line.name}, ${lotsInWords(week.stillOpen.lots)}: ${agesOf(week, ({ lots }) => lotsInWords(lots))}.`,
    }));
  const sentences = openHolds.holds.slice(0, MOST_NAMED).map((hold) => {
    const quantity =
      hold.quantity === null || hold.quantityUnit === null
        ? ''
        : `, ${formatQuantity(hold.quantity, hold.quantityUnit)}`;
    const aside = hold.isSetAside ? 'set aside' : 'not confirmed to be set aside';
    const since = hold.decidedSince === null ? '' : ` Since then it was ${SIGNATURE_MEANINGS[hold.decidedSince]}.`;
    return {
      text: `${hold.line.name}, ${ageInWords(hold.ageHours)}${quantity}, ${aside}: ${hold.sentence}${since}`,
      path: `/holds/${hold.holdId}`,
    };
  });
  return {
    title: 'Held and undecided at the week’s end',
    sentences: [
      { text: `At risk by age: ${agesOf(total.week, measureInWords)}.` },
      ...(lines.length > 1 ? byLine : []),
      ...sentences,
      ...andMore(openHolds.count),
    ],
  };
}

const andMore = (count: number) =>
  count > MOST_NAMED ? [{ text: `And ${count - MOST_NAMED} more: see the page or the workbook.` }] : [];

const GAUGES_TITLE = 'Slow movement within its allowance';

function gaugesSection({ gauges }: SummaryContent): SummarySection {
  const told = gauges.filter(({ share }) => share !== null);
  if (told.length === 0) return { title: GAUGES_TITLE, sentences: [] };
  return {
    title: GAUGES_TITLE,
    sentences: [],
    table: {
      head: ['Channel', 'Gauge', 'Moved', 'Of its allowance', 'Week before'],
      rows: told.map((gauge) => [
        `${gauge.channel.name}, ${gauge.line.name}`,
        gauge.gaugeAssetNumber ?? 'not recorded',
        formatValue(gauge.movement, gauge),
        percentInWords(gauge.share ?? 0),
        gauge.lastWeekShare === null ? 'no baseline' : percentInWords(gauge.lastWeekShare),
      ]),
    },
  };
}

function changedSection({ changedByBaseline }: SummaryContent): SummarySection {
  const { onlyUnadjusted, onlyPlan } = changedByBaseline;
  return {
    title: 'What removing the slow movement changed',
    sentences: [
      {
        text: `${lotsInWords(onlyUnadjusted.count)} that limits on unadjusted lot means would have held, and the plans did not${fatesInWords(onlyUnadjusted)}`,
      },
      {
        text: `${lotsInWords(onlyPlan.count)} outside their control limits only once the slow movement was removed${fatesInWords(onlyPlan)}`,
      },
    ],
  };
}

function fatesInWords({ count, lots, fates, lastWeekCount }: ChangedLots): string {
  const last = lastWeekCount === null ? '' : ` Week before: ${lastWeekCount}.`;
  if (count === 0) return `.${last}`;
  const named = lots.slice(0, MOST_NAMED).map(({ lot }) => lot.number);
  if (count > named.length) named.push('…');
  const became = fates.map(({ fate, lots: of }) => `${of} ${fateInWords(fate)}`).join(', ');
  return ` (${named.join(', ')}). What became of them: ${became}.${last}`;
}

const fateInWords = (fate: ChangedLots['fates'][number]['fate']): string =>
  fate === 'moved_on' ? 'never held' : fate === 'held' ? 'still held' : SIGNATURE_MEANINGS[fate];

function notScoredSection({ notScored }: SummaryContent): SummarySection {
  return {
    title: 'Lots without a score',
    sentences: notScored.slice(0, MOST_NAMED).map(({ line, channel, lots, lastWeekLots, sentence }) => ({
      text: `${line.name}, ${channel.name}: ${lotsInWords(lots)}, since ${sentence}. Week before: ${lastWeekLots}.`,
      path: `/channels/${channel.id}`,
    })),
  };
}

function intakesSection({ intakes }: SummaryContent): SummarySection {
  return {
    title: 'Workbooks that need somebody',
    sentences: [
      ...intakes.intakes.slice(0, MOST_NAMED).map(({ id, fileName, line, receivedBy, state, sentence }) => ({
        text: `${fileName} for ${line.name}, from ${receivedBy}, ${state === 'refused' ? 'refused' : 'needs attention'}: ${sentence}`,
        path: `/intakes/${id}`,
      })),
      ...andMore(intakes.count),
    ],
  };
}
