import { formatMean, formatNumber, formatSpan, formatValue } from './format';
import { holdReason, notScoredSentence, signalPhrase, type SignalFacts } from './wording';

const facts = (changed: Partial<SignalFacts>): SignalFacts => ({
  signal: 'lot_mean',
  channelName: 'Coat weight',
  unit: 'g/m²',
  resolution: 0.01,
  score: -4.31,
  limit: 3,
  lotMean: 59.412,
  lowerSpecification: 58.8,
  upperSpecification: 61.2,
  facts: {},
  ...changed,
});

describe('the words of a signal', () => {
  it('say how far, on which side, in what, and what the limit is', () => {
    expect(signalPhrase(facts({}))).toBe(
      'lies 4.3\u202fσ below its baseline in coat weight (control limit 3.0\u202fσ)',
    );
    expect(signalPhrase(facts({ score: 3.02, channelName: 'pH' }))).toBe(
      'lies 3.02\u202fσ above its baseline in pH (control limit 3.00\u202fσ)',
    );
  });

  it('say which specification limit was passed, by what', () => {
    const outside = facts({ signal: 'outside_specification', lotMean: 58.7, facts: { countBelow: 9, countAbove: 1 } });
    expect(signalPhrase(outside)).toBe(
      'is outside its specification in coat weight: lot mean 58.700\u202fg/m² is below 58.80\u202fg/m², 9 readings below 58.80\u202fg/m², 1 reading above 61.20\u202fg/m²',
    );
  });

  it('say what is missing or off the scale, and how far the baseline went', () => {
    expect(signalPhrase(facts({ signal: 'not_scored', facts: { reason: 'beyond_allowance' } }))).toContain(
      'check the gauge',
    );
    expect(signalPhrase(facts({ signal: 'censored_readings', facts: { censoredLow: 2, censoredHigh: 1 } }))).toBe(
      'has 3 readings off the scale in coat weight (2 at the low end, 1 at the high end)',
    );
    expect(signalPhrase(facts({ signal: 'baseline_moved', facts: { movement: -0.16, notice: 0.14 } }))).toBe(
      'lies where the slow movement of coat weight has gone \u22120.16\u202fg/m² since the baseline’s start; the plan points out more than 0.14\u202fg/m²',
    );
  });

  it('have a clause of their own for each reason without a score', () => {
    const reasons = [
      'learning',
      'no_plan_in_force',
      'beyond_allowance',
      'no_values',
      'censored',
      'constant_data',
      'non_finite',
      'ill_posed',
    ];
    expect(new Set(reasons.map(notScoredSentence)).size).toBe(reasons.length);
  });

  it('join to one sentence about the lot', () => {
    expect(holdReason('24117', ['lies a', 'is b'])).toBe('Lot 24117 lies a; it also is b.');
  });
});

describe('numbers', () => {
  it('show the resolution of the characteristic, a real minus and the unit on the same line', () => {
    expect(formatValue(-0.16, { unit: 'g/m²', resolution: 0.01 })).toBe('\u22120.16\u202fg/m²');
    expect(formatValue(8.7, { unit: '', resolution: 0.01 })).toBe('8.70');
    expect(formatMean(20.5, { unit: 'µm', resolution: 0.5 })).toBe('20.50\u202fµm');
    expect(formatNumber(-0.001, 2)).toBe('0.00');
  });

  it('tell a span of time in two units at most', () => {
    expect([30_000, 192 * 60_000, 50 * 3_600_000, 59 * 60_000].map(formatSpan)).toEqual([
      'under a minute',
      '3 h 12 min',
      '2 d 2 h',
      '59 min',
    ]);
  });
});
