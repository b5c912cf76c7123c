import type { CureState } from '../cure-state.ts';
import { secondsOutside } from '../seconds-outside.ts';

/** Moves a state along the readings [from, to), whose degrees are known, and adds the time they spend outside a range. */
export function moveAlong(
  state: CureState,
  timeS: Float64Array,
  temperatureK: Float64Array,
  from: number,
  to: number,
  alpha: Float64Array,
  validK: readonly [number, number] | null,
): void {
  if (to === from) return;
  if (validK !== null) addSecondsOutside(state, validK, timeS, temperatureK, from, to);
  state.alpha = alpha[to - 1]!;
  state.timeS = timeS[to - 1]!;
  state.temperatureK = temperatureK[to - 1]!;
}

function addSecondsOutside(
  state: CureState,
  [lowK, highK]: readonly [number, number],
  timeS: Float64Array,
  temperatureK: Float64Array,
  from: number,
  to: number,
): void {
  let { timeS: lastS, temperatureK: lastK, outsideValidS } = state;
  let wasInside = lastK >= lowK && lastK <= highK;
  for (let i = from; i < to; i += 1) {
    const toK = temperatureK[i]!;
    const isInside = toK >= lowK && toK <= highK;
    if (!(isInside && wasInside)) outsideValidS += secondsOutside(timeS[i]! - lastS, lastK, toK, lowK, highK);
    wasInside = isInside;
    lastS = timeS[i]!;
    lastK = toK;
  }
  state.outsideValidS = outsideValidS;
}
