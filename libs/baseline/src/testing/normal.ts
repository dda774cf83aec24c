/**
 * Seeded independent standard normal numbers: uniforms by xorshift (Marsaglia 2003, J. Stat. Softw. 8(14), shifts 13, 17, 5), normals by Box & Muller (1958).
 * @param seed an integer that is not a multiple of 2^32
 */
export function normals(seed: number): () => number {
  let x = seed | 0;
  const uniform = () => {
    x ^= x << 13;
    x ^= x >>> 17;
    x ^= x << 5;
    return ((x >>> 0) + 0.5) / 4294967296;
  };
  for (let i = 0; i < 20; i++) uniform();
  let spare = NaN;
  return () => {
    if (!Number.isNaN(spare)) {
      const other = spare;
      spare = NaN;
      return other;
    }
    const radius = Math.sqrt(-2 * Math.log(uniform()));
    const angle = 2 * Math.PI * uniform();
    spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  };
}
