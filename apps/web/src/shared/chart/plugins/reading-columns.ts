import type { Columns } from '../columns';
import type { PanePlugin } from '../pane-plugin';
import { joinSpans, spanWithin } from '../value-scale';

const ALPHA = 0.34;

/** Readings as ink: a thin upright stroke from the least to the greatest of each column of pixels. */
export function readingColumns(columns: Columns): PanePlugin {
  return {
    span: (from, to) =>
      joinSpans([spanWithin(columns.at, columns.low, from, to), spanWithin(columns.at, columns.high, from, to)]),
    draw({ ctx, ratio, from, to, theme, x, y }) {
      ctx.globalAlpha = ALPHA;
      ctx.fillStyle = theme.colour('ink');
      const width = 1.25 * ratio;
      const least = 1.75 * ratio;
      for (let i = 0; i < columns.at.length; i++) {
        if (columns.at[i] < from || columns.at[i] > to) continue;
        const top = y(columns.high[i]);
        const height = Math.max(y(columns.low[i]) - top, least);
        ctx.fillRect(x(columns.at[i]) - width / 2, top, width, height);
      }
    },
  };
}
