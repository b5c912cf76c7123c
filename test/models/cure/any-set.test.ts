import { createRequire } from 'node:module';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { cureRate } from '../../../models/cure/cure-rate.ts';
import type { Kinetics, Resin } from '../../../models/cure/resin.ts';

// Sets nobody published: any constants of the size that resins have, over any programme a recorder writes. The reference
// is the step-by-step integrator at 1e-12, itself held against odex below and against SciPy in reference.test.ts.

const R = 8.314462618;
const resinOf = (kinetics: Kinetics, initialDegree: number, more: Partial<Resin> = {}): Resin => ({
  format: 'dwellbook-resin/1',
  code: 'trial',
  name: 'trial',
  source: { citation: 'trial', status: 'illustrative' },
  initialDegree,
  gasConstant: R,
  kinetics,
  glassTransition: { law: 'dibenedetto', tg0C: -8, tgInfC: 221, lambda: 0.58 },
  gel: { degree: 0.5 },
  ...more,
});

/** A repeatable noise in [−1, 1]. */
const noise = (i: number) =>
  2 * (Math.sin(i * 12.9898) * 43758.5453 - Math.floor(Math.sin(i * 12.9898) * 43758.5453)) - 1;

function ramp(everyS: number, endC: number, perMin: number, holdS: number, noiseK = 0): [Float64Array, Float64Array] {
  const scans = Math.ceil((((endC - 20) / perMin) * 60 + holdS) / everyS);
  const timeS = Float64Array.from({ length: scans }, (_, i) => i * everyS);
  return [timeS, timeS.map((s, i) => 293.15 + Math.min(endC - 20, (perMin * s) / 60) + noiseK * noise(i))];
}

function apart(resin: Resin, [timeS, temperatureK]: [Float64Array, Float64Array]) {
  const fast = cureAlong(timeS, temperatureK, resin);
  const exact = cureAlong(timeS, temperatureK, resin, { tolerance: 1e-12 });
  const alpha = Math.max(...fast.alpha.map((degree, i) => Math.abs(degree - exact.alpha[i]!)));
  const between = (a: number | null, b: number | null) => (a === b ? 0 : Math.abs(a! - b!));
  return {
    alpha,
    gelS: between(fast.gelS, exact.gelS),
    vitrifiesS: between(fast.vitrifiesS, exact.vitrifiesS),
    exact,
  };
}

describe('cureAlong at the default tolerance', () => {
  const snap: Kinetics = { law: 'autocatalytic', A: 3.57e7, E: 76273, m: 1.732, n: 1 };
  const line = { law: 'logistic', C: 30.5, alphaC0: -1.2766, alphaCT: 0.0046885 } as const;
  // Long induction, then 1 % a second: an error of one part in 1e8 of the time is 1e-6 in degree.
  it.each([
    ['with a diffusion line, read every 5 s', resinOf(snap, 0.001, { diffusion: line }), ramp(5, 187, 1, 9000, 0.7)],
    ['read every 30 s', resinOf(snap, 0.001), ramp(30, 170, 1, 14000)],
  ])('follows a snap cure %s within 1e-6', (_, resin, history) => {
    const { alpha, exact } = apart(resin, history);
    expect(exact.finalAlpha).toBeGreaterThan(0.99);
    expect(alpha).toBeLessThan(1e-6);
  });

  it('follows a first branch of Lee, Loos and Springer that is slow before its switch', () => {
    const kinetics: Kinetics = {
      law: 'lee-loos-springer',
      A1: 47469488,
      E1: 82267,
      A2: -110222139,
      E2: 82257,
      A3: 4042,
      E3: 55336,
      B: 0.5334,
      switchDegree: 0.379,
    };
    const { alpha, gelS, exact } = apart(resinOf(kinetics, 0.01), ramp(120, 110, 2, 20000, 1));
    expect(exact.gelS).not.toBeNull();
    expect(alpha).toBeLessThan(3e-7);
    expect(gelS).toBeLessThan(3e-3);
  });
});

describe('an isoconversional table that ends at 1', () => {
  const table: Kinetics = { law: 'isoconversional', degree: [0, 0.4, 1], E: [6e4, 6e4, 6e4], lnAf: [10, 12, 9] };

  it('is followed to its end, where nothing is left', () => {
    const resin = resinOf(table, 0);
    const { exact, alpha } = apart(resin, ramp(600, 100, 2, 72000, 3));
    expect(exact.finalAlpha).toBe(1);
    // The steps are held to a hundredth of the tolerance: errors made early grow.
    expect(alpha).toBeLessThan(2e-9);
    // From 0.4 to 1: dα/dt = k e^(12 − 5 (α − 0.4)), so k t = e^−12 (e^3 − 1)/5; before it likewise.
    const k = Math.exp(-60000 / (R * 453.15));
    const until = (Math.exp(-10) * (1 - Math.exp(-2))) / (5 * k) + (Math.exp(-12) * (Math.exp(3) - 1)) / (5 * k);
    const hot = Float64Array.of(453.15, 453.15);
    const at = (timeS: number) => cureAlong(Float64Array.of(0, timeS), hot, resin, { tolerance: 1e-11 }).finalAlpha;
    expect(at(until * 0.999)).toBeLessThan(1);
    expect(at(until * 1.0001)).toBe(1);
  });

  it('vitrifies where the temperature itself comes down to its last Tg', () => {
    // Tg 221 °C at 1; held at 226 °C, then 0.05 °C/min: 221 °C is reached 100 min later.
    const timeS = Float64Array.of(0, 4200, 4200 + 120 * 60);
    const temperatureK = Float64Array.of(226, 226, 220).map((c) => c + 273.15);
    const { vitrifiesS } = cureAlong(timeS, temperatureK, resinOf(table, 0));
    expect(vitrifiesS!).toBeCloseTo(4200 + 6000, 6);
  });
});

describe('any set over any programme', () => {
  const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
  /** A factor that makes a rate constant `k` at 140 °C. */
  const factor = (k: number, E: number) => k * Math.exp(E / (R * 413.15));
  const rate = between(-9, -5).map(Math.exp);
  const line = fc.record({ C: between(10, 60), alphaCT: between(0.0045, 0.0058), hot: between(0.8, 1) });
  const diffusion = fc.option(line, { nil: undefined });
  const degree = between(0.001, 0.3);

  const nthOrder = fc
    .tuple(rate, between(45000, 120000), between(0.3, 3))
    .map(([k, E, n]): Kinetics => ({ law: 'nth-order', A: factor(k, E), E, n }));
  const autocatalytic = fc
    .tuple(rate, between(45000, 120000), between(0.05, 2), between(0.5, 4))
    .map(([k, E, m, n]): Kinetics => ({ law: 'autocatalytic', A: factor(3 * k, E), E, m, n }));
  const kamal = fc
    .tuple(rate, between(45000, 110000), between(45000, 90000), between(0.2, 2.5), between(0.5, 3))
    .map(([k, E1, E2, m, n]): Kinetics => {
      return { law: 'kamal-sourour', A1: factor(k / 20, E1), E1, A2: factor(3 * k, E2), E2, m, n };
    });
  const lls = fc
    .tuple(between(0.5, 2), between(0, 3500), between(1.05, 1.6), between(0.4, 0.7), between(0.2, 0.38))
    .map(([size, apartE, spare, B, switchDegree]): Kinetics => {
      // Reaches its switch from 285 K on.
      const A1 = 3.5e7 * size;
      const A2 = (-A1 * Math.exp(-apartE / (R * 285))) / (switchDegree * spare);
      return {
        law: 'lee-loos-springer',
        A1,
        E1: 80700,
        A2,
        E2: 80700 - apartE,
        A3: 3270 * size,
        E3: 56600,
        B,
        switchDegree,
      };
    });
  const twoTerm = fc
    .tuple(rate, between(60000, 90000), between(50000, 80000), between(0.2, 1.2), between(2, 22), line)
    .map(([k, E1, E2, m, n1, { C, alphaCT, hot }]): Kinetics => {
      const second = { A2: factor(3 * k, E2), E2, m2: m, n2: 1.5, D: C, alphaC0: hot - 453 * alphaCT, alphaCT };
      return { law: 'two-term', A1: factor(3 * k, E1), E1, m1: m, n1, ...second };
    });
  const table = fc
    .tuple(rate, fc.array(between(50000, 90000), { minLength: 3, maxLength: 12 }), between(0.9, 1))
    .map(([k, E, last]): Kinetics => {
      const place = E.map((_, i) => (last * i) / (E.length - 1));
      const lnAf = E.map((energy, i) => Math.log(k * Math.max(0.05, 1 - place[i]!)) + energy / (R * 413.15));
      return { law: 'isoconversional', degree: place, E, lnAf };
    });
  const anyResin = fc
    .tuple(fc.oneof(nthOrder, autocatalytic, kamal, lls, twoTerm, table), degree, diffusion, between(0.2, 0.8))
    .map(([kinetics, start, held, gel]) =>
      resinOf(kinetics, kinetics.law === 'lee-loos-springer' ? start / 2 : start, {
        gel: { degree: gel },
        ...(held === undefined || kinetics.law === 'two-term'
          ? {}
          : {
              diffusion: {
                law: 'logistic',
                C: held.C,
                alphaC0: held.hot - 453 * held.alphaCT,
                alphaCT: held.alphaCT,
              },
            }),
      }),
    );
  const anyProgramme = fc
    .record({
      stages: fc.array(fc.tuple(between(0.3, 6), between(60, 195), between(0, 7200)), { minLength: 1, maxLength: 4 }),
      everyS: fc.constantFrom(1, 5, 15, 60, 300, 600),
      noiseK: fc.constantFrom(0, 0.1, 1, 3),
      spikeK: fc.constantFrom(0, 0, -60, 40),
      storedS: fc.constantFrom(0, 0, 36000),
      gap: fc.constantFrom(0, 0, 40),
    })
    .map(({ stages, everyS, noiseK, spikeK, storedS, gap }): [Float64Array, Float64Array] => {
      const vertices: [number, number][] = [
        [0, 20],
        [storedS, 20],
      ];
      for (const [perMin, toC, holdS] of stages) {
        const [s, fromC] = vertices.at(-1)!;
        const arrivesS = s + 1 + (Math.abs(toC - fromC) / perMin) * 60;
        vertices.push([arrivesS, toC], [arrivesS + holdS, toC]);
      }
      const scans = Array.from({ length: Math.min(4000, Math.floor(vertices.at(-1)![0] / everyS)) + 2 }, (_, i) => i);
      const kept = scans.filter((i) => gap === 0 || i % 200 < 200 - gap || i < 2);
      const at = (s: number) => {
        const next = vertices.findIndex(([vertexS]) => vertexS > s);
        if (next <= 0) return vertices.at(next)![1];
        const [[s0, c0], [s1, c1]] = [vertices[next - 1]!, vertices[next]!];
        return c0 + ((c1 - c0) * (s - s0)) / (s1 - s0);
      };
      const read = (i: number) => at(i * everyS) + noiseK * noise(i) + (i % 311 === 310 ? spikeK : 0);
      return [
        Float64Array.from(kept, (i) => i * everyS),
        Float64Array.from(kept, (i) => Math.max(0, read(i)) + 273.15),
      ];
    });

  it('is followed within 1e-6 in degree', () => {
    fc.assert(
      fc.property(anyResin, anyProgramme, (resin, history) => {
        const { alpha, exact } = apart(resin, history);
        expect(alpha).toBeLessThan(1e-6);
        expect(exact.finalAlpha).toBeLessThanOrEqual(1);
      }),
      { seed: 20260302, numRuns: 150 },
    );
  });

  it('agrees with odex where the law is smooth', () => {
    interface OdexSolver {
      absoluteTolerance: number;
      relativeTolerance: number;
      solve(f: (x: number, y: number[]) => number[], x0: number, y0: number[], xEnd: number): { y: number[] };
    }
    const { Solver } = createRequire(import.meta.url)('odex') as { Solver: new (n: number) => OdexSolver };
    const smooth = fc.oneof(
      nthOrder.filter((law) => 'n' in law && law.n >= 1),
      autocatalytic,
      kamal,
      twoTerm,
    );
    const kinks = fc.array(fc.tuple(between(60, 3000), between(300, 460)), { minLength: 2, maxLength: 6 });
    fc.assert(
      fc.property(smooth, degree, kinks, (kinetics, start, pieces) => {
        const resin = resinOf(kinetics, start);
        const { rate: rateOf } = cureRate(resin);
        const timeS = [0];
        const temperatureK = [295];
        let alpha = start;
        for (const [spanS, endK] of pieces) {
          const [fromS, fromK] = [timeS.at(-1)!, temperatureK.at(-1)!];
          const solver = new Solver(1);
          solver.absoluteTolerance = 1e-13;
          solver.relativeTolerance = 1e-13;
          const slope = (s: number, y: number[]) => [rateOf(0, fromK + ((endK - fromK) * (s - fromS)) / spanS, y[0]!)];
          alpha = solver.solve(slope, fromS, [alpha], fromS + spanS).y[0]!;
          timeS.push(fromS + spanS);
          temperatureK.push(endK);
        }
        const ours = cureAlong(Float64Array.from(timeS), Float64Array.from(temperatureK), resin, { tolerance: 1e-12 });
        expect(Math.abs(ours.finalAlpha - alpha)).toBeLessThan(1e-9);
      }),
      { seed: 20260302, numRuns: 60 },
    );
  });
});
