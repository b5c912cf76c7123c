/** Cure has no spikes to be lost: between figures so far apart, s, it runs straight to the eye. */
const APART_S = 15;

/** Places of the figures that are drawn: the first, the last, and between them none closer than that. */
export function thinned(timeS: Float64Array): number[] {
  const kept: number[] = [];
  let lastS = Number.NEGATIVE_INFINITY;
  for (let n = 0; n < timeS.length; n += 1) {
    const at = timeS[n] ?? Number.NaN;
    if (at - lastS < APART_S && n < timeS.length - 1) continue;
    kept.push(n);
    lastS = at;
  }
  return kept;
}
