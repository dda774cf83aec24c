import type { ColourToken } from '../../theme/token-colour';
import type { EndWord, PanePlugin } from '../pane-plugin';
import { lastStepWithin, type Step } from '../step-line';

export interface LimitLine {
  token: ColourToken;
  /** Stands at the line's right end, `short` where there is little room. */
  word: (value: number) => { text: string; short: string };
  /** Colour of the word, where the line's own is too faint to read. */
  wordToken?: ColourToken;
  isDashed?: boolean;
  /** Drawn where it happens to lie: the value axis does not stretch to hold it. */
  isIncidental?: boolean;
}

/** A limit that is the same all along. */
export function levelLimit(value: number, line: LimitLine): PanePlugin {
  return {
    span: () => (line.isIncidental ? null : { low: value, high: value }),
    words: () => [{ value, ...line.word(value), token: line.wordToken ?? line.token }],
    draw({ ctx, ratio, left, width, theme, y }) {
      ctx.strokeStyle = theme.colour(line.token);
      ctx.lineWidth = ratio;
      ctx.setLineDash(line.isDashed ? [6 * ratio, 4 * ratio] : []);
      ctx.beginPath();
      ctx.moveTo(left, y(value));
      ctx.lineTo(left + width, y(value));
      ctx.stroke();
    },
  };
}

/** A limit that moves in steps, from lot to lot as the product changes. */
export function stepLimit(steps: readonly Step[], line: LimitLine): PanePlugin {
  return {
    span(from, to) {
      const seen = steps.filter((step) => step.from <= to && step.to >= from).map((step) => step.value);
      return seen.length === 0 ? null : { low: Math.min(...seen), high: Math.max(...seen) };
    },
    words(from, to): EndWord[] {
      const last = lastStepWithin(steps, from, to);
      return last === undefined
        ? []
        : [{ value: last.value, ...line.word(last.value), token: line.wordToken ?? line.token }];
    },
    draw({ ctx, ratio, from, to, theme, x, y }) {
      ctx.strokeStyle = theme.colour(line.token);
      ctx.lineWidth = ratio;
      ctx.setLineDash(line.isDashed ? [6 * ratio, 4 * ratio] : []);
      ctx.beginPath();
      let end: Step | null = null;
      for (const step of steps) {
        if (step.from > to || step.to < from) continue;
        if (end === null) ctx.moveTo(x(step.from), y(step.value));
        else joinSteps(ctx, x(end.to), x(step.from), y(end.value), y(step.value), 40 * ratio);
        ctx.lineTo(x(step.to), y(step.value));
        end = step;
      }
      ctx.stroke();
    },
  };
}

/** Neighbouring stretches are joined upright when they stand close; a wide gap stays a gap. */
function joinSteps(ctx: CanvasRenderingContext2D, x0: number, x1: number, y0: number, y1: number, near: number) {
  if (x1 - x0 > near) {
    ctx.moveTo(x1, y1);
    return;
  }
  ctx.lineTo((x0 + x1) / 2, y0);
  ctx.lineTo((x0 + x1) / 2, y1);
  ctx.lineTo(x1, y1);
}
