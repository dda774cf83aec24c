/**
 * Places for words at the ends of lines: each as near to its line as it can be with `gap` between neighbours, inside
 * [top, bottom]. Answers in the order given. Words that cannot all fit are packed from the top.
 */
export function spreadWords(wanted: readonly number[], gap: number, top: number, bottom: number): number[] {
  const order = wanted.map((_, i) => i).sort((a, b) => wanted[a] - wanted[b]);
  const placed = new Array<number>(wanted.length);
  let least = top;
  for (const i of order) {
    placed[i] = Math.max(wanted[i], least);
    least = placed[i] + gap;
  }
  let greatest = bottom;
  for (const i of order.reverse()) {
    placed[i] = Math.min(placed[i], greatest);
    greatest = placed[i] - gap;
  }
  if (order.length > 0) {
    const shift = top - placed[order[order.length - 1]];
    if (shift > 0) return placed.map((place) => place + shift);
  }
  return placed;
}
