import { DomainError, type FieldError, ROLE_WORDS, type WorkbookAnswers } from '@app/contracts';
import { IANAZone } from 'luxon';

const MOST_SHEETS = 200;
const MOST_COLUMNS = 500;
const MOST_LOTS = 5000;
const MOST_TOKENS = 50;
const LONGEST = 200;

type Check = (value: unknown, pointer: string) => void;

/**
 * What came as the answers to a workbook's questions, checked field by field; unknown fields are refused, so that a misspelt answer is not lost.
 *
 * @throws DomainError 'invalid' with a pointer to each field that cannot be taken
 */
export function checkAnswers(given: unknown): WorkbookAnswers {
  const problems: FieldError[] = [];
  const refuse = (pointer: string, detail: string): void => {
    problems.push({ pointer, code: 'answer-not-understood', detail });
  };
  const oneOf =
    (...values: unknown[]): Check =>
    (value, pointer) => {
      if (!values.includes(value)) refuse(pointer, `Give one of ${values.map(String).join(', ')}.`);
    };
  const text =
    (isRight: (value: string) => boolean, detail: string): Check =>
    (value, pointer) => {
      if (typeof value !== 'string' || value.length > LONGEST || !isRight(value)) refuse(pointer, detail);
    };
  const whole: Check = (value, pointer) => {
    if (!(Number.isSafeInteger(value) && (value as number) > 0)) refuse(pointer, 'Give a whole number above 0.');
  };
  const flag = oneOf(true, false);
  const zone = text((value) => IANAZone.isValidZone(value), 'Give an IANA time zone such as Europe/Berlin.');
  const object =
    (fields: Record<string, Check>): Check =>
    (value, pointer) => {
      if (!isObject(value)) return refuse(pointer, 'Give an object.');
      for (const [name, one] of Object.entries(value)) {
        if (one === undefined) continue;
        const check = Object.hasOwn(fields, name) ? fields[name] : undefined;
        if (check) check(one, `${pointer}/${name}`);
        else refuse(`${pointer}/${name}`, 'There is no such answer.');
      }
    };
  const record =
    (most: number, isKey: (key: string) => boolean, check: Check): Check =>
    (value, pointer) => {
      if (!isObject(value)) return refuse(pointer, 'Give an object.');
      if (Object.keys(value).length > most) return refuse(pointer, `At most ${most} are taken.`);
      for (const [key, one] of Object.entries(value)) {
        const at = `${pointer}/${key.replace(/~/g, '~0').replace(/\//g, '~1')}`;
        if (key.length <= LONGEST && isKey(key)) check(one, at);
        else refuse(at, 'There is nothing of this name.');
      }
    };
  const tokens: Check = (value, pointer) => {
    const isList = Array.isArray(value) && value.length <= MOST_TOKENS;
    if (!isList || !value.every((one) => typeof one === 'string' && one.length <= 40))
      refuse(pointer, `Give at most ${MOST_TOKENS} short texts.`);
  };
  const values = { unit: text(() => true, 'Give a unit.'), isDeviation: flag, missing: tokens, readings: tokens };
  const column = object({
    ...values,
    role: oneOf(...Object.keys(ROLE_WORDS)),
    channelId: whole,
    channels: record(MOST_COLUMNS, (key) => /^\d{1,15}$/.test(key), object(values)),
  });
  const layout = object({
    headerRow: (value, pointer) => value === null || whole(value, pointer),
    columns: record(MOST_COLUMNS, (key) => /^[A-Z]{1,3}$/.test(key), column),
    dateOrder: oneOf('day-month', 'month-day'),
    decimalSign: oneOf('.', ','),
    timeZone: zone,
    missing: tokens,
    isShiftDate: flag,
  });
  object({
    sheets: record(MOST_SHEETS, () => true, layout),
    date: text((value) => isDay(value), 'Give a day such as 2026-03-02.'),
    repeatedHour: oneOf('first', 'second'),
    lots: record(
      MOST_LOTS,
      (key) => key !== '',
      text((value) => value.trim() !== '', 'Give the number of a lot.'),
    ),
    separator: oneOf(',', ';', '\t', '|'),
    encoding: oneOf('utf-8', 'utf-16le', 'utf-16be', 'windows-1252'),
  })(given, '/answers');
  if (problems.length > 0)
    throw new DomainError('invalid', 'answers-not-understood', 'Some answers cannot be taken as they are.', problems);
  return given as WorkbookAnswers;
}

const isObject = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

function isDay(text: string): boolean {
  const at = /^\d{4}-\d{2}-\d{2}$/.test(text) ? Date.parse(`${text}T00:00:00Z`) : NaN;
  return !Number.isNaN(at) && new Date(at).toISOString().startsWith(text);
}
