/** A stream of pseudo-random numbers that starts from a seed: the same seed gives the same stream. */
export interface Random {
  /** Uniform in [0, 1). */
  next(): number;
  /** Normal with mean 0 and standard deviation 1. */
  normal(): number;
}

/**
 * A generator of 128 bits of state.
 *
 * sfc32 with a counter; normals by the polar form of Box and Muller.
 *
 * Source: C. Doty-Humphrey, PractRand (public domain), `sfc32`; G. Marsaglia & T. A. Bray, SIAM Review 6 (1964) 260.
 */
export function beginRandom(seed: number): Random {
  let a = 0x9e3779b9 | 0;
  let b = seed | 0;
  let c = 0x243f6a88 | 0;
  let counter = 1;
  let spare: number | null = null;

  const next = (): number => {
    const mixed = (((a + b) | 0) + counter) | 0;
    counter = (counter + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + mixed) | 0;
    return (mixed >>> 0) / 2 ** 32;
  };
  const normal = (): number => {
    if (spare !== null) {
      const kept = spare;
      spare = null;
      return kept;
    }
    for (;;) {
      const x = 2 * next() - 1;
      const y = 2 * next() - 1;
      const s = x * x + y * y;
      if (s >= 1 || s === 0) continue;
      const scale = Math.sqrt((-2 * Math.log(s)) / s);
      spare = y * scale;
      return x * scale;
    }
  };
  for (let warm = 0; warm < 15; warm++) next();
  return { next, normal };
}

/** A seed of 32 bits from a name (FNV-1a), so that each run has a stream of its own. */
export function seedFrom(name: string): number {
  let hash = 0x811c9dc5;
  for (const byte of new TextEncoder().encode(name)) hash = Math.imul(hash ^ byte, 0x01000193);
  return hash >>> 0;
}
