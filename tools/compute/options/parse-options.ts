import { parseArgs } from 'node:util';
import { InputError, quoted } from '../input-error';
import { refuseContradictions, type GivenOptions } from './contradictions';
import { CRITERIA, METHODS, PLACEMENTS, type Method, type Request, type Smoothness } from './fit-options';
import { readLambda, readNumber, readPositive, readTimes, readWhole, readWord } from './option-values';

/** Degree 5 is beyond what a baseline needs; NIST's certified Wampler sets have it. */
const HIGHEST_DEGREE = 5;

const OPTIONS = {
  method: { type: 'string' },
  choose: { type: 'string' },
  edf: { type: 'string' },
  lambda: { type: 'string' },
  knots: { type: 'string' },
  degree: { type: 'string' },
  placement: { type: 'string' },
  'shortest-period': { type: 'string' },
  project: { type: 'string' },
  robust: { type: 'boolean' },
  'one-standard-error': { type: 'boolean' },
  help: { type: 'boolean', short: 'h' },
} as const;

const SUBCOMMANDS = ['fit', 'help'];

/**
 * The command line as a request.
 * @throws InputError naming the option (or both options that contradict each other)
 */
export function parseOptions(args: readonly string[]): Request {
  const { given, words } = collect(args);
  if (given.has('help')) return { command: 'help' };
  if (words.length === 0) throw new InputError('say what to compute: fit (--help tells how)');
  if (!SUBCOMMANDS.includes(words[0]))
    throw new InputError(`unknown command ${quoted(words[0])}: there is fit (--help tells how)`);
  if (words.length > 1)
    throw new InputError(`${quoted(words[1])} is not an option; the series is read from standard input`);
  if (words[0] === 'help') return { command: 'help' };
  const method = given.has('method') ? readWord('method', given.get('method')!, METHODS) : 'smoothing-spline';
  const smoothness = readSmoothness(given, method);
  const value = <T>(name: string, read: (text: string) => T): T | undefined =>
    given.has(name) ? read(given.get(name)!) : undefined;
  const options = {
    method,
    smoothness,
    placement: value('placement', (text) => readWord('placement', text, PLACEMENTS)) ?? 'quantile',
    shortestPeriod: value('shortest-period', (text) => readPositive('shortest-period', text)),
    isRobust: given.has('robust'),
    project: value('project', readTimes) ?? [],
  };
  refuseContradictions(given, method);
  return { command: 'fit', options };
}

function readSmoothness(given: GivenOptions, method: Method): Smoothness {
  const text = (name: string) => given.get(name)!;
  const criterion = given.has('choose') ? readWord('choose', text('choose'), CRITERIA) : 'lot-cv';
  if (given.has('lambda')) return { rule: 'lambda', lambda: readLambda(text('lambda')) };
  if (given.has('edf')) return { rule: 'edf', edf: readNumber('edf', text('edf')) };
  if (given.has('knots')) return { rule: 'knots', count: readWhole('knots', text('knots'), 0, Infinity) };
  if (given.has('degree')) return { rule: 'degree', degree: readWhole('degree', text('degree'), 1, HIGHEST_DEGREE) };
  if (method === 'constant') return { rule: 'none' };
  return { rule: criterion, isOneStandardError: given.has('one-standard-error') };
}

/** Options and words as written; a value may follow its option or stand behind an equals sign, and may begin with a minus. */
function collect(args: readonly string[]): { given: GivenOptions; words: string[] } {
  const { tokens } = parseArgs({
    args: [...args],
    options: OPTIONS,
    strict: false,
    allowPositionals: true,
    tokens: true,
  });
  const given = new Map<string, string>();
  const words: string[] = [];
  for (const token of tokens) {
    if (token.kind === 'positional') words.push(token.value);
    if (token.kind !== 'option') continue;
    const { name, rawName, value } = token;
    if (!Object.hasOwn(OPTIONS, name)) throw new InputError(`unknown option ${quoted(rawName)} (--help lists them)`);
    const needsValue = OPTIONS[name as keyof typeof OPTIONS].type === 'string';
    if (needsValue && !value) throw new InputError(`--${name} needs a value`);
    if (!needsValue && value !== undefined) throw new InputError(`--${name} takes no value: ${quoted(value)}`);
    if (given.has(name)) throw new InputError(`--${name} is given twice`);
    given.set(name, value ?? '');
  }
  return { given, words };
}
