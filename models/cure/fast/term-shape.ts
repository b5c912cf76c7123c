/**
 * How one term of a rate depends on the degree of cure: α^m (1 − α)^n, (1 − α)(B − α) or α (1 − α)(B − α).
 *
 * Its constants stand in an array of doubles, so that the code that reads them is compiled once for every law.
 */
export interface TermShape {
  readonly kind: 'power' | 'stoichiometric' | 'stoichiometric-autocatalytic';
  /** [m, n] of a power, [B, 0] otherwise. */
  readonly constants: Float64Array;
}

/** Relative distance, per unit of exponent, to which a polynomial is used: its error is below 2e-9 of the term. */
const REACH = 0.03;

/** The shape α^m (1 − α)^n, m and n ≥ 0. */
export function powerShape(m: number, n: number): TermShape {
  return { kind: 'power', constants: Float64Array.of(m, n) };
}

/** The shape (1 − α)(B − α), or α times it. */
export function stoichiometricShape(B: number, isAutocatalytic: boolean): TermShape {
  return {
    kind: isAutocatalytic ? 'stoichiometric-autocatalytic' : 'stoichiometric',
    constants: Float64Array.of(B, 0),
  };
}

/** How far from a degree the polynomial about it may be used. */
export function reachOf({ kind, constants }: TermShape, alpha: number): number {
  if (kind !== 'power') return REACH;
  return REACH * Math.min(alpha / Math.max(1, constants[0]!), (1 - alpha) / Math.max(1, constants[1]!));
}

/**
 * Writes the five Taylor coefficients of a shape about a degree into `into`, from `at` on.
 *
 * Those of a power follow from α(1 − α) g' = (m − (m + n) α) g by recurrence, from the power itself; the other shapes are
 * polynomials and exact.
 *
 * Accuracy: 2e-9 relative within {@link reachOf}; test/models/cure/fast.test.ts.
 * Limits: the centre of a power must lie strictly between 0 and 1, where it is analytic.
 */
export function expandShape({ kind, constants }: TermShape, center: number, into: Float64Array, at: number): void {
  if (kind === 'power') expandPower(constants[0]!, constants[1]!, center, into, at);
  else expandStoichiometric(constants[0]!, kind === 'stoichiometric', center, into, at);
}

function expandPower(m: number, n: number, center: number, into: Float64Array, at: number): void {
  const p0 = center * (1 - center);
  const p1 = 1 - 2 * center;
  const q0 = m - (m + n) * center;
  let before = 0;
  // One exponential of two logarithms takes a third of the time of two powers.
  let coefficient = Math.exp(m * Math.log(center) + n * Math.log1p(-center));
  into[at] = coefficient;
  for (let j = 0; j < 4; j += 1) {
    const next = ((q0 - p1 * j) * coefficient + (j - 1 - m - n) * before) / (p0 * (j + 1));
    before = coefficient;
    coefficient = next;
    into[at + j + 1] = coefficient;
  }
}

function expandStoichiometric(B: number, isPlain: boolean, c: number, into: Float64Array, at: number): void {
  into[at] = (isPlain ? 1 : c) * (1 - c) * (B - c);
  into[at + 1] = isPlain ? 2 * c - 1 - B : B - 2 * (1 + B) * c + 3 * c * c;
  into[at + 2] = isPlain ? 1 : 3 * c - 1 - B;
  into[at + 3] = isPlain ? 0 : 1;
  into[at + 4] = 0;
}
