import { BELIEVABLE_K, type CureState } from '../cure-state.ts';
import type { VitrificationWatch } from '../vitrification.ts';
import type { LocalShapes } from './local-shapes.ts';
import type { Term } from './separable-law.ts';

// Constants stand in this file, and e^d = 1 + d + … + d⁵/120 (within 1.6e-8 for |d| ≤ 0.15, 1e-12 for |d| ≤ 0.03) in the
// loop itself, because an imported constant or a call costs every reading.

/** Natural logarithm by which the rate constant may change from reading to reading: the rule's error is then 2.5e-9. */
const STEEP = 0.25;
/** Readings after which the carried exponential is found anew, and the exponent up to which it is carried. */
const CARRIED_READINGS = 64;
const CARRIED = 0.05;

/** Why the inner loop was left: what is needed before the reading under way can be taken. */
const [NOTHING, OTHER, EXPONENTIAL, SERIES, GLASS] = [0, 1, 2, 3, 4];
const [COLDEST_K, HOTTEST_K] = BELIEVABLE_K;

/** What one reading hands to the next, beside the state: where each figure stands in `now`. */
const [THETA, LIMIT, C0, C1, C2, C3, C4] = [0, 1, 2, 3, 4, 5, 6]; // α = c0 + c1 θ + … up to θ = limit
const [INVERSE, K, CARRY] = [7, 8, 9]; // 1/T and the rate constant

/**
 * Follows dα/dt = A exp(−E/(R T(t))) g(α) over readings close together in time.
 *
 * With θ = ∫ k dt the degree depends on θ alone: dα/dθ = g(α). So θ is summed, each straight piece by the two-point
 * Hermite rule with two derivatives, h (k0 + k1)/2 + h² (k0' − k1')/10 + h³ (k0'' + k1'')/120, of order six, and α is
 * read off its Taylor series in θ, renewed every seventieth of the way to 0 or 1. Exponentials are carried from reading
 * to reading by the series of their quotient. What it cannot vouch for (a steep piece, an event) it declines.
 *
 * @param now      Of `FIGURES` figures: what one reading hands to the next; as `oneTermAnchored` gives it for the first.
 * @param shapes   Tells how far a series reaches.
 * Other parameters and the result as `stepReadings`.
 *
 * Accuracy: 2e-8 of the time that has passed at worst; test/models/cure/fast.test.ts measures the degree on noisy and
 *   stepping histories.
 * Source: Lanczos, Applied Analysis (1956), ch. VI (two-point Hermite quadrature); θ: Vyazovkin et al., Thermochim Acta
 *   520 (2011) 1–19, §3.
 */
export function stepOneTerm(
  { constants, shape }: Term,
  now: Float64Array,
  shapes: LocalShapes,
  state: CureState,
  timeS: Float64Array,
  temperatureK: Float64Array,
  from: number,
  to: number,
  degreeEnd: number,
  watch: VitrificationWatch | null,
  alphaOut: Float64Array,
): number {
  const [A, energyK] = [constants[0]!, constants[1]!];
  let { alpha, timeS: fromS, temperatureK: fromK } = state;
  let [theta, limit, lastInverse, lastK, carry] = [now[THETA]!, now[LIMIT]!, now[INVERSE]!, now[K]!, now[CARRY]!];
  let [c0, c1, c2, c3, c4] = [now[C0]!, now[C1]!, now[C2]!, now[C3]!, now[C4]!];
  let limitTgK = watch === null ? 0 : shapes.limitTgK;
  // First and second derivative of the rate constant by T.
  let lastSlope = lastK * (energyK * lastInverse * lastInverse);
  let lastBend = lastSlope * (energyK * lastInverse * lastInverse - 2 * lastInverse);
  let i = from;
  let toldTo = from;
  let notGlassy = -1;
  let freshFor = -1;
  let freshK = 0;
  let [toK, inverse, next] = [0, 0, 0];

  for (;;) {
    let need = NOTHING;
    // No call in here: the figures of a reading stay in registers.
    for (; i < to; i += 1) {
      const toS = timeS[i]!;
      toK = temperatureK[i]!;
      const h = toS - fromS;
      const dT = toK - fromK;
      inverse = 1 / toK;
      const d = energyK * (lastInverse - inverse);
      if (!(h > 0 && Math.abs(d) <= STEEP && toK >= COLDEST_K && toK <= HOTTEST_K)) {
        need = OTHER;
        break;
      }
      if ((carry <= 0 || Math.abs(d) > CARRIED) && freshFor !== i) {
        need = EXPONENTIAL;
        break;
      }
      const k =
        freshFor === i ? freshK : lastK * (1 + d * (1 + d * (1 / 2 + d * (1 / 6 + d * (1 / 24 + d * (1 / 120))))));
      const b = energyK * inverse * inverse;
      const slope = k * b;
      const bend = slope * (b - 2 * inverse);
      const nextTheta =
        theta + h * (0.5 * (lastK + k) + dT * (0.1 * (lastSlope - slope) + dT * (1 / 120) * (lastBend + bend)));
      if (!(nextTheta <= limit)) {
        need = SERIES;
        break;
      }
      next = c0 + nextTheta * (c1 + nextTheta * (c2 + nextTheta * (c3 + nextTheta * c4)));
      if (!(next >= alpha && next < degreeEnd)) {
        need = OTHER;
        break;
      }
      if ((toK <= limitTgK || fromK <= limitTgK) && notGlassy !== i) {
        need = GLASS;
        break;
      }
      theta = nextTheta;
      alpha = next;
      fromS = toS;
      fromK = toK;
      lastInverse = inverse;
      lastK = k;
      lastSlope = slope;
      lastBend = bend;
      carry -= 1;
      alphaOut[i] = alpha;
    }
    if (need === NOTHING) break;
    if (need === EXPONENTIAL) {
      freshK = A * Math.exp(-energyK * inverse);
      freshFor = i;
      carry = CARRIED_READINGS;
    } else if (need === SERIES && !(theta === 0 && limit > 0)) {
      [theta, c0] = [0, alpha];
      [limit, c1, c2, c3, c4] = shapes.seriesInTheta(shape, alpha);
      limitTgK = watch === null ? 0 : shapes.limitTgK;
    } else if (need === GLASS && watch !== null) {
      watch.acceptAll(timeS, temperatureK, toldTo, i);
      toldTo = i;
      const toS = timeS[i]!;
      if (shapes.isGlassy(next, Math.min(fromK, toK)) && watch.maySteady(fromS, fromK, toS, toK)) break;
      notGlassy = i;
    } else {
      break;
    }
  }
  watch?.acceptAll(timeS, temperatureK, toldTo, i);
  now.set([theta, limit, c0, c1, c2, c3, c4, lastInverse, lastK, carry]);
  return i;
}

/** The figures at a degree: no series yet, the exponential fresh. */
export function oneTermAnchored({ constants }: Term, { temperatureK }: CureState): readonly number[] {
  const inverse = 1 / temperatureK;
  return [0, -1, 0, 0, 0, 0, 0, inverse, constants[0]! * Math.exp(-constants[1]! * inverse), CARRIED_READINGS];
}
