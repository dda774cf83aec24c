import type { LotMark } from '@app/contracts';
import type { ColourToken } from '../theme/token-colour';
import { MARK_EXTENT, markParts } from './mark-shapes';

const paths = new Map<string, Path2D>();

/** Draws a lot's mark on a canvas with its centre at (x, y), `size` pixels wide, in the colours that `colourOf` gives. */
export function drawMark(
  context: CanvasRenderingContext2D,
  mark: LotMark,
  at: { x: number; y: number; size: number },
  colourOf: (token: ColourToken) => string,
): void {
  const scale = at.size / (2 * MARK_EXTENT);
  context.save();
  context.translate(at.x, at.y);
  context.scale(scale, scale);
  for (const part of markParts(mark)) {
    const path = pathOf(part.path);
    context.globalAlpha = part.opacity;
    if (part.fill !== null) {
      context.fillStyle = colourOf(part.fill);
      context.fill(path);
    }
    if (part.stroke !== null) {
      context.strokeStyle = colourOf(part.stroke);
      context.lineWidth = part.strokeWidth;
      context.stroke(path);
    }
  }
  context.restore();
}

function pathOf(data: string): Path2D {
  let path = paths.get(data);
  if (path === undefined) {
    path = new Path2D(data);
    paths.set(data, path);
  }
  return path;
}
