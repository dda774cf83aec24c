import type { VerdictView } from '@app/contracts';
import { lieScale } from './lie-scale';
import { bothVerdicts, disagreementWords, rangeWords, verdictSentences } from './verdict-words';

const VERDICT: VerdictView = {
  id: 1,
  channel: {
    id: 1,
    name: 'Coat weight',
    characteristic: { name: 'coat weight', unit: 'g/m²', resolution: 0.01 },
    gaugeAssetNumber: 'BG-204',
  },
  controlState: 'within_control_limits',
  isProvisional: false,
  notScoredSentence: null,
  score: 0.4,
  limit: 3.2,
  residual: 0.04,
  residualSd: 0.1,
  readingCount: 120,
  lotMean: 35.5,
  baseline: 35.4,
  controlLow: 35,
  controlHigh: 36,
  specificationState: 'inside_specification',
  nominal: 35.5,
  lowerSpecification: 34,
  upperSpecification: 37,
  constant: { state: 'within_control_limits', low: 34.8, high: 36.2, score: 0.1 },
  signals: [],
  planRevision: 2,
  methodVersion: '1',
  judgedAt: '2026-12-01T14:00:00Z',
};

test('a range is said from either side, with a real minus', () => {
  expect(rangeWords(-1.5, 2, 1)).toBe('−1.5 to 2.0');
  expect(rangeWords(null, 2, 0)).toBe('at most 2');
  expect(rangeWords(2, null, 0)).toBe('at least 2');
  expect(rangeWords(null, null, 2)).toBe('–');
});

test('signals that are off say nothing; a lot that is not scored says why, once', () => {
  const signals: VerdictView['signals'] = [
    { signal: 'lot_mean', action: 'holds', sentence: 'lies 4.3 σ below its baseline' },
    { signal: 'censored_readings', action: 'off', sentence: 'has 2 readings off the scale' },
  ];
  expect(verdictSentences({ ...VERDICT, signals })).toEqual([
    { text: 'Lies 4.3 σ below its baseline.', action: 'holds' },
  ]);
  const notScored = {
    ...VERDICT,
    controlState: 'not_scored',
    notScoredSentence: 'the baseline is still learning',
  } as const;
  expect(verdictSentences(notScored)).toEqual([
    { text: 'Not scored: the baseline is still learning.', action: 'none' },
  ]);
  const told = [{ signal: 'not_scored', action: 'holds', sentence: 'could not be scored' }] as VerdictView['signals'];
  expect(verdictSentences({ ...notScored, signals: told })).toHaveLength(1);
});

test('both halves of a verdict are named apart', () => {
  expect(bothVerdicts({ ...VERDICT, isProvisional: true, specificationState: 'outside_specification' })).toBe(
    'within control limits, provisional; outside specification',
  );
});

test('what removing the slow movement changed is said only where it changed something', () => {
  expect(disagreementWords([VERDICT])).toBeNull();
  const missed: VerdictView = { ...VERDICT, controlState: 'outside_control_limits' };
  expect(disagreementWords([missed])).toBe('A constant baseline would have passed it in coat weight.');
  const wrong: VerdictView = { ...VERDICT, constant: { ...VERDICT.constant, state: 'outside_control_limits' } };
  expect(disagreementWords([wrong])).toBe('A constant baseline would have called it out in coat weight.');
});

test('the drawing spans every limit, with air at both ends', () => {
  const scale = lieScale(VERDICT, 260, 12);
  expect(scale?.(34)).toBeCloseTo(12);
  expect(scale?.(37)).toBeCloseTo(248);
  expect(scale?.(35.5)).toBeCloseTo(130);
});

test('without a lot mean, or without anything to compare with, nothing is drawn', () => {
  expect(lieScale({ ...VERDICT, lotMean: null }, 260, 12)).toBeNull();
  const alone = { ...VERDICT, baseline: null, controlLow: null, controlHigh: null, lowerSpecification: null };
  expect(
    lieScale({ ...alone, upperSpecification: null, constant: { ...VERDICT.constant, low: null, high: null } }, 260, 12),
  ).toBeNull();
  expect(lieScale({ ...alone, lotMean: NaN, upperSpecification: null }, 260, 12)).toBeNull();
});
