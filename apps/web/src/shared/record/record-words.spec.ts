import type { RecordLot } from '@app/contracts';
import { limitsText, lotFigures, scoreText, signed } from './record-words';

describe('signed', () => {
  it('shows the sign and the resolution', () => {
    expect(signed(1.8, 0.01)).toBe('+1.80');
    expect(signed(-1.8, 0.1)).toBe('\u22121.8');
    expect(signed(0, 1)).toBe('0');
  });
});

describe('scoreText', () => {
  it('shows sigmas with their sign, and a dash for none', () => {
    expect(scoreText(-4.31)).toBe('\u22124.3\u202fσ');
    expect(scoreText(2)).toBe('+2.0\u202fσ');
    expect(scoreText(null)).toBe('–');
  });
});

describe('limitsText', () => {
  it('shows both, one or none', () => {
    expect(limitsText(1, 2, 1)).toBe('1.0\u202f…\u202f2.0');
    expect(limitsText(null, 2, 0)).toBe('–\u202f…\u202f2');
    expect(limitsText(null, null, 0)).toBeNull();
  });
});

describe('lotFigures', () => {
  const lot: RecordLot = {
    id: 1,
    number: '24117',
    product: 'SF-12',
    startsAt: 0,
    endsAt: 10,
    at: 5,
    mean: 41.2,
    nominal: 42,
    lowerSpecification: 40,
    upperSpecification: 44,
    baseline: 42.05,
    controlLow: 41.4,
    controlHigh: 42.7,
    score: -4.3,
    mark: {
      controlState: 'outside_control_limits',
      isProvisional: true,
      specificationState: 'inside_specification',
      hasNotice: false,
      holdState: null,
      disposition: null,
      isExcluded: false,
    },
  };
  const characteristic = { name: 'Coat weight', unit: 'g/m²', resolution: 0.1 };

  it('names what is known and the verdict in words', () => {
    expect(lotFigures(lot, characteristic)).toEqual([
      'mean 41.20\u202fg/m²',
      'baseline 42.05\u202fg/m²',
      'control limits 41.40\u202f…\u202f42.70',
      'score \u22124.3\u202fσ',
      'outside control limits, provisional',
    ]);
  });

  it('leaves out what is not known', () => {
    const unscored = { ...lot, mean: null, baseline: null, controlLow: null, controlHigh: null, score: null };
    expect(lotFigures({ ...unscored, mark: { ...lot.mark, controlState: 'not_scored' } }, characteristic)).toEqual([
      'not scored',
    ]);
  });
});
