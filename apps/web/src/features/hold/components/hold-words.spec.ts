import type { VerdictView } from '@app/contracts';
import { constantSentence, decisionWords, isOffending, quantityText, verdictText } from './hold-words';

const verdict: VerdictView = {
  id: 1,
  channel: {
    id: 11,
    name: 'Coat weight',
    characteristic: { name: 'Coat weight', unit: 'g/m²', resolution: 0.01 },
    gaugeAssetNumber: 'BG-207',
  },
  controlState: 'outside_control_limits',
  isProvisional: true,
  notScoredSentence: null,
  score: -4.3,
  limit: 3,
  residual: -0.3,
  residualSd: 0.07,
  readingCount: 480,
  lotMean: 12.1,
  baseline: 12.4,
  controlLow: 12.19,
  controlHigh: 12.61,
  specificationState: 'inside_specification',
  nominal: 12.4,
  lowerSpecification: 11.6,
  upperSpecification: 13.2,
  constant: { state: 'within_control_limits', low: 11.8, high: 13, score: -1.52 },
  signals: [{ signal: 'lot_mean', action: 'holds', sentence: '' }],
  planRevision: 2,
  methodVersion: '1',
  judgedAt: '2026-12-01T00:00:00Z',
};

describe('decisionWords', () => {
  it('says what happens', () => {
    expect(decisionWords('release', '24117')).toBe('Release lot 24117');
    expect(decisionWords('scrap', '24117')).toBe('Scrap lot 24117');
    expect(decisionWords(null, '24117')).toBe('Decide lot 24117');
  });
});

describe('verdictText', () => {
  it('names the verdict with its control limits', () => {
    expect(verdictText(verdict)).toBe('outside control limits, provisional');
  });
  it('gives the reason of a lot that is not scored', () => {
    const learning = { ...verdict, controlState: 'not_scored' as const, notScoredSentence: 'the baseline is learning' };
    expect(verdictText(learning)).toBe('not scored: the baseline is learning');
  });
});

describe('isOffending', () => {
  it('is so only with a signal that holds', () => {
    expect(isOffending(verdict)).toBe(true);
    expect(isOffending({ ...verdict, signals: [{ signal: 'lot_mean', action: 'notice', sentence: '' }] })).toBe(false);
  });
});

describe('constantSentence', () => {
  it('gives limits, unit and score', () => {
    expect(constantSentence(verdict)).toBe(
      'With the slow movement left in, coat weight would have been within control limits ' +
        '(control limits 11.800\u202f…\u202f13.000\u202fg/m²; \u22121.5\u202fσ).',
    );
  });
  it('says so when there was no verdict', () => {
    const constant = { state: 'not_scored' as const, low: null, high: null, score: null };
    expect(constantSentence({ ...verdict, constant })).toBe(
      'In coat weight, constant control limits could not have judged this lot.',
    );
  });
});

describe('quantityText', () => {
  it('shows whole and broken quantities, and none', () => {
    expect(quantityText(1840, 'm')).toBe('1840\u202fm');
    expect(quantityText(12.5, 'kg')).toBe('12.5\u202fkg');
    expect(quantityText(null, 'm')).toBeNull();
  });
});
