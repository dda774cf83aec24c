/** What callers get when they ask for something that makes no sense; states of the data are tagged results instead. */
export class ScoringError extends Error {
  constructor(
    readonly code: 'bad-argument',
    message: string,
  ) {
    super(message);
    this.name = 'ScoringError';
  }
}
