/**
 * Seeded uniform numbers in [0, 1): x := (1103515245 x + 12345) mod 2^31, divided by 2^31 (the constants of the C standard's example).
 * The product is formed in two halves, so that every step is exact in doubles and any language gets the same numbers.
 */
export function lcg(seed: number): () => number {
  let x = seed % 2147483648;
  return () => {
    const low = (x % 65536) * 1103515245;
    const high = (Math.floor(x / 65536) * 1103515245) % 32768;
    x = (low + high * 65536 + 12345) % 2147483648;
    return x / 2147483648;
  };
}
