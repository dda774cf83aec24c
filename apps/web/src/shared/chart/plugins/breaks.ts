import type { PanePlugin } from '../pane-plugin';

export interface BreakRule {
  at: number;
  /** Small words beside the rule; null draws the rule alone. */
  words: string | null;
}

/** `text` cut to fit `width`, with an ellipsis; empty when not even a few letters fit. */
export function fitWords(text: string, width: number, measure: (text: string) => number): string {
  if (measure(text) <= width) return text;
  for (let length = text.length - 1; length > 3; length--) {
    const cut = text.slice(0, length).trimEnd() + '\u2026';
    if (measure(cut) <= width) return cut;
  }
  return '';
}

/** Full-height dotted rules where the baseline starts afresh, each with its reason in small type. */
export function breakRules(breaks: readonly BreakRule[]): PanePlugin {
  const sorted = [...breaks].sort((a, b) => a.at - b.at);
  return {
    draw({ ctx, ratio, left, top, width, height, from, to, theme, x }) {
      ctx.strokeStyle = theme.colour('ink-soft');
      ctx.lineWidth = 1.25 * ratio;
      ctx.setLineDash([1.5 * ratio, 3 * ratio]);
      const visible = sorted.filter((rule) => rule.at >= from && rule.at <= to);
      for (const rule of visible) {
        ctx.beginPath();
        ctx.moveTo(x(rule.at), top);
        ctx.lineTo(x(rule.at), top + height);
        ctx.stroke();
      }
      ctx.font = `${11 * ratio}px ${theme.fontFamily}`;
      ctx.fillStyle = theme.colour('ink-soft');
      ctx.textBaseline = 'bottom';
      ctx.textAlign = 'left';
      visible.forEach((rule, i) => {
        if (rule.words === null) return;
        const end = i + 1 < visible.length ? x(visible[i + 1].at) : left + width;
        const room = end - x(rule.at) - 8 * ratio;
        const text = fitWords(rule.words, room, (part) => ctx.measureText(part).width);
        ctx.fillText(text, x(rule.at) + 4 * ratio, top + height - 3 * ratio);
      });
    },
  };
}
