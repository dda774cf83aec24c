/** Draws of a seeded generator: the same key gives the same draws on every machine. */
export interface Draws {
  /** Uniform on [0, 1). */
  uniform: () => number;
  /** Standard normal. */
  normal: () => number;
}

/** 32-bit hash of a text (FNV-1a with an avalanche at the end), the generator's state for that key. */
function hashOf(key: string): number {
  let hash = 0x811c9dc5;
  for (let i = 0; i < key.length; i++) hash = Math.imul(hash ^ key.charCodeAt(i), 0x01000193);
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
  hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35);
  return (hash ^ (hash >>> 16)) >>> 0;
}

/**
 * The draws that belong to a key, such as `seed/line/channel/lot`. Uniform draws come from a Weyl sequence with a
 * 32-bit mixing step (the scheme of Steele, Lea & Flood 2014, with the multipliers of Appleby's 32-bit finaliser);
 * normal draws from pairs of them by Box & Muller (1958).
 */
export function drawsFor(key: string): Draws {
  let state = hashOf(key);
  let spare: number | null = null;
  const uniform = (): number => {
    state = (state + 0x9e3779b9) >>> 0;
    let z = state;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return ((z ^ (z >>> 16)) >>> 0) / 4294967296;
  };
  const normal = (): number => {
    if (spare !== null) {
      const kept = spare;
      spare = null;
      return kept;
    }
    const radius = Math.sqrt(-2 * Math.log(1 - uniform()));
    const angle = 2 * Math.PI * uniform();
    spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  };
  return { uniform, normal };
}
