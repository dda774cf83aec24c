import { decimalsOf, formatNumber } from '@app/contracts';
import uPlot from 'uplot';
import type { ChartTheme } from './chart-theme';
import { drawEndWords } from './end-words';
import type { PanePlugin, PaneSurface } from './pane-plugin';
import type { TimeRange } from './range';
import { timeLabels } from './time-labels';
import { axisEnds, joinSpans } from './value-scale';
import { zonedDate } from './zoned-date';

/** What a chart shows; may change at any time and is read when it draws. */
export interface ChartContent {
  plugins: readonly PanePlugin[];
  range: TimeRange;
  theme: ChartTheme;
  /** The value axis never spans less than this. */
  leastHeight: number;
  /** Instant under the pointer; null when it left. */
  onCursor?: (at: number | null) => void;
}

/** What a chart is; a change builds it anew. */
export interface ChartFrame {
  zone: string;
  unit: string;
  hasTimeAxis: boolean;
  syncKey: string;
  gutters: { left: number; right: number };
}

export const TIME_AXIS_PX = 38;
const TOP_PX = 26;

/** uPlot draws axes, grid and cursor and owns scales and zone; everything else on the pane is drawn by its plugins. */
export function chartOptions(frame: ChartFrame, size: { width: number; height: number }, content: () => ChartContent) {
  const font = () => `12px ${content().theme.fontFamily}`;
  const ink = () => content().theme.colour('ink-soft');
  const grid = { stroke: () => content().theme.colour('grid'), width: 1 };
  const options: uPlot.Options = {
    ...size,
    ms: 1,
    tzDate: (at) => zonedDate(at, frame.zone),
    padding: [TOP_PX, frame.gutters.right, frame.hasTimeAxis ? 0 : 6, 0],
    legend: { show: false },
    cursor: {
      y: false,
      points: { show: false },
      drag: { x: false, y: false, setScale: false },
      sync: { key: frame.syncKey, scales: ['x', null] },
      bind: { dblclick: () => null, mousedown: () => null, mouseup: () => null },
    },
    scales: {
      x: { time: true },
      y: {
        range: (u) => {
          const { min, max } = u.scales.x;
          const { plugins, range, leastHeight } = content();
          const [from, to] = [min ?? range.from, max ?? range.to];
          return axisEnds(joinSpans(plugins.map((plugin) => plugin.span?.(from, to) ?? null)), leastHeight);
        },
      },
    },
    axes: [
      {
        show: true,
        size: frame.hasTimeAxis ? TIME_AXIS_PX : 0,
        font: font(),
        stroke: ink,
        grid,
        ticks: { show: frame.hasTimeAxis, stroke: grid.stroke, size: 4 },
        space: 72,
        values: (_, splits, _axis, _space, step) =>
          frame.hasTimeAxis ? timeLabels(splits, step, frame.zone) : splits.map(() => null),
      },
      {
        size: frame.gutters.left,
        font: font(),
        stroke: ink,
        grid,
        ticks: { show: false },
        gap: 6,
        space: 28,
        values: (_, splits, _axis, _space, step) => {
          const decimals = decimalsOf(step);
          return splits.map((value) => formatNumber(value, decimals));
        },
      },
    ],
    series: [{}, { paths: () => null, points: { show: false } }],
    plugins: [layers(frame, content)],
  };
  return options;
}

function layers(frame: ChartFrame, content: () => ChartContent): uPlot.Plugin {
  return {
    hooks: {
      draw: (u) => drawLayers(u, frame, content()),
      setCursor: (u) => {
        const left = u.cursor.left ?? -1;
        content().onCursor?.(left < 0 ? null : u.posToVal(left, 'x'));
      },
    },
  };
}

function drawLayers(u: uPlot, frame: ChartFrame, { plugins, range, theme }: ChartContent) {
  const surface: PaneSurface = {
    ctx: u.ctx,
    ratio: uPlot.pxRatio,
    left: u.bbox.left,
    top: u.bbox.top,
    width: u.bbox.width,
    height: u.bbox.height,
    from: u.scales.x.min ?? range.from,
    to: u.scales.x.max ?? range.to,
    theme,
    x: (at) => u.valToPos(at, 'x', true),
    y: (value) => u.valToPos(value, 'y', true),
  };
  const { ctx, ratio, left, top, width, height } = surface;
  for (const plugin of plugins) {
    const reach = (plugin.reach ?? 0) * ratio;
    ctx.save();
    ctx.beginPath();
    ctx.rect(left - reach, top, width + 2 * reach, height);
    ctx.clip();
    plugin.draw(surface);
    ctx.restore();
  }
  ctx.save();
  drawEndWords(
    surface,
    plugins.flatMap((plugin) => plugin.words?.(surface.from, surface.to) ?? []),
    frame.gutters.right,
  );
  ctx.font = `${12 * ratio}px ${theme.fontFamily}`;
  ctx.fillStyle = theme.colour('ink-soft');
  ctx.textAlign = 'left';
  ctx.textBaseline = 'alphabetic';
  ctx.fillText(frame.unit, Math.max(left - frame.gutters.left * ratio, 0) + 2 * ratio, top - 11 * ratio);
  ctx.restore();
}
