import {
  ageInWords,
  type DecidedMeasure,
  lotsInWords,
  type Measure,
  measureInWords,
  paceInWords,
  percentInWords,
  quantitiesInWords,
  SIGNATURE_MEANINGS,
  type SummaryContent,
  type SummaryGauge,
  valueInWords,
  type WeekFigures,
  weeksToAllowance,
} from '@app/contracts';
import type { SummarySection } from './summary-sections';

const MOST_ASKED = 6;
const MOST_WORSE = 3;

/** What a director wants to know without opening anything: what is held, what it costs, what is getting worse, whom to ask what. */
export function summaryAnswers(content: SummaryContent): SummarySection[] {
  const said = (title: string, sentences: string[]) => ({ title, sentences: sentences.map((text) => ({ text })) });
  return [
    said('Held', heldSentences(content)),
    said('What it costs', costSentences(content)),
    said('Getting worse', worseSentences(content)),
    questionsAnswer(content),
  ];
}

function heldSentences({ total: { week, lastWeek }, openHolds, lines }: SummaryContent): string[] {
  const before = (lots: number | undefined) => (lots === undefined ? '' : ` (${lots} the week before)`);
  const opened = `In the week ${lotsInWords(week.held.lots)} ${week.held.lots === 1 ? 'was' : 'were'} held${before(lastWeek?.held.lots)}.`;
  if (week.stillOpen.lots === 0) return [`No lot waited for a decision at the week’s end. ${opened}`];
  const [oldest] = openHolds.holds;
  const where = lines
    .filter((line) => line.week.stillOpen.lots > 0)
    .map((line) => `${line.week.stillOpen.lots} of ${line.line.name}`);
  const since = openHolds.holds.filter(({ decidedSince }) => decidedSince !== null).length;
  const age = `the oldest, lot ${oldest.lot.number} of ${oldest.line.name}, for ${ageInWords(oldest.ageHours)}`;
  return [
    `${lotsInWords(week.stillOpen.lots)} waited for a decision at the week’s end${before(lastWeek?.stillOpen.lots)}: ${where.join(', ')}; ${age}.${since === 0 ? '' : ` Of these ${since} ${since === 1 ? 'was' : 'were'} decided since.`}`,
    opened,
  ];
}

function costSentences({ total: { week } }: SummaryContent): string[] {
  const atRisk = week.stillOpen.lots === 0 ? [] : [`At risk on hold: ${amountInWords(week.stillOpen)}.`];
  const lost = week.decided.filter(({ disposition }) => disposition !== 'release');
  const released = week.decided.filter(({ disposition }) => disposition === 'release');
  const isNothingLost = lost.length === 0 ? ['Nothing was scrapped, reworked or regraded in the week.'] : [];
  return [...atRisk, ...lost.map(decidedSentence), ...isNothingLost, ...released.map(decidedSentence)];
}

/** "1 500 m, worth 2 700 EUR". */
function amountInWords(measure: Measure): string {
  const quantity = quantitiesInWords(measure);
  const value = valueInWords(measure);
  const amount = quantity === '' ? lotsInWords(measure.lots) : quantity;
  return value === '' ? `${amount}, of no stated value` : `${amount}, worth ${value}`;
}

function decidedSentence({ disposition, ...measure }: DecidedMeasure): string {
  const meaning = SIGNATURE_MEANINGS[disposition];
  return `${meaning[0].toUpperCase()}${meaning.slice(1)} in the week: ${measureInWords(measure)}.`;
}

function worseSentences(content: SummaryContent): string[] {
  const { total, gauges } = content;
  const worse = gauges.filter(({ share, isGettingWorse }) => isGettingWorse || (share ?? 0) > 1).sort(byUrgency);
  const more = worse.length - MOST_WORSE;
  return [
    ...oldHoldsSentence(content),
    ...worse.slice(0, MOST_WORSE).map(gaugeSentence),
    ...(more > 0
      ? [`So do ${more} more, by a tenth of their allowance or more since the week before; see below.`]
      : []),
    ...(worse.length === 0 ? [calmSentence(gauges)] : []),
    ...unscoredSentence(total),
  ];
}

/** Beyond its allowance first, then what will be there soonest. */
const byUrgency = (a: SummaryGauge, b: SummaryGauge) => urgency(a) - urgency(b);
const urgency = (gauge: SummaryGauge) =>
  (gauge.share ?? 0) > 1 ? -(gauge.share ?? 0) : (weeksToAllowance(gauge) ?? Infinity);

function gaugeSentence(gauge: SummaryGauge): string {
  const asset = gauge.gaugeAssetNumber === null ? '' : `, gauge ${gauge.gaugeAssetNumber}`;
  const name = `${gauge.channel.name} on ${gauge.line.name}${asset}`;
  const share = gauge.share ?? 0;
  const beyond = share > 1 ? '; its lots are not scored until the gauge is checked' : '';
  return `${name}: the slow movement has used ${paceInWords({ ...gauge, share })}${beyond}.`;
}

function calmSentence(gauges: SummaryGauge[]): string {
  const [most] = gauges.filter(({ share }) => share !== null);
  const none = 'No slow movement took up a tenth more of its allowance than in the week before';
  return most === undefined
    ? `${none}.`
    : `${none}; the largest is ${most.channel.name} on ${most.line.name} at ${percentInWords(most.share ?? 0)}.`;
}

function oldHoldsSentence({ total: { week, lastWeek }, reminderHours }: SummaryContent): string[] {
  const limit = reminderHours.director;
  const olderIn = ({ stillOpenByAge }: WeekFigures) =>
    stillOpenByAge.filter(({ fromHours }) => fromHours >= limit).reduce((sum, { lots }) => sum + lots, 0);
  const [now, before] = [olderIn(week), lastWeek === null ? null : olderIn(lastWeek)];
  if (now === 0 || (before !== null && before > now)) return [];
  const compared = before === null ? '' : `, ${before} the week before`;
  return [
    `Holds grow old: ${lotsInWords(now)} had waited ${ageInWords(limit)} or longer at the week’s end${compared}.`,
  ];
}

function unscoredSentence({ week, lastWeek }: SummaryContent['total']): string[] {
  const before = lastWeek?.notFullyScored ?? 0;
  if (week.notFullyScored <= before) return [];
  return [`${lotsInWords(week.notFullyScored)} went without a score on a channel, ${before} the week before.`];
}

function questionsAnswer({ whatToAsk }: SummaryContent): SummarySection {
  const asked = whatToAsk.slice(0, MOST_ASKED).map(({ whom, question, path }) => ({
    text: `Ask ${whom}: ${question}`,
    path,
  }));
  const more = whatToAsk.length - asked.length;
  return {
    title: 'What to ask whom',
    sentences: [
      ...asked,
      ...(more > 0 ? [{ text: `And ${more} more: see the page.` }] : []),
      ...(asked.length === 0 ? [{ text: 'Nothing waits for anybody.' }] : []),
    ],
  };
}
