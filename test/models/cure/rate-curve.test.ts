import { describe, expect, it } from 'vitest';
import { rateCurve } from '../../../models/cure/rate-curve.ts';
import type { Resin } from '../../../models/cure/resin.ts';
import { recalledResin } from '../../reference/cure/reference-sets.ts';

const R = 8.314462618;

describe('rateCurve', () => {
  it('is the law itself at every degree', () => {
    // Kamal and Sourour written out: dα/dt = (k1 + k2 α^m)(1 − α)^n.
    const resin = recalledResin('dusi_976');
    const { A1, E1, A2, E2, m, n } = resin.kinetics as unknown as Record<string, number>;
    const { alpha, ratePerS, jumps, stallsAt, negative } = rateCurve(resin, 450);
    const [k1, k2] = [A1! * Math.exp(-E1! / (R * 450)), A2! * Math.exp(-E2! / (R * 450))];
    for (const [i, a] of alpha.entries()) expect(ratePerS[i]).toBeCloseTo((k1 + k2 * a ** m!) * (1 - a) ** n!, 12);
    expect([alpha[0], alpha.at(-1), alpha.length]).toEqual([0, 1, 201]);
    expect([jumps, stallsAt, negative]).toEqual([[], null, null]);
  });

  it('jumps at the switch of Lee, Loos and Springer, and has both rates there', () => {
    const resin = recalledResin('lls_3501_6');
    const { A1, E1, A2, E2, A3, E3, B } = resin.kinetics as unknown as Record<string, number>;
    const k = (A: number, E: number) => A * Math.exp(-E / (R * 400));
    const { alpha, ratePerS, jumps } = rateCurve(resin, 400);
    expect(jumps).toEqual([0.3]);
    const at = alpha.indexOf(0.3);
    expect(alpha[at + 1]).toBe(0.3);
    expect(ratePerS[at]).toBeCloseTo((k(A1!, E1!) + k(A2!, E2!) * 0.3) * 0.7 * (B! - 0.3), 12);
    expect(ratePerS[at + 1]).toBeCloseTo(k(A3!, E3!) * 0.7, 12);
  });

  it('tells where that law stands still and turns negative when cold', () => {
    const resin = recalledResin('lls_3501_6');
    const { A1, E1, A2, E2 } = resin.kinetics as unknown as Record<string, number>;
    // The paper's set never reaches its switch below about 280 K: test/reference/cure/kinetics.json, `warn`.
    expect(rateCurve(resin, 281).stallsAt).toBeNull();
    const { stallsAt, negative } = rateCurve(resin, 275);
    const k = (A: number, E: number) => A * Math.exp(-E / (R * 275));
    expect(stallsAt).toBeCloseTo(-k(A1!, E1!) / k(A2!, E2!), 12);
    expect(negative![0]).toBeGreaterThan(stallsAt!);
    expect(negative![1]).toBe(0.3);
  });

  it('begins where an isoconversional table begins, without a jump inside it', () => {
    const resin: Resin = {
      ...recalledResin('dusi_976'),
      initialDegree: 0.1,
      kinetics: { law: 'isoconversional', degree: [0.1, 0.5, 0.9], E: [60000, 65000, 70000], lnAf: [10, 12, 11] },
    };
    const { alpha, ratePerS, jumps } = rateCurve(resin, 420);
    expect(alpha[0]).toBe(0.1);
    expect(ratePerS[0]).toBeCloseTo(Math.exp(10 - 60000 / (R * 420)), 12);
    // At the table's end the rate falls to nothing: that is a jump.
    expect(jumps).toEqual([0.9]);
    expect(ratePerS.at(-1)).toBe(0);
  });
});
