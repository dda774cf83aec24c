/**
 * Moves increasing knots as little as possible (in the sum of squares of their moves) so that neighbours, and the ends, are at least a spacing apart.
 * With the spacing taken off, k_j - j s, the condition is that the numbers do not decrease and stay in a range: isotonic regression by pooling
 * adjacent violators (Ayer et al. 1955, Ann. Math. Stat. 26:641), then clipping.
 * @param knots increasing, relative to the first end
 * @param spacing s, > 0, with (knots + 1) * spacing <= length
 * @param length of the stretch between the ends
 */
export function spaceKnots(knots: Float64Array, spacing: number, length: number): Float64Array {
  const mean: number[] = [];
  const size: number[] = [];
  knots.forEach((knot, j) => {
    mean.push(knot - (j + 1) * spacing);
    size.push(1);
    while (mean.length > 1 && mean[mean.length - 2] > mean[mean.length - 1]) {
      const [m, n] = [mean.pop()!, size.pop()!];
      const last = mean.length - 1;
      mean[last] = (mean[last] * size[last] + m * n) / (size[last] + n);
      size[last] += n;
    }
  });
  const room = Math.max(0, length - (knots.length + 1) * spacing);
  const result = new Float64Array(knots.length);
  let j = 0;
  mean.forEach((m, block) => {
    const shift = Math.min(room, Math.max(0, m));
    for (let k = 0; k < size[block]; k++, j++) result[j] = shift + (j + 1) * spacing;
  });
  return result;
}
