/** A stretch of a temperature history below or above a range. */
export interface OutsideStretch {
  readonly side: 'below' | 'above';
  readonly fromS: number;
  readonly untilS: number;
}

/**
 * Where a temperature history lies outside a range, in order; an end of the range belongs to it.
 *
 * @param timeS        Corners: [n] in s, rising; straight between them.
 * @param temperatureK [n] in K.
 */
export function stretchesOutside(
  timeS: Float64Array,
  temperatureK: Float64Array,
  lowK: number,
  highK: number,
): OutsideStretch[] {
  const found: OutsideStretch[] = [];
  const add = (side: 'below' | 'above', fromS: number, untilS: number) => {
    const last = found.at(-1);
    if (last !== undefined && last.side === side && last.untilS === fromS)
      found[found.length - 1] = { ...last, untilS };
    else found.push({ side, fromS, untilS });
  };
  for (let i = 1; i < timeS.length; i += 1) {
    const [fromS, untilS] = [timeS[i - 1]!, timeS[i]!];
    const [fromK, toK] = [temperatureK[i - 1]!, temperatureK[i]!];
    const meets = (levelK: number) => fromS + ((untilS - fromS) * (levelK - fromK)) / (toK - fromK);
    const cuts = [lowK, highK].filter((levelK) => (levelK - fromK) * (levelK - toK) < 0).map(meets);
    const ends = [fromS, ...cuts.sort((a, b) => a - b), untilS];
    for (let k = 1; k < ends.length; k += 1) {
      const middleK = fromK + ((toK - fromK) * ((ends[k - 1]! + ends[k]!) / 2 - fromS)) / (untilS - fromS);
      if (middleK < lowK) add('below', ends[k - 1]!, ends[k]!);
      else if (middleK > highK) add('above', ends[k - 1]!, ends[k]!);
    }
  }
  return found;
}
