import type { LotMark } from '@app/contracts';
import { drawMark } from '../../ui/mark-canvas';
import type { PanePlugin } from '../pane-plugin';
import type { ValueSpan } from '../value-scale';

export interface MarkedLot {
  at: number;
  value: number | null;
  mark: LotMark;
}

const LARGE = 18;
const SMALL = 11;
/** Below this many CSS pixels a lot the marks shrink, so that a month of lots does not clot. */
const ROOMY_PX = 9;
/** And below this many the dots of ordinary settled lots are points of two pixels, which a year of lots needs to stay smooth. */
const CROWDED_PX = 2.5;

/** Each lot's mark at its value. Lots that stand out are drawn last, over their neighbours. */
export function lotMarks(lots: readonly MarkedLot[]): PanePlugin {
  const drawn = lots.filter((lot) => lot.value !== null);
  const inOrder = [...drawn].sort((a, b) => weight(a.mark) - weight(b.mark));
  return {
    reach: LARGE / 2,
    span(from, to): ValueSpan | null {
      const seen = drawn.filter((lot) => lot.at >= from && lot.at <= to).map((lot) => lot.value as number);
      return seen.length === 0 ? null : { low: Math.min(...seen), high: Math.max(...seen) };
    },
    draw({ ctx, ratio, width, from, to, theme, x, y }) {
      const count = drawn.reduce((sum, lot) => sum + (lot.at >= from && lot.at <= to ? 1 : 0), 0);
      const pixelsPerLot = width / ratio / Math.max(count, 1);
      const isRoomy = pixelsPerLot > ROOMY_PX;
      const isCrowded = pixelsPerLot < CROWDED_PX;
      for (const lot of inOrder) {
        if (lot.at < from || lot.at > to) continue;
        if (isCrowded && isOrdinary(lot.mark)) {
          ctx.fillStyle = theme.colour('ink');
          ctx.fillRect(x(lot.at) - ratio, y(lot.value as number) - ratio, 2 * ratio, 2 * ratio);
          continue;
        }
        const size = (isRoomy || weight(lot.mark) > 1 ? LARGE : SMALL) * ratio;
        drawMark(ctx, lot.mark, { x: x(lot.at), y: y(lot.value as number), size }, theme.colour);
      }
    },
  };
}

const isOrdinary = (mark: LotMark) =>
  weight(mark) === 0 &&
  mark.controlState === 'within_control_limits' &&
  !mark.isProvisional &&
  !mark.hasNotice &&
  !mark.isExcluded;

function weight(mark: LotMark): number {
  if (mark.holdState === 'open') return 3;
  if (mark.disposition !== null || mark.controlState === 'outside_control_limits') return 2;
  return mark.specificationState === 'outside_specification' ? 2 : 0;
}
