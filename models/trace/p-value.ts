/** A probability under "goes with nothing", and how it was come by. */
export interface PValue {
  readonly p: number;
  readonly method: 'exact' | 'random-draws';
  /** Of p, where it was estimated from random draws; null where it is exact. */
  readonly standardError: number | null;
}

/** A probability of this or less is said to go with failure; common practice since Fisher (1925). */
export const TELLING_P = 0.05;

/** Random draws of a test too large to enumerate, at most. */
export const DRAWS = 10_000;
/** Draws end once this many were as extreme as what was seen: a large p needs no more digits. */
const ENOUGH_AS_EXTREME = 100;

export function exactly(p: number): PValue {
  return { p, method: 'exact', standardError: null };
}

/**
 * A probability estimated from random draws, sequentially: with h as extreme as what was seen after l draws, h/l; where all
 * n draws gave g < h, (g + 1)/(n + 1), what was seen counted as one of them.
 *
 * @param isAsExtreme Makes one draw, and says whether it is as extreme.
 * @param most        Draws at most, ≥ 1.
 * @returns p in (0, 1] with its standard error √(p(1 − p)/draws).
 *
 * Source: Besag & Clifford, Biometrika 78 (1991) 301–304; Phipson & Smyth, Stat Appl Genet Mol Biol 9 (2010) 39.
 */
export function fromDraws(isAsExtreme: () => boolean, most: number = DRAWS): PValue {
  let [asExtreme, draws] = [0, 0];
  while (draws < most && asExtreme < ENOUGH_AS_EXTREME) {
    draws += 1;
    if (isAsExtreme()) asExtreme += 1;
  }
  const p = asExtreme === ENOUGH_AS_EXTREME ? asExtreme / draws : (asExtreme + 1) / (draws + 1);
  return { p, method: 'random-draws', standardError: Math.sqrt((p * (1 - p)) / draws) };
}
