import { BELIEVABLE_K, type CureState } from '../cure-state.ts';
import type { VitrificationWatch } from '../vitrification.ts';
import type { LocalShapes } from './local-shapes.ts';
import type { SeparableLaw } from './separable-law.ts';

// Constants stand in this file, and e^d = 1 + d + … + d⁵/120 (within 1.6e-8 for |d| ≤ 0.15, 1e-12 for |d| ≤ 0.03) in the
// loop itself, because an imported constant or a call costs every reading.

/**
 * Greatest correction of the trapezoidal rule, per degree gained. For a rate that changes by a factor e^x over the step
 * it is x²/12, and the error that is left x⁴/720: a fifth of its square, here 7e-7.
 */
const CORRECTED_WITHIN = 1.9e-3;
/**
 * The same in the branch before a jump of the law: an error there is one in time, and counts as many times more as the
 * rate is higher behind the jump. So rate constants are carried, and degrees moved along a line, less far too.
 */
const STRICT_WITHIN = 1.5e-4;
const STRICT_CARRIED = 0.04;
const STRICT_NEAR = 0.25;
/** Natural logarithm by which the rate may change within one part of a step; above it the reading is cut into parts. */
const BEND = 0.15;
const MOST_PARTS = 8;
/** A gain of less than this is rounding. */
const ROUNDING = 4e-16;
/** Parts for which one reference line serves. */
const LINE_PARTS = 8;
/** Fraction of the negative second term that must be left over: nearer to standing still, the other integrator looks. */
const LEFT_OVER = 0.002;
/** Parts after which exponentials carried along are found anew, and the exponent up to which they are carried. */
const CARRIED_PARTS = 64;
const CARRIED = 0.15;
/** Exponent of the diffusion factor above which nothing is let through, and it is not carried. */
const SHUT = 300;

/** Why the inner loop was left: what is needed before the part under way can be taken. */
const [NOTHING, OTHER, EXPONENTIALS, DIFFUSION, SHAPES, LINE, GLASS] = [0, 1, 2, 3, 4, 5, 6];
const [COLDEST_K, HOTTEST_K] = BELIEVABLE_K;

/** What one reading hands to the next, beside the state: where each figure stands in `now`. */
const [F, F_T, F_AF] = [0, 1, 2]; // rate, its derivative by T, and that by α times the rate
const [LINE_S, LINE_ALPHA, LINE_F, LINE_AGE] = [3, 4, 5, 6]; // the reference line
const [INVERSE, K1, K2, Z, HELD, CARRY] = [7, 8, 9, 10, 11, 12]; // 1/T and the exponentials at it

/**
 * Follows dα/dt = rate(T(t), α) over readings close together in time, for less than three exponentials a reading.
 *
 * Each straight piece between two readings is one step (or up to eight) of the two-derivative trapezoidal (Hermite) rule
 * α1 = α0 + h/2 (f0 + f1) + h²/12 (f0' − f1'), f' = ∂f/∂T dT/dt + ∂f/∂α f, of order four. f1 is found on a reference
 * line drawn through a degree a few readings back, and moved to α1 by its derivative, so that readings need not wait for
 * each other in the processor. The shapes in α are Taylor polynomials, renewed when α leaves their reach; exponentials
 * are carried from reading to reading by the series of their quotient. The last term of the rule bounds the error. What
 * it cannot vouch for (a long or steep piece, an event, a jump of the law) it declines, and the step-by-step integrator
 * does that piece.
 *
 * Accuracy: 7e-7 per unit of degree gained at worst; test/models/cure/fast.test.ts measures it on noisy and stepping
 *   histories.
 * Source: Hairer, Nørsett & Wanner, Solving Ordinary Differential Equations I, 2nd ed., §II.13 (multiderivative
 *   methods).
 *
 * @param now        Of {@link FIGURES} figures: what one reading hands to the next; as `anchored` gives it for the first.
 * @param shapes     The law's shapes about the present degree.
 * @param degreeEnd  Degree that must not be reached here.
 * @param watch      Told of every reading gone through; a piece that may vitrify is declined. Null: none is looked at.
 * @param alphaOut   Filled with the degree at each reading.
 * @returns Index of the first reading declined, or `to`. Only where it is `to` may `now` be carried on.
 */
export function stepReadings(
  law: SeparableLaw,
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
  const [first, second] = law.branches[state.branch]!;
  const [A1, energy1K] = [first.constants[0]!, first.constants[1]!];
  const hasSecond = second !== undefined;
  const A2 = second === undefined ? 0 : second.constants[0]!;
  const energy2K = second === undefined ? 0 : second.constants[1]!;
  const isAllHeld = law.held === 'all';
  const isSecondHeld = law.held === 'second term';
  const isHeld = isAllHeld || isSecondHeld;
  const [C, alphaC0, alphaCT] = [law.diffusion[0]!, law.diffusion[1]!, law.diffusion[2]!];
  const taylor = shapes.taylor;
  const isStrict = state.branch < law.branches.length - 1;
  const carried = isStrict ? STRICT_CARRIED : CARRIED;
  const nearer = isStrict ? STRICT_NEAR : 1;

  /** Where the last part ended. */
  let { alpha: a, timeS: aS, temperatureK: aK } = state;
  let [f, fT, fAf] = [now[F]!, now[F_T]!, now[F_AF]!];
  let [lineS, lineAlpha, lineF, lineAge] = [now[LINE_S]!, now[LINE_ALPHA]!, now[LINE_F]!, now[LINE_AGE]!];
  let [lastInverse, k1, k2] = [now[INVERSE]!, now[K1]!, now[K2]!];
  let [lastZ, held, carry] = [now[Z]!, now[HELD]!, now[CARRY]!];
  let { center, limit, near } = shapes;
  near *= nearer;
  const within = isStrict ? STRICT_WITHIN : CORRECTED_WITHIN;
  let limitTgK = watch === null ? 0 : shapes.limitTgK;
  let [p0, p1, p2, p3, p4] = [taylor[0]!, taylor[1]!, taylor[2]!, taylor[3]!, taylor[4]!];
  let [q0, q1, q2, q3, q4] = [taylor[5]!, taylor[6]!, taylor[7]!, taylor[8]!, taylor[9]!];
  /** The reading under way. */
  let i = from;
  let toldTo = from;
  let [toS, toK, h, dT, partsLeft] = [0, 0, 0, 0, 0];
  let next = 0;
  let notGlassyS = Number.NaN;
  let [partS, partK, inverse, onLine, z] = [0, 0, 0, 0, 0];

  for (;;) {
    let need = NOTHING;
    // No call in here: the figures of a reading stay in registers.
    for (;;) {
      if (partsLeft === 0) {
        if (i === to) break;
        toS = timeS[i]!;
        toK = temperatureK[i]!;
        h = toS - aS;
        dT = toK - aK;
        if (!(h > 0 && toK >= COLDEST_K && toK <= HOTTEST_K)) {
          need = OTHER;
          break;
        }
        partsLeft = 1;
        const bend = Math.abs(fT * dT) + h * Math.abs(fAf);
        if (!(bend <= BEND * f)) {
          partsLeft = Math.ceil(bend / (BEND * f));
          if (!(partsLeft >= 1 && partsLeft <= MOST_PARTS)) {
            need = OTHER;
            break;
          }
          h /= partsLeft;
          dT /= partsLeft;
        }
      }
      partS = partsLeft === 1 ? toS : aS + h;
      partK = partsLeft === 1 ? toK : aK + dT;
      inverse = 1 / partK;
      const d1 = energy1K * (lastInverse - inverse);
      const d2 = energy2K * (lastInverse - inverse);
      if (carry <= 0 || !(Math.abs(d1) <= carried && Math.abs(d2) <= carried)) {
        need = EXPONENTIALS;
        break;
      }
      if (lineAge >= LINE_PARTS) {
        lineS = aS;
        lineAlpha = a;
        lineF = f;
        lineAge = 0;
      }
      onLine = lineAlpha + (partS - lineS) * lineF;
      if (!(onLine <= limit)) {
        need = SHAPES;
        break;
      }
      const d = onLine - center;
      const nextK1 = k1 * (1 + d1 * (1 + d1 * (1 / 2 + d1 * (1 / 6 + d1 * (1 / 24 + d1 * (1 / 120))))));
      const p3d = p3 + d * p4;
      const p2d = p2 + d * p3d;
      const p1d = p1 + d * p2d;
      let sum = nextK1 * (p0 + d * p1d);
      let sumA = nextK1 * (p1d + d * (p2d + d * (p3d + d * p4)));
      let sumT = sum * energy1K;
      let nextHeld = 0;
      let factor = 1;
      if (isHeld) {
        z = C * (onLine - alphaC0 - alphaCT * partK);
        if (!(Math.abs(z - lastZ) <= CARRIED && z < SHUT)) {
          need = DIFFUSION;
          break;
        }
        const dz = z - lastZ;
        nextHeld = held * (1 + dz * (1 + dz * (1 / 2 + dz * (1 / 6 + dz * (1 / 24 + dz * (1 / 120))))));
        factor = 1 / (1 + nextHeld);
      }
      let nextK2 = 0;
      if (hasSecond) {
        nextK2 = k2 * (1 + d2 * (1 + d2 * (1 / 2 + d2 * (1 / 6 + d2 * (1 / 24 + d2 * (1 / 120))))));
        const q3d = q3 + d * q4;
        const q2d = q2 + d * q3d;
        const q1d = q1 + d * q2d;
        let term = nextK2 * (q0 + d * q1d);
        let termA = nextK2 * (q1d + d * (q2d + d * (q3d + d * q4)));
        let termT = term * energy2K;
        if (isSecondHeld) {
          term *= factor;
          const steep = C * term * (1 - factor);
          termA = termA * factor - steep;
          termT = termT * factor + alphaCT * steep * partK * partK;
        }
        sum += term;
        sumA += termA;
        sumT += termT;
        if (!(sum >= -LEFT_OVER * term)) {
          need = OTHER;
          break;
        }
      }
      sumT *= inverse * inverse;
      if (isAllHeld) {
        sum *= factor;
        const steep = C * sum * (1 - factor);
        sumA = sumA * factor - steep;
        sumT = sumT * factor + alphaCT * steep;
      }

      const sumAf = sumA * sum;
      const correction = (h / 12) * (dT * (fT - sumT) + h * (fAf - sumAf));
      const implicit = 0.5 * h * sumA;
      const off = (a - onLine + 0.5 * h * (f + sum) + correction) * (1 + implicit + implicit * implicit);
      if (!(Math.abs(off) <= near)) {
        need = LINE;
        break;
      }
      next = onLine + off;
      if (!(next >= a && next < degreeEnd && Math.abs(correction) <= within * (next - a) + ROUNDING)) {
        need = OTHER;
        break;
      }
      if (Math.min(aK, partK) <= limitTgK && notGlassyS !== partS) {
        need = GLASS;
        break;
      }
      f = sum + sumA * off;
      fT = sumT;
      fAf = sumAf;
      a = next;
      aS = partS;
      aK = partK;
      lastInverse = inverse;
      k1 = nextK1;
      k2 = nextK2;
      lastZ = z;
      held = nextHeld;
      carry -= 1;
      lineAge += 1;
      partsLeft -= 1;
      if (partsLeft === 0) {
        alphaOut[i] = a;
        i += 1;
      }
    }

    if (need === NOTHING) break;
    if (need === EXPONENTIALS) {
      k1 = A1 * Math.exp(-energy1K * inverse);
      k2 = A2 * Math.exp(-energy2K * inverse);
      lastInverse = inverse;
      lastZ = Number.NaN;
      carry = CARRIED_PARTS;
    } else if (need === DIFFUSION && z < SHUT) {
      held = Math.exp(z);
      lastZ = z;
    } else if (need === SHAPES && onLine < degreeEnd) {
      shapes.expand(first, second, onLine);
      ({ center, limit, near } = shapes);
      near *= nearer;
      limitTgK = watch === null ? 0 : shapes.limitTgK;
      [p0, p1, p2, p3, p4] = [taylor[0]!, taylor[1]!, taylor[2]!, taylor[3]!, taylor[4]!];
      [q0, q1, q2, q3, q4] = [taylor[5]!, taylor[6]!, taylor[7]!, taylor[8]!, taylor[9]!];
    } else if (need === LINE && lineAge > 0) {
      lineAge = LINE_PARTS;
    } else if (need === GLASS && watch !== null) {
      watch.acceptAll(timeS, temperatureK, toldTo, i);
      toldTo = i;
      if (shapes.isGlassy(next, Math.min(aK, partK)) && watch.maySteady(aS, aK, partS, partK)) break;
      notGlassyS = partS;
    } else {
      break;
    }
  }
  watch?.acceptAll(timeS, temperatureK, toldTo, i);
  now.set([f, fT, fAf, lineS, lineAlpha, lineF, lineAge, lastInverse, k1, k2, lastZ, held, carry]);
  return i;
}

/** How many figures `now` holds. */
export const FIGURES = 13;

/** The figures at a degree whose rate and slopes are known; nothing to carry on yet. */
export function anchored(state: CureState, f: number, fT: number, fA: number): readonly number[] {
  return [f, fT, fA * f, state.timeS, state.alpha, f, 0, 1 / state.temperatureK, 0, 0, 0, 0, 0];
}
