import { verdictPhrase } from './verdict-wording';

describe('a verdict in words', () => {
  const verdict = {
    controlState: 'within_control_limits',
    notScoredReason: null,
    score: 1.24,
    specificationState: 'inside_specification',
  } as const;

  it('says both halves, with the score to a tenth of σ', () => {
    expect(verdictPhrase(verdict)).toBe('within control limits, 1.2\u202fσ above its baseline; inside specification');
    expect(
      verdictPhrase({
        ...verdict,
        controlState: 'outside_control_limits',
        score: -4.36,
        specificationState: 'outside_specification',
      }),
    ).toBe('outside control limits, 4.4\u202fσ below its baseline; outside specification');
  });

  it('says why there is no score', () => {
    expect(
      verdictPhrase({
        ...verdict,
        controlState: 'not_scored',
        score: null,
        notScoredReason: 'no_values',
        specificationState: 'no_specification',
      }),
    ).toBe('not scored: the lot has no reading with a value; without a specification');
  });
});
