import { DISPOSITIONS, type LotMark } from '@app/contracts';
import { renderToStaticMarkup } from 'react-dom/server';
import { Mark } from './mark';
import { MARK_EXTENT, markParts } from './mark-shapes';
import { markWords } from './mark-words';

const WITHIN: LotMark = {
  controlState: 'within_control_limits',
  isProvisional: false,
  specificationState: 'inside_specification',
  hasNotice: false,
  holdState: null,
  disposition: null,
  isExcluded: false,
};
const shape = (change: Partial<LotMark>) =>
  markParts({ ...WITHIN, ...change })
    .map((part) => `${part.path} ${part.fill === null ? 'open' : part.fill === 'sheet' ? 'hollow' : 'filled'}`)
    .join(' + ');

test('each state has a shape of its own, colour aside', () => {
  const shapes = [
    shape({}),
    shape({ isProvisional: true }),
    shape({ controlState: 'outside_control_limits' }),
    shape({ controlState: 'outside_control_limits', isProvisional: true }),
    shape({ controlState: 'not_scored' }),
    shape({ specificationState: 'outside_specification' }),
    shape({ controlState: 'outside_control_limits', specificationState: 'outside_specification' }),
    shape({ controlState: 'not_scored', specificationState: 'outside_specification' }),
    shape({ hasNotice: true }),
    shape({ isExcluded: true }),
    shape({ holdState: 'open' }),
    ...(['release', 'scrap', 'rework', 'regrade'] as const).map((disposition) => shape({ disposition })),
  ];
  expect(new Set(shapes).size).toBe(shapes.length);
});

test('outside specification is the same mark with one more outline', () => {
  const outside = { controlState: 'outside_control_limits' } as const;
  expect(shape({ ...outside, specificationState: 'outside_specification' }).startsWith(shape(outside))).toBe(true);
});

test('no point of any shape leaves the square', () => {
  for (const disposition of DISPOSITIONS) {
    const mark = { ...WITHIN, disposition, hasNotice: true, isExcluded: true, holdState: 'open' } as const;
    for (const { path } of markParts(mark)) {
      const absolute = [...path.matchAll(/[ML](-?[\d.]+),(-?[\d.]+)/g)].flatMap((match) => [
        Number(match[1]),
        Number(match[2]),
      ]);
      expect(Math.max(...absolute.map(Math.abs))).toBeLessThanOrEqual(MARK_EXTENT);
    }
  }
});

test('the words say what the shape says', () => {
  expect(markWords(WITHIN)).toBe('within control limits');
  expect(
    markWords({
      ...WITHIN,
      controlState: 'outside_control_limits',
      isProvisional: true,
      holdState: 'open',
      hasNotice: true,
    }),
  ).toBe('held; outside control limits, provisional; with a notice');
  expect(
    markWords({ ...WITHIN, specificationState: 'outside_specification', holdState: 'decided', disposition: 'scrap' }),
  ).toBe('scrapped; within control limits; outside specification');
  expect(markWords({ ...WITHIN, controlState: 'not_scored', isProvisional: true, isExcluded: true })).toBe(
    'not scored; excluded',
  );
});

test('a mark names itself, unless words beside it do', () => {
  expect(renderToStaticMarkup(<Mark mark={WITHIN} />)).toContain('aria-label="within control limits"');
  const silent = renderToStaticMarkup(<Mark mark={WITHIN} isSilent />);
  expect(silent).toContain('aria-hidden="true"');
  expect(silent).not.toContain('<title>');
});
