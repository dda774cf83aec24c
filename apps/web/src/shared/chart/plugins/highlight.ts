import type { PanePlugin } from '../pane-plugin';

/** Shades one lot's stretch of time through the pane, so that the eye finds it in the others. */
export function highlight(from: number, to: number): PanePlugin {
  return {
    draw({ ctx, ratio, top, height, theme, x }) {
      const width = Math.max(x(to) - x(from), 3 * ratio);
      ctx.globalAlpha = 0.1;
      ctx.fillStyle = theme.colour('action');
      ctx.fillRect((x(from) + x(to)) / 2 - width / 2, top, width, height);
    },
  };
}
