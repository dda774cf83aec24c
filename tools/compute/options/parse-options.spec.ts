import { parseOptions } from './parse-options';

const fit = (...args: string[]) => {
  const request = parseOptions(['fit', ...args]);
  if (request.command !== 'fit') throw new Error('not a fit');
  return request.options;
};
const words = (line: string) => line.split(' ').filter((word) => word !== '');

describe('the command line', () => {
  it('chooses a smoothing spline by leaving lots out when nothing is said', () => {
    expect(fit()).toEqual({
      method: 'smoothing-spline',
      smoothness: { rule: 'lot-cv', isOneStandardError: false },
      placement: 'quantile',
      shortestPeriod: undefined,
      isRobust: false,
      project: [],
    });
  });

  it.each([
    ['--lambda 2.5e3', { rule: 'lambda', lambda: 2500 }],
    ['--lambda=inf', { rule: 'lambda', lambda: Infinity }],
    ['--edf 6.5', { rule: 'edf', edf: 6.5 }],
    ['--method natural-spline --knots 0', { rule: 'knots', count: 0 }],
    ['--method=b-spline --knots=7', { rule: 'knots', count: 7 }],
    ['--degree 3 --method polynomial', { rule: 'degree', degree: 3 }],
    ['--method constant', { rule: 'none' }],
    ['--choose gcv14', { rule: 'gcv14', isOneStandardError: false }],
    ['--one-standard-error', { rule: 'lot-cv', isOneStandardError: true }],
    ['--choose lot-cv --one-standard-error', { rule: 'lot-cv', isOneStandardError: true }],
    ['--method polynomial --choose gcv', { rule: 'gcv', isOneStandardError: false }],
  ])('reads %s', (line, smoothness) => {
    expect(fit(...words(line)).smoothness).toEqual(smoothness);
  });

  it('takes values that begin with a minus, and splits the times to project to', () => {
    expect(fit('--project', '-5,2026-03-01T06:00:00+01:00 , 7').project).toEqual([
      '-5',
      '2026-03-01T06:00:00+01:00',
      '7',
    ]);
    expect(fit('--project=-5').project).toEqual(['-5']);
  });

  it.each([['--help'], ['fit --help'], ['help'], ['-h'], ['fit --edf 3 --lambda 2 --help']])('helps on %s', (line) => {
    expect(parseOptions(words(line))).toEqual({ command: 'help' });
  });

  it.each([
    ['', 'say what to compute: fit (--help tells how)'],
    ['judge', "unknown command 'judge': there is fit (--help tells how)"],
    ['fit series.csv', "'series.csv' is not an option; the series is read from standard input"],
    ['fit --smooth 3', "unknown option '--smooth' (--help lists them)"],
    ['fit -k 3', "unknown option '-k' (--help lists them)"],
    ['fit --edf', '--edf needs a value'],
    ['fit --edf=', '--edf needs a value'],
    ['fit --robust=yes', "--robust takes no value: 'yes'"],
    ['fit --edf 4 --edf 4', '--edf is given twice'],
    ['fit --robust --robust', '--robust is given twice'],
    ['fit --edf four', "--edf is not a number: 'four'"],
    ['fit --edf 1e999', "--edf is not a number: '1e999'"],
    ['fit --edf --robust', "--edf is not a number: '--robust'"],
    ['fit --lambda 0', "--lambda must be above 0: '0'"],
    ['fit --lambda -inf', "--lambda is not a number: '-inf'"],
    [
      'fit --method spline',
      "--method is one of smoothing-spline, natural-spline, b-spline, polynomial, constant; not 'spline'",
    ],
    ['fit --choose aic', "--choose is one of lot-cv, gcv, gcv14, reml; not 'aic'"],
    ['fit --method b-spline --placement odd', "--placement is one of even, quantile, variability; not 'odd'"],
    ['fit --method b-spline --knots 2.5', "--knots must be a whole number from 0 on: '2.5'"],
    ['fit --method polynomial --degree 6', "--degree must be a whole number from 1 to 5: '6'"],
    ['fit --method polynomial --degree 0', "--degree must be a whole number from 1 to 5: '0'"],
    ['fit --shortest-period -3', "--shortest-period must be above 0: '-3'"],
    ['fit --project 1,,2', "--project has an empty time: '1,,2'"],
  ])('refuses %p', (line, message) => {
    expect(() => parseOptions(words(line))).toThrow(message);
  });

  it.each([
    ['--lambda 1 --edf 3'],
    ['--lambda 1 --choose gcv'],
    ['--lambda 1 --knots 3'],
    ['--lambda 1 --degree 3'],
    ['--lambda 1 --one-standard-error'],
    ['--edf 3 --choose gcv'],
    ['--edf 3 --knots 3'],
    ['--edf 3 --degree 3'],
    ['--edf 3 --one-standard-error'],
    ['--knots 3 --choose gcv --method b-spline', '--knots', '--choose'],
    ['--knots 3 --one-standard-error --method b-spline', '--knots', '--one-standard-error'],
    ['--knots 3 --degree 3'],
    ['--degree 3 --choose gcv --method polynomial', '--degree', '--choose'],
    ['--degree 3 --one-standard-error --method polynomial', '--degree', '--one-standard-error'],
    ['--knots 3', '--knots', '--method smoothing-spline (the default)'],
    ['--knots 3 --method polynomial', '--knots', '--method polynomial'],
    ['--degree 3', '--degree', '--method smoothing-spline (the default)'],
    ['--degree 3 --method natural-spline', '--degree', '--method natural-spline'],
    ['--lambda 3 --method natural-spline', '--lambda', '--method natural-spline'],
    ['--placement even', '--placement', '--method smoothing-spline (the default)'],
    ['--placement even --method polynomial', '--placement', '--method polynomial'],
    ['--choose reml --method b-spline', '--choose reml', '--method b-spline'],
    ['--choose gcv --one-standard-error', '--choose gcv', '--one-standard-error'],
    ['--choose gcv --method constant', '--choose gcv', '--method constant'],
    ['--edf 3 --method constant', '--edf', '--method constant'],
    ['--lambda 3 --method constant', '--lambda', '--method constant'],
    ['--one-standard-error --method constant', '--one-standard-error', '--method constant'],
  ])('names both when %s', (line, ...named) => {
    const names = named.length > 0 ? named : words(line).filter((word) => word.startsWith('--'));
    let message = '';
    try {
      fit(...words(line));
    } catch (error) {
      message = (error as Error).message;
    }
    expect(names).toHaveLength(2);
    for (const name of names) expect(message).toContain(name);
    expect(message).toContain('contradict');
  });
});
