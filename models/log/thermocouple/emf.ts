import type { ThermocoupleType } from '../layout.ts';
import { INVERSE_FUNCTIONS } from './inverse-functions.ts';
import { REFERENCE_FUNCTIONS, type ReferenceFunction } from './reference-functions.ts';

/**
 * Emf of a thermocouple whose cold junction is at 0 °C.
 *
 * E = Σ c_i t^i by ranges of t; type K adds a0 exp(a1 (t − a2)²) above 0 °C.
 *
 * @param type         Letter of the thermocouple.
 * @param temperatureC Temperature of its measuring junction in °C.
 * @returns E in mV, rising in t; NaN outside the range of the type's reference function.
 *
 * Accuracy: defines the type; every figure of the printed tables after rounding to 1 µV,
 *   test/models/log/thermocouple/emf.test.ts.
 * Limits: a wire as good as the reference. What new wire may differ by (2.5 °C or 0.75 % for type K, class 2,
 *   IEC 60584-1) and how it ages are the uncertainty's part.
 * Source: NIST Monograph 175 (1993); coefficients as in the NIST ITS-90 Thermocouple Database (SRD 60).
 */
export function emfMillivolt(type: ThermocoupleType, temperatureC: number): number {
  const set = REFERENCE_FUNCTIONS[type];
  const [coldestC, hottestC] = set.rangeC;
  if (!(temperatureC >= coldestC && temperatureC <= hottestC)) return Number.NaN;
  const piece = set.pieces.findIndex(({ untilC }) => temperatureC <= untilC);
  return emfAndSlope(set, piece, temperatureC)[0];
}

/**
 * Temperature of a thermocouple from its emf against a cold junction at 0 °C: the inverse of {@link emfMillivolt}.
 *
 * Newton's method on the reference function itself, from the approximate inverse of the tables. Below −200 °C, where
 * there is none, from −200 °C: the functions bend upwards there, so that the search comes down without overshooting.
 *
 * @param type Letter of the thermocouple.
 * @param emf  Emf in mV, that of the cold junction added.
 * @returns Temperature in °C; NaN outside the range of the type's reference function.
 *
 * Accuracy: 1e-6 °C; test/models/log/thermocouple/emf.test.ts.
 * Source: as {@link emfMillivolt}.
 */
export function temperatureFromEmf(type: ThermocoupleType, emf: number): number {
  const set = REFERENCE_FUNCTIONS[type];
  if (!(emf >= emfMillivolt(type, set.rangeC[0]) && emf <= emfMillivolt(type, set.rangeC[1]))) return Number.NaN;
  const piece = set.pieces.findIndex(({ untilC }) => emf <= emfMillivolt(type, untilC));
  let temperatureC = emf < emfMillivolt(type, -200) ? -200 : firstGuess(type, emf);
  for (let moveC = Number.POSITIVE_INFINITY; Math.abs(moveC) > CLOSE_C; ) {
    const [value, slope] = emfAndSlope(set, piece, temperatureC);
    moveC = (emf - value) / slope;
    temperatureC += moveC;
  }
  return temperatureC;
}

/** A last move as small as this leaves less than 1e-7 °C: the error squares from move to move. */
const CLOSE_C = 1e-5;

function firstGuess(type: ThermocoupleType, emf: number): number {
  const pieces = INVERSE_FUNCTIONS[type];
  const piece = pieces.find(({ untilMillivolt }) => emf <= untilMillivolt) ?? pieces.at(-1)!;
  return piece.coefficients.reduceRight((sum, coefficient) => sum * emf + coefficient, 0);
}

/** E in mV and dE/dt in mV/°C by one piece of a reference function. */
function emfAndSlope({ pieces, bump }: ReferenceFunction, piece: number, temperatureC: number): [number, number] {
  const { coefficients } = pieces[piece]!;
  let value = 0;
  let slope = 0;
  for (let i = coefficients.length - 1; i >= 0; i -= 1) {
    slope = slope * temperatureC + value;
    value = value * temperatureC + coefficients[i]!;
  }
  if (bump === undefined || piece === 0) return [value, slope];
  const [a0, a1, a2] = bump;
  const added = a0 * Math.exp(a1 * (temperatureC - a2) ** 2);
  return [value + added, slope + 2 * a1 * (temperatureC - a2) * added];
}
