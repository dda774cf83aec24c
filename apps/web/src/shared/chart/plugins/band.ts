import type { ColourToken } from '../../theme/token-colour';
import type { PanePlugin, PaneSurface } from '../pane-plugin';
import { joinSpans, spanWithin } from '../value-scale';

/** A curve with a band about it; a null value parts it. */
export interface BandedCurve {
  at: readonly number[];
  value: readonly (number | null)[];
  low: readonly (number | null)[];
  high: readonly (number | null)[];
}

const BAND_ALPHA = 0.14;

/** Index ranges [first, last] of the unbroken runs of a curve. */
export function runsOf(values: readonly (number | null)[]): [first: number, last: number][] {
  const runs: [number, number][] = [];
  let first = -1;
  for (let i = 0; i <= values.length; i++) {
    const isThere = i < values.length && values[i] !== null;
    if (isThere && first < 0) first = i;
    if (!isThere && first >= 0) {
      runs.push([first, i - 1]);
      first = -1;
    }
  }
  return runs;
}

/** A fitted curve with its band, and its word at the right end. */
export function band(curve: BandedCurve, token: ColourToken, word: string, short = word): PanePlugin {
  const runs = runsOf(curve.value);
  return {
    span: (from, to) =>
      joinSpans([curve.low, curve.high, curve.value].map((values) => spanWithin(curve.at, values, from, to))),
    words(from, to) {
      const last = curve.at.findLastIndex((at, i) => at <= to && at >= from && curve.value[i] !== null);
      return last < 0 ? [] : [{ value: curve.value[last] as number, text: word, short, token }];
    },
    draw(surface) {
      surface.ctx.fillStyle = surface.theme.colour(token);
      surface.ctx.strokeStyle = surface.theme.colour(token);
      for (const run of runs) drawRun(surface, curve, run);
    },
  };
}

function drawRun({ ctx, ratio, x, y }: PaneSurface, curve: BandedCurve, [first, last]: [number, number]) {
  ctx.globalAlpha = BAND_ALPHA;
  ctx.beginPath();
  for (let i = first; i <= last; i++) ctx.lineTo(x(curve.at[i]), y(curve.high[i] ?? (curve.value[i] as number)));
  for (let i = last; i >= first; i--) ctx.lineTo(x(curve.at[i]), y(curve.low[i] ?? (curve.value[i] as number)));
  ctx.closePath();
  ctx.fill();
  ctx.globalAlpha = 1;
  ctx.lineWidth = 1.75 * ratio;
  ctx.lineJoin = 'round';
  ctx.beginPath();
  for (let i = first; i <= last; i++) ctx.lineTo(x(curve.at[i]), y(curve.value[i] as number));
  ctx.stroke();
}
