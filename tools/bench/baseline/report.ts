import type { AllocationFigures } from './allocation';
import type { LotFigures } from './lot-figures';
import type { SizeFigures } from './size-figures';
import type { Target } from './targets';

const LABELS: [route: string, label: string][] = [
  ['ours-fixed', 'ours, lambda fixed'],
  ['r-fixed', 'R default knots, lambda fixed'],
  ['r-all-fixed', 'R all.knots, lambda fixed'],
  ['scipy-fixed', 'SciPy, lambda fixed'],
  ['ours-gcv', 'ours, GCV'],
  ['r-gcv', 'R default knots, GCV'],
  ['r-all-gcv', 'R all.knots, GCV'],
  ['floor', 'floor: read and write once'],
  ['floor-fresh', 'floor into newly made arrays'],
];
const RATIOS: [above: string, below: string, label: string][] = [
  ['r-fixed', 'ours-fixed', 'R default knots : ours, lambda fixed'],
  ['r-all-fixed', 'ours-fixed', 'R all.knots : ours, lambda fixed'],
  ['scipy-fixed', 'ours-fixed', 'SciPy : ours, lambda fixed'],
  ['r-gcv', 'ours-gcv', 'R default knots : ours, GCV'],
  ['r-all-gcv', 'ours-gcv', 'R all.knots : ours, GCV'],
  ['ours-fixed', 'floor', 'ours : floor, lambda fixed'],
  ['ours-gcv', 'floor', 'ours : floor, GCV'],
];
const LABEL_WIDTH = 40;
const CELL_WIDTH = 12;

type Cell = (size: SizeFigures) => string | undefined;

function table(title: string, sizes: SizeFigures[], rows: [label: string, cell: Cell][]): string {
  const line = (label: string, cells: string[]) =>
    label.padEnd(LABEL_WIDTH) + cells.map((cell) => cell.padStart(CELL_WIDTH)).join('');
  const heads = sizes.map(({ n }) => n.toLocaleString('en'));
  const body = rows
    .map(([label, cell]) => ({ label, cells: sizes.map((size) => cell(size) ?? '') }))
    .filter(({ cells }) => cells.some(Boolean))
    .map(({ label, cells }) => line(label, cells));
  return body.length === 0 ? '' : [line(title, heads), ...body].join('\n');
}

/** Four significant digits or so, without exponents where they can be avoided. */
function short(value: number | undefined): string | undefined {
  if (value === undefined) return undefined;
  if (!Number.isFinite(value)) return 'no number';
  if (value !== 0 && Math.abs(value) < 1e-4) return value.toExponential(1);
  return Math.abs(value) >= 100 ? value.toFixed(0) : value.toPrecision(3);
}

export function sizeTables(sizes: SizeFigures[]): string {
  const of = (route: string, figure: 'median' | 'edf' | 'difference'): Cell => {
    return ({ routes }) => short(routes[route]?.[figure]);
  };
  const seconds = table(
    'Seconds',
    sizes,
    LABELS.map(([route, label]) => [label, of(route, 'median')]),
  );
  const ratios = table(
    'Ratios',
    sizes,
    RATIOS.map(([above, below, label]) => [
      label,
      ({ routes }) => (routes[above] && routes[below] ? short(routes[above].median / routes[below].median) : undefined),
    ]),
  );
  const differences = table(
    'Largest difference from ours / range',
    sizes,
    LABELS.map(([route, label]) => [label, of(route, 'difference')]),
  );
  const freedom = table(
    'Degrees of freedom',
    sizes,
    LABELS.map(([route, label]) => [label, of(route, 'edf')]),
  );
  const exactness = table('Ours against quadruple precision', sizes, [
    ['fitted values / range', ({ exactness }) => short(exactness?.fitted)],
    ['degrees of freedom, relative', ({ exactness }) => short(exactness?.edf)],
    ['leverages, relative', ({ exactness }) => short(exactness?.leverage)],
  ]);
  return [seconds, ratios, differences, freedom, exactness].filter(Boolean).join('\n\n');
}

export function lotLines({ points, lots, single, contiguous, interleaved }: LotFigures): string {
  const ratio = (value: number) => `${short(value)} s (${(value / single).toFixed(2)} ×)`;
  return (
    `Fit and scores of ${points.toLocaleString('en')} points, lambda fixed: each its own lot ${short(single)} s; ` +
    `${lots} lots, contiguous ${ratio(contiguous)}, all interleaved over the whole window ${ratio(interleaved)}`
  );
}

export function allocationLines(figures: AllocationFigures[]): string {
  return figures
    .map(
      ({ what, candidates, bytesPerCandidate, keptBytes, collections }) =>
        `${what}: ${candidates} candidates of lambda on one evaluator allocate ${bytesPerCandidate.toFixed(0)} bytes each` +
        `${collections > 0 ? ` and more (${collections} collections meanwhile)` : ''}; ${keptBytes} bytes are kept after collection`,
    )
    .join('\n');
}

export function targetLines(targets: Target[]): string {
  const word = ({ isMet }: Target) => (isMet === undefined ? 'not measured' : isMet ? 'met' : 'NOT MET');
  return targets
    .map((target) => {
      const measured = target.value === undefined ? '' : `${short(target.value)}${target.isRatio ? ' ×' : ''}, `;
      return `${target.text}: ${measured}${word(target)}`;
    })
    .join('\n');
}
