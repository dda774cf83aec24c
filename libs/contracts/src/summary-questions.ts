import type { SummaryContent, SummaryGauge, SummaryOpenHold, SummaryQuestion } from './api/summaries';
import { ROLE_NAMES, type Role } from './roles';
import { isBeyondAllowance, isSoonBeyondAllowance } from './summary-headline';
import { ageInWords, lotsInWords, paceInWords } from './summary-wording';

/** Somebody of the plant who may be asked, with the lines that are theirs. */
export interface Answerer {
  name: string;
  role: Role;
  lineIds: number[];
}

type Facts = Omit<SummaryContent, 'headline' | 'whatToAsk'>;

const MOST_HOLDS = 3;
/** From this share of its allowance on, a gauge is worth a question. */
const NEAR_ALLOWANCE = 0.75;
const HALF = 0.5;

/** What to ask whom, the most urgent first. */
export function summaryQuestions(facts: Facts, people: Answerer[]): SummaryQuestion[] {
  return [
    ...holdQuestions(facts, people),
    ...setAsideQuestions(facts, people),
    ...gaugeQuestions(facts, people),
    ...notScoredQuestions(facts, people),
    ...intakeQuestions(facts),
  ];
}

/** "the quality manager, Adaeze Thornbury"; those of the line where there are any. */
function whomOf(people: Answerer[], role: Role, lineId: number): string {
  const able = people.filter((person) => person.role === role);
  const own = able.filter((person) => person.lineIds.includes(lineId));
  const names = (own.length > 0 ? own : able).map((person) => person.name);
  return names.length === 0 ? `the ${ROLE_NAMES[role]}` : `the ${ROLE_NAMES[role]}, ${names.join(' or ')}`;
}

const waitingHolds = (facts: Facts) => facts.openHolds.holds.filter((hold) => hold.decidedSince === null);

/** One question a person, who may have many lots before them. */
function holdQuestions(facts: Facts, people: Answerer[]): SummaryQuestion[] {
  const old = waitingHolds(facts).filter((hold) => hold.ageHours >= facts.reminderHours.manager);
  const byWhom = new Map<string, SummaryOpenHold[]>();
  for (const hold of old) {
    const whom = whomOf(people, 'quality_manager', hold.line.id);
    byWhom.set(whom, [...(byWhom.get(whom) ?? []), hold]);
  }
  return [...byWhom].map(([whom, holds]) => ({
    whom,
    question: keptQuestion(holds),
    path: `/holds/${holds[0].holdId}`,
  }));
}

function keptQuestion([first, ...rest]: SummaryOpenHold[]): string {
  if (rest.length === 0)
    return `What keeps lot ${first.lot.number} of ${first.line.name} from being decided? It had waited ${ageInWords(first.ageHours)} at the week’s end.`;
  const named = [first, ...rest].slice(0, MOST_HOLDS);
  const lots = named.map((hold) => `${hold.lot.number} of ${hold.line.name} (${ageInWords(hold.ageHours)})`);
  const more = rest.length + 1 - named.length;
  return `What keeps ${rest.length + 1} lots from being decided: ${lots.join(', ')}${more === 0 ? '' : ` and ${more} more`}?`;
}

function setAsideQuestions(facts: Facts, people: Answerer[]): SummaryQuestion[] {
  const loose = waitingHolds(facts).filter((hold) => !hold.isSetAside);
  return [...new Set(loose.map((hold) => hold.line.id))].map((lineId) => {
    const [first, ...rest] = loose.filter((hold) => hold.line.id === lineId);
    const others = rest.length === 0 ? '' : ` and ${lotsInWords(rest.length)} more`;
    return {
      whom: whomOf(people, 'line_lead', lineId),
      question: `Does lot ${first.lot.number}${others} of ${first.line.name} stand aside? Nobody has confirmed it.`,
      path: `/holds/${first.holdId}`,
    };
  });
}

function gaugeQuestions(facts: Facts, people: Answerer[]): SummaryQuestion[] {
  return facts.gauges.flatMap((gauge) => {
    const { share, channel, line } = gauge;
    if (share === null || !isWorthAsking(gauge, share)) return [];
    const name = gauge.gaugeAssetNumber === null ? 'the gauge' : `gauge ${gauge.gaugeAssetNumber}`;
    const state = `The slow movement of ${channel.name} on ${line.name} has used ${paceInWords({ ...gauge, share })}`;
    const question = isBeyondAllowance(gauge)
      ? `When will ${name} be checked? ${state}, and its lots are not scored.`
      : `Can ${name} be checked before it holds up lots? ${state}.`;
    return [{ whom: whomOf(people, 'technician', line.id), question, path: `/channels/${channel.id}` }];
  });
}

const isWorthAsking = (gauge: SummaryGauge, share: number) =>
  share >= NEAR_ALLOWANCE || (gauge.isGettingWorse && share >= HALF) || isSoonBeyondAllowance(gauge);

function notScoredQuestions(facts: Facts, people: Answerer[]): SummaryQuestion[] {
  return facts.notScored
    .filter(({ reason }) => reason !== 'beyond_allowance')
    .slice(0, MOST_HOLDS)
    .map(({ channel, line, lots, sentence }) => ({
      whom: whomOf(people, 'engineer', line.id),
      question: `What is missing for ${lotsInWords(lots)} of ${line.name} to be scored on ${channel.name}? So far ${sentence}.`,
      path: `/channels/${channel.id}`,
    }));
}

function intakeQuestions(facts: Facts): SummaryQuestion[] {
  return facts.intakes.intakes
    .filter(({ state }) => state === 'needs_attention')
    .slice(0, MOST_HOLDS)
    .map(({ id, fileName, line, receivedBy, sentence }) => ({
      whom: receivedBy,
      question: `What became of ${fileName} for ${line.name}? ${sentence}`,
      path: `/intakes/${id}`,
    }));
}
