import type { BaselineError, BaselineErrorCode } from '@app/baseline';

const MEANING: Record<BaselineErrorCode, string> = {
  'insufficient-data': 'too few rows, times or lots for what is asked',
  'non-finite': 'a figure is not finite',
  'not-increasing': 'times or knots are out of order',
  'ill-posed': 'the input leaves the range of double precision',
  'bad-argument': 'an option is out of its range',
  'no-projection': 'this baseline is not read beyond the record',
};

/** The engine's refusal as one line: its code, what that means, and its own words. */
export const explainRefusal = ({ code, message }: BaselineError): string =>
  `${code}: ${MEANING[code]}. ${message.replace(/\s+/g, ' ')}`;
