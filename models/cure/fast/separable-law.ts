import type { Kinetics, Resin } from '../resin.ts';
import { powerShape, stoichiometricShape, type TermShape } from './term-shape.ts';

/** One term of a rate: A exp(−energyK/T) times a shape of α. */
export interface Term {
  /** [A in 1/s, E/R in K]. */
  readonly constants: Float64Array;
  readonly shape: TermShape;
}

/** A rate written as one or two terms in each branch, with what diffusion holds back. */
export interface SeparableLaw {
  readonly branches: readonly (readonly [Term] | readonly [Term, Term])[];
  /** [C, alphaC0, alphaCT in 1/K]; zeros where nothing is held. */
  readonly diffusion: Float64Array;
  readonly held: 'nothing' | 'all' | 'second term';
}

/** The law of a resin as terms; null where it has no such form. */
export function separableLaw({ kinetics, diffusion, gasConstant }: Resin): SeparableLaw | null {
  const term = (A: number, E: number, shape: TermShape): Term => ({
    constants: Float64Array.of(A, E / gasConstant),
    shape,
  });
  const branches = branchesOf(kinetics, term);
  if (branches === null) return null;
  if (kinetics.law === 'two-term') {
    // A diffusion factor on top of the law's own would need a third exponential: left to the step-by-step integrator.
    if (diffusion !== undefined) return null;
    const { D: C, alphaC0, alphaCT } = kinetics;
    return { branches, diffusion: Float64Array.of(C, alphaC0, alphaCT), held: 'second term' };
  }
  if (diffusion === undefined) return { branches, diffusion: new Float64Array(3), held: 'nothing' };
  const { C, alphaC0, alphaCT } = diffusion;
  return { branches, diffusion: Float64Array.of(C, alphaC0, alphaCT), held: 'all' };
}

function branchesOf(
  kinetics: Kinetics,
  term: (A: number, E: number, shape: TermShape) => Term,
): SeparableLaw['branches'] | null {
  switch (kinetics.law) {
    case 'nth-order':
      return [[term(kinetics.A, kinetics.E, powerShape(0, kinetics.n))]];
    case 'autocatalytic':
      return [[term(kinetics.A, kinetics.E, powerShape(kinetics.m, kinetics.n))]];
    case 'kamal-sourour': {
      const { A1, E1, A2, E2, m, n } = kinetics;
      return [[term(A1, E1, powerShape(0, n)), term(A2, E2, powerShape(m, n))]];
    }
    case 'two-term': {
      const { A1, E1, m1, n1, A2, E2, m2, n2 } = kinetics;
      return [[term(A1, E1, powerShape(m1, n1)), term(A2, E2, powerShape(m2, n2))]];
    }
    case 'lee-loos-springer': {
      const { A1, E1, A2, E2, A3, E3, B } = kinetics;
      return [
        [term(A1, E1, stoichiometricShape(B, false)), term(A2, E2, stoichiometricShape(B, true))],
        [term(A3, E3, powerShape(0, 1))],
      ];
    }
    case 'isoconversional':
      return null;
  }
}
