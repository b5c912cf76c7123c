/** All ways to choose some of n places, for checks by enumeration. */
export function* choices(n: number, some: number, from = 0): Generator<number[]> {
  if (some === 0) {
    yield [];
    return;
  }
  for (let first = from; first <= n - some; first += 1) {
    for (const rest of choices(n, some - 1, first + 1)) yield [first, ...rest];
  }
}

/** Share of the choices of the failed, within strata, that are as extreme as what was seen. */
export function shareOfChoices(
  stratum: readonly number[],
  isFailed: readonly number[],
  isAsExtreme: (isFailed: readonly number[]) => boolean,
): number {
  const failedIn = (dealt: readonly number[]) => {
    const counts = new Map<number, number>();
    for (const [i, one] of dealt.entries()) counts.set(stratum[i]!, (counts.get(stratum[i]!) ?? 0) + one);
    return counts;
  };
  const given = failedIn(isFailed);
  let [all, extreme] = [0, 0];
  const failed = isFailed.reduce((sum, one) => sum + one, 0);
  for (const places of choices(isFailed.length, failed)) {
    const dealt = isFailed.map((_, i) => (places.includes(i) ? 1 : 0));
    if ([...failedIn(dealt)].some(([key, count]) => given.get(key) !== count)) continue;
    all += 1;
    if (isAsExtreme(dealt)) extreme += 1;
  }
  return extreme / all;
}
