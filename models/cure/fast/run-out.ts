import { BELIEVABLE_K, type CureState } from '../cure-state.ts';
import type { VitrificationWatch } from '../vitrification.ts';
import type { LocalShapes } from './local-shapes.ts';
import { moveAlong } from './move-along.ts';

/** Goes through readings once all has reacted; returns the first that is none, or in which the resin may vitrify. */
export function runOut(
  state: CureState,
  timeS: Float64Array,
  temperatureK: Float64Array,
  from: number,
  to: number,
  shapes: LocalShapes,
  watch: VitrificationWatch | null,
  alphaOut: Float64Array,
  validK: readonly [number, number] | null,
): number {
  let { timeS: lastS, temperatureK: lastK } = state;
  let i = from;
  for (; i < to; i += 1) {
    const toS = timeS[i]!;
    const toK = temperatureK[i]!;
    if (!(toS > lastS && toK >= BELIEVABLE_K[0] && toK <= BELIEVABLE_K[1])) break;
    if (watch !== null) {
      if (shapes.isGlassy(1, Math.min(lastK, toK)) && watch.maySteady(lastS, lastK, toS, toK)) break;
      watch.accept(toS, toK);
    }
    alphaOut[i] = state.alpha;
    lastS = toS;
    lastK = toK;
  }
  moveAlong(state, timeS, temperatureK, from, i, alphaOut, validK);
  return i;
}
