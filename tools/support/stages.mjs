import { Failure } from './failure.mjs';

/** Every stage of `npm test` with the minutes that it may take. A check counts once, a jest project by its tests. */
export const STAGES = [
  { name: 'lint', kind: 'check', script: 'lint', minutes: 12 },
  { name: 'types', kind: 'check', script: 'types', minutes: 6 },
  { name: 'format', kind: 'check', script: 'format:check', minutes: 4 },
  { name: 'build', kind: 'build', minutes: 5 },
  { name: 'unit', kind: 'jest', minutes: 15 },
  { name: 'data', kind: 'jest', minutes: 10 },
  { name: 'api', kind: 'jest', minutes: 12 },
  { name: 'reliability', kind: 'jest', minutes: 12, args: ['--runInBand'] },
  { name: 'browser', kind: 'jest', minutes: 20, args: ['--runInBand'] },
];

const NAMES = STAGES.map((stage) => stage.name);
const NEEDS_BUILD = ['api', 'reliability', 'browser'];

/** Reads the command line of `npm test`. */
export function readOptions(args) {
  const options = { only: NAMES, isVerbose: false, isHelp: false, minutes: 45 };
  const rest = [...args];
  const value = (name) => rest.shift() ?? fail(`${name} needs a value.`);
  while (rest.length > 0) {
    const [name, attached] = rest.shift().split(/=(.*)/s);
    if (name === '--help') options.isHelp = true;
    else if (name === '--verbose') options.isVerbose = true;
    else if (name === '--only') options.only = readNames(attached ?? value(name));
    else if (name === '--minutes') options.minutes = readMinutes(attached ?? value(name));
    else fail(`Unknown option ${name}.`);
  }
  return options;
}

function fail(sentence) {
  throw new Failure(`${sentence} See npm test -- --help.`);
}

function readNames(text) {
  const names = text.split(',').filter(Boolean);
  const unknown = names.filter((name) => !NAMES.includes(name));
  if (unknown.length > 0 || names.length === 0)
    fail(`--only takes some of ${NAMES.join(', ')}; unknown: ${unknown.join(', ')}.`);
  return names;
}

function readMinutes(text) {
  const minutes = Number(text);
  return minutes > 0 ? minutes : fail(`--minutes is "${text}": it must be a number above 0.`);
}

/** The stages to run in order; the build comes with those that run what it builds. */
export function chosenStages(only) {
  const isWanted = ({ name }) =>
    only.includes(name) || (name === 'build' && only.some((one) => NEEDS_BUILD.includes(one)));
  return STAGES.filter(isWanted);
}

/**
 * Two lanes that share two cores: the checks of the source beside the build and the first projects. What is sensitive to
 * time (HTTP, kills, the browser) runs afterwards, alone.
 */
export function inLanes(stages) {
  const pick = (names) => stages.filter(({ name }) => names.includes(name));
  return {
    beside: [pick(['lint', 'types', 'format']), pick(['build', 'unit', 'data'])].filter((lane) => lane.length > 0),
    alone: pick(['api', 'reliability', 'browser']),
  };
}
