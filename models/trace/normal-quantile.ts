import { DomainError } from '../errors.ts';

/**
 * Quantile of the standard normal distribution.
 *
 * Rational approximation AS 241 (PPND16): of q = p − ½ within 0.425 of the middle, of √(−ln min(p, 1 − p)) outside.
 *
 * @param p Probability, in (0, 1).
 * @returns z with Φ(z) = p.
 * @throws {DomainError} `option-out-of-range` when p is not within (0, 1).
 *
 * Accuracy: relative 1e-15 by the paper; test/models/trace/normal-quantile.test.ts measures it against SciPy.
 * Source: Wichura, Applied Statistics 37 (1988) 477–484, algorithm AS 241.
 */
export function normalQuantile(p: number): number {
  if (!(p > 0 && p < 1)) throw new DomainError('option-out-of-range', 'A probability lies between 0 and 1', { p });
  const q = p - 0.5;
  if (Math.abs(q) <= 0.425) return q * ratio(MIDDLE, 0.180625 - q * q);
  const r = Math.sqrt(-Math.log(Math.min(p, 1 - p)));
  return Math.sign(q) * (r <= 5 ? ratio(OUTER, r - 1.6) : ratio(FAR, r - 5));
}

type Rational = readonly [readonly number[], readonly number[]];

/** Numerator and denominator, lowest power first; AS 241. */
const MIDDLE: Rational = [
  [
    3.3871328727963665, 133.14166789178438, 1971.5909503065513, 13731.69376550946, 45921.95393154987, 67265.7709270087,
    33430.57558358813, 2509.0809287301227,
  ],
  [
    1, 42.31333070160091, 687.1870074920579, 5394.196021424751, 21213.794301586597, 39307.89580009271,
    28729.085735721943, 5226.495278852546,
  ],
];
const OUTER: Rational = [
  [
    1.4234371107496835, 4.630337846156546, 5.769497221460691, 3.6478483247632045, 1.2704582524523684,
    0.2417807251774506, 0.022723844989269184, 0.0007745450142783414,
  ],
  [
    1, 2.053191626637759, 1.6763848301838038, 0.6897673349851, 0.14810397642748008, 0.015198666563616457,
    0.0005475938084995345, 1.0507500716444169e-9,
  ],
];
const FAR: Rational = [
  [
    6.657904643501103, 5.463784911164114, 1.7848265399172913, 0.29656057182850487, 0.026532189526576124,
    0.0012426609473880784, 2.7115555687434876e-5, 2.0103343992922881e-7,
  ],
  [
    1, 0.599832206555888, 0.1369298809227358, 0.014875361290850615, 0.0007868691311456133, 1.8463183175100548e-5,
    1.421511758316446e-7, 2.0442631033899397e-15,
  ],
];

function ratio([above, below]: Rational, x: number): number {
  return above.reduceRight((sum, c) => sum * x + c, 0) / below.reduceRight((sum, c) => sum * x + c, 0);
}
