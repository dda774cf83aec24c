import { mergeColumns, type Columns } from '../columns';
import type { PanePlugin } from '../pane-plugin';
import { joinSpans, spanWithin } from '../value-scale';

const ALPHA = 0.34;
const STROKE_PX = 1.25;

/** Readings as ink: a thin upright stroke from the least to the greatest of each column of pixels. */
export function readingColumns(columns: Columns): PanePlugin {
  return {
    span: (from, to) =>
      joinSpans([spanWithin(columns.at, columns.low, from, to), spanWithin(columns.at, columns.high, from, to)]),
    draw({ ctx, ratio, width: room, from, to, theme, x, y }) {
      const drawn = mergeColumns(columns, from, to, room / ratio / STROKE_PX);
      ctx.globalAlpha = ALPHA;
      ctx.fillStyle = theme.colour('ink');
      const width = STROKE_PX * ratio;
      const least = 1.75 * ratio;
      for (let i = 0; i < drawn.at.length; i++) {
        const top = y(drawn.high[i]);
        const height = Math.max(y(drawn.low[i]) - top, least);
        ctx.fillRect(x(drawn.at[i]) - width / 2, top, width, height);
      }
    },
  };
}
