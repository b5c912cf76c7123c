/** Seconds that a straight piece of a temperature history spends below `lowK` or above `highK`. */
export function secondsOutside(spanS: number, fromK: number, toK: number, lowK: number, highK: number): number {
  const least = Math.min(fromK, toK);
  const most = Math.max(fromK, toK);
  if (least >= lowK && most <= highK) return 0;
  if (most <= lowK || least >= highK) return most === least && (most === lowK || least === highK) ? 0 : spanS;
  return spanS * ((Math.max(0, lowK - least) + Math.max(0, most - highK)) / (most - least));
}
