import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import type { Resin } from '../../../models/cure/resin.ts';

// An independent integrator (odex 2.0.4: Hairer & Wanner's extrapolation code) on right-hand sides written anew here.

interface OdexSolver {
  absoluteTolerance: number;
  relativeTolerance: number;
  solve(f: (x: number, y: number[]) => number[], x0: number, y0: number[], xEnd: number): { y: number[] };
}
const { Solver } = createRequire(import.meta.url)('odex') as { Solver: new (n: number) => OdexSolver };

const R = 8.314462618;
const timeS = [0, 1500, 2400, 2460, 6000, 9000, 10000];
const temperatureK = [295, 371, 383, 398, 396, 452, 451];

function straight(atS: number): number {
  const next = Math.max(
    1,
    timeS.findIndex((s) => s >= atS),
  );
  const share = (atS - timeS[next - 1]!) / (timeS[next]! - timeS[next - 1]!);
  return temperatureK[next - 1]! + share * (temperatureK[next]! - temperatureK[next - 1]!);
}

/** By odex, from vertex to vertex. */
function byOdex(rate: (t: number, alpha: number) => number, alpha0: number): number {
  let alpha = alpha0;
  for (let i = 1; i < timeS.length; i += 1) {
    const solver = new Solver(1);
    solver.absoluteTolerance = 1e-13;
    solver.relativeTolerance = 1e-13;
    alpha = solver.solve((s, y) => [rate(straight(s), y[0]!)], timeS[i - 1]!, [alpha], timeS[i]!).y[0]!;
  }
  return alpha;
}

const k = (A: number, E: number, t: number) => A * Math.exp(-E / (R * t));

const cases: { name: string; resin: Partial<Resin>; rate: (t: number, a: number) => number; within: number }[] = [
  {
    name: 'nth-order',
    resin: { initialDegree: 0, kinetics: { law: 'nth-order', A: 3e5, E: 63000, n: 1.4 } },
    rate: (t, a) => k(3e5, 63000, t) * (1 - a) ** 1.4,
    within: 1e-11,
  },
  {
    name: 'autocatalytic with diffusion',
    resin: {
      initialDegree: 0.02,
      kinetics: { law: 'autocatalytic', A: 9e4, E: 64000, m: 0.6, n: 1.7 },
      diffusion: { law: 'logistic', C: 38, alphaC0: -1.45, alphaCT: 0.0051 },
    },
    rate: (t, a) => (k(9e4, 64000, t) * a ** 0.6 * (1 - a) ** 1.7) / (1 + Math.exp(38 * (a - (-1.45 + 0.0051 * t)))),
    within: 1e-11,
  },
  {
    name: 'kamal-sourour with diffusion',
    resin: {
      initialDegree: 0.01,
      kinetics: { law: 'kamal-sourour', A1: 2600, E1: 61300, A2: 11800, E2: 59200, m: 0.94, n: 1.31 },
      diffusion: { law: 'logistic', C: 34, alphaC0: -1.355, alphaCT: 0.00502 },
    },
    rate: (t, a) =>
      ((k(2600, 61300, t) + k(11800, 59200, t) * a ** 0.94) * (1 - a) ** 1.31) /
      (1 + Math.exp(34 * (a - (-1.355 + 0.00502 * t)))),
    within: 1e-11,
  },
  {
    name: 'two-term',
    resin: {
      initialDegree: 0.03,
      kinetics: {
        law: 'two-term',
        A1: 4e6,
        E1: 75000,
        m1: 0.7,
        n1: 9,
        A2: 8e4,
        E2: 62000,
        m2: 0.9,
        n2: 1.8,
        D: 42,
        alphaC0: -1.2,
        alphaCT: 0.0047,
      },
    },
    rate: (t, a) =>
      k(4e6, 75000, t) * a ** 0.7 * (1 - a) ** 9 +
      (k(8e4, 62000, t) * a ** 0.9 * (1 - a) ** 1.8) / (1 + Math.exp(42 * (a - (-1.2 + 0.0047 * t)))),
    within: 1e-11,
  },
  {
    name: 'lee-loos-springer (the jump is smeared by odex’s own steps)',
    resin: {
      initialDegree: 0.001,
      kinetics: {
        law: 'lee-loos-springer',
        A1: 3.5e7,
        E1: 80700,
        A2: -3.36e7,
        E2: 77800,
        A3: 3270,
        E3: 56600,
        B: 0.47,
        switchDegree: 0.3,
      },
    },
    rate: (t, a) =>
      a <= 0.3 ? (k(3.5e7, 80700, t) - k(3.36e7, 77800, t) * a) * (1 - a) * (0.47 - a) : k(3270, 56600, t) * (1 - a),
    within: 1e-9,
  },
  {
    name: 'isoconversional (kinks at the degrees of the table)',
    resin: {
      initialDegree: 0.01,
      kinetics: {
        law: 'isoconversional',
        degree: [0.01, 0.2, 0.5, 0.8, 0.98],
        E: [62000, 60000, 58000, 64000, 70000],
        lnAf: [8.5, 9.2, 8.9, 9.1, 7],
      },
    },
    rate: (t, a) => {
      const degree = [0.01, 0.2, 0.5, 0.8, 0.98];
      if (a >= 0.98) return 0;
      const i = Math.max(0, degree.findIndex((d) => d > a) - 1);
      const share = (a - degree[i]!) / (degree[i + 1]! - degree[i]!);
      const read = (list: number[]) => list[i]! + share * (list[i + 1]! - list[i]!);
      return Math.exp(read([8.5, 9.2, 8.9, 9.1, 7]) - read([62000, 60000, 58000, 64000, 70000]) / (R * t));
    },
    within: 1e-9,
  },
];

describe('cureAlong against odex', () => {
  it.each(cases)('$name', ({ resin, rate, within }) => {
    const whole = {
      format: 'dwellbook-resin/1',
      code: 'trial',
      name: 'trial',
      source: { citation: 'test', status: 'illustrative' },
      gasConstant: R,
      ...resin,
    } as Resin;
    const ours = (tolerance: number) =>
      cureAlong(Float64Array.from(timeS), Float64Array.from(temperatureK), whole, { tolerance }).finalAlpha;
    const theirs = byOdex(rate, whole.initialDegree);
    expect(theirs).toBeGreaterThan(0.3);
    expect(Math.abs(ours(1e-12) - theirs)).toBeLessThan(within);
    expect(Math.abs(ours(1e-7) - theirs)).toBeLessThan(1e-6);
  });

  it('converges with the tolerance asked for', () => {
    const kinetics = { law: 'kamal-sourour', A1: 2600, E1: 61300, A2: 11800, E2: 59200, m: 0.94, n: 1.31 } as const;
    const exact = byOdex(cases[2]!.rate, 0.01);
    const resin = { ...(cases[2]!.resin as Resin), code: 'trial', gasConstant: R, kinetics };
    const errors = [1e-4, 1e-6, 1e-8, 1e-10].map((tolerance) =>
      Math.abs(
        cureAlong(Float64Array.from(timeS), Float64Array.from(temperatureK), resin, { tolerance }).finalAlpha - exact,
      ),
    );
    for (const [i, error] of errors.entries()) expect(error).toBeLessThan([1e-4, 1e-6, 1e-8, 1e-10][i]!);
    expect(errors[2]!).toBeLessThan(errors[0]! / 100);
  });
});
