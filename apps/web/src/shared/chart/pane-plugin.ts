import type { ColourToken } from '../theme/token-colour';
import type { ChartTheme } from './chart-theme';
import type { ValueSpan } from './value-scale';

/** Where and how a pane's plugin draws. Lengths are canvas pixels: CSS pixels times `ratio`. */
export interface PaneSurface {
  ctx: CanvasRenderingContext2D;
  ratio: number;
  left: number;
  top: number;
  width: number;
  height: number;
  /** Visible range of time, epoch ms. */
  from: number;
  to: number;
  theme: ChartTheme;
  x: (at: number) => number;
  y: (value: number) => number;
}

/** A word that stands at the right end of a line, at the height of `value`. */
export interface EndWord {
  value: number;
  text: string;
  /** In a narrow gutter. */
  short?: string;
  token: ColourToken;
}

/** One kind of thing on a pane. Drawing is clipped to the pane, give or take `reach` at its left and right. */
export interface PanePlugin {
  /** CSS pixels by which a mark at the pane's very end may stand out of it; 0 unless given. */
  reach?: number;
  draw(surface: PaneSurface): void;
  /** What the value axis must hold while [from, to] is shown. */
  span?(from: number, to: number): ValueSpan | null;
  words?(from: number, to: number): EndWord[];
}
