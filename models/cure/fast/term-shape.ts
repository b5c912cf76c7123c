/** How one term of a rate depends on the degree of cure, as a Taylor polynomial of degree four about a centre. */
export interface TermShape {
  /** Writes the five coefficients about `center` into `into`, from `at` on. */
  readonly expand: (center: number, into: Float64Array, at: number) => void;
  /** How far from a degree the polynomial about it may be used. */
  readonly reach: (alpha: number) => number;
}

/** Relative distance, per unit of exponent, to which a polynomial is used: its error is below 2e-8 of the term. */
const REACH = 0.05;

/**
 * The shape α^m (1 − α)^n.
 *
 * Its Taylor coefficients follow from α(1 − α) g' = (m − (m + n) α) g by recurrence, from one power of each factor.
 *
 * @param m Exponent of α, ≥ 0.
 * @param n Exponent of 1 − α, ≥ 0.
 *
 * Accuracy: 2e-8 relative within `reach`; test/models/cure/fast.test.ts.
 * Limits: the centre must lie strictly between 0 and 1, where the shape is analytic.
 */
export function powerShape(m: number, n: number): TermShape {
  return {
    expand: (center, into, at) => {
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
    },
    reach: (alpha) => REACH * Math.min(alpha / Math.max(1, m), (1 - alpha) / Math.max(1, n)),
  };
}

/** The shape (1 − α)(B − α), exactly. */
export function stoichiometricShape(B: number): TermShape {
  return {
    expand: (center, into, at) => {
      into.set([(1 - center) * (B - center), 2 * center - 1 - B, 1, 0, 0], at);
    },
    reach: () => 0.05,
  };
}

/** The shape α (1 − α)(B − α), exactly. */
export function stoichiometricAutocatalyticShape(B: number): TermShape {
  return {
    expand: (c, into, at) => {
      into.set([c * (1 - c) * (B - c), B - 2 * (1 + B) * c + 3 * c * c, 3 * c - 1 - B, 1, 0], at);
    },
    reach: () => 0.05,
  };
}
