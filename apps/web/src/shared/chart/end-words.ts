import type { EndWord, PaneSurface } from './pane-plugin';
import { spreadWords } from './spread-words';

const WORD_PX = 11;
const GAP_PX = 13;
const NARROW_PX = 100;

/** Writes the words at the right ends of a pane's lines, in the gutter (CSS pixels wide), parted where they would touch. */
export function drawEndWords(surface: PaneSurface, words: readonly EndWord[], gutter: number): void {
  const { ctx, ratio, left, top, width, height, theme } = surface;
  const inside = words.filter((word) => {
    const place = surface.y(word.value);
    return place >= top - ratio && place <= top + height + ratio;
  });
  const half = 5 * ratio;
  const places = spreadWords(
    inside.map((word) => surface.y(word.value)),
    GAP_PX * ratio,
    top + half,
    top + height - half,
  );
  ctx.font = `${WORD_PX * ratio}px ${theme.fontFamily}`;
  ctx.textBaseline = 'middle';
  ctx.textAlign = 'left';
  inside.forEach((word, i) => {
    ctx.fillStyle = theme.colour(word.token);
    const text = gutter < NARROW_PX ? (word.short ?? word.text) : word.text;
    ctx.fillText(text, left + width + 6 * ratio, places[i]);
  });
}
