import { describe, expect, it } from 'vitest';
import { branchAt, cureRate } from '../../../models/cure/cure-rate.ts';
import { arrhenius } from '../../../models/cure/laws/arrhenius.ts';
import { diffusionFactor } from '../../../models/cure/laws/diffusion-factor.ts';
import { isoconversionalRate } from '../../../models/cure/laws/isoconversional.ts';
import { leeLoosSpringerStallDegree } from '../../../models/cure/laws/lee-loos-springer.ts';
import type { LeeLoosSpringer, Resin, TwoTerm } from '../../../models/cure/resin.ts';
import { readReference, recalledResin } from '../../reference/cure/reference-sets.ts';

interface SwitchRow {
  T_C: number;
  k1: number;
  k2: number;
  k3: number;
  rate_left_at_0p3: number;
  rate_right_at_0p3: number;
}

const R = 8.314462618;
const relative = (value: number, expected: number) => Math.abs(value / expected - 1);
const lls = recalledResin('lls_3501_6').kinetics as LeeLoosSpringer;

describe('the rate laws', () => {
  // Source: test/reference/cure/closed-forms.json, mpmath at 40 digits.
  it.each(readReference<{ isothermal_3501_6: { rows: SwitchRow[] } }>('closed-forms.json').isothermal_3501_6.rows)(
    'jump by the known amount at the switch of 3501-6 at $T_C °C',
    (row) => {
      const rate = cureRate(recalledResin('lls_3501_6'));
      const temperatureK = row.T_C + 273.15;
      expect(relative(arrhenius(lls.A1, lls.E1, temperatureK, R), row.k1)).toBeLessThan(1e-12);
      expect(relative(arrhenius(lls.A2, lls.E2, temperatureK, R), row.k2)).toBeLessThan(1e-12);
      expect(relative(arrhenius(lls.A3, lls.E3, temperatureK, R), row.k3)).toBeLessThan(1e-12);
      expect(relative(rate.rate(0, temperatureK, 0.3), row.rate_left_at_0p3)).toBeLessThan(1e-11);
      expect(relative(rate.rate(1, temperatureK, 0.3), row.rate_right_at_0p3)).toBeLessThan(1e-12);
    },
  );

  it('use the first branch of 3501-6 up to and at its switch', () => {
    const rate = cureRate(recalledResin('lls_3501_6'));
    expect([0.1, 0.3, 0.3000001].map((alpha) => branchAt(rate, alpha))).toEqual([0, 0, 1]);
  });

  it('stall 3501-6 at 1.0432 exp(−348.8/T), below 279.9 K before its switch', () => {
    // A1/|A2| = 2.101/2.014 and (E1 − E2)/R = 2900/8.314: Lee, Loos & Springer's constants.
    expect(leeLoosSpringerStallDegree(279.5, lls, R)).toBeCloseTo(1.0432 * Math.exp(-348.8 / 279.5), 4);
    expect(leeLoosSpringerStallDegree(280.3, lls, R)).toBe(Number.POSITIVE_INFINITY);
  });

  it('take the diffusion factor on the whole rate, or on the second term where the law says so', () => {
    const whole = recalledResin('hubert_8552');
    const { diffusion, ...free } = whole;
    const at = [410, 0.55] as const;
    const factor = 1 / (1 + Math.exp(diffusion!.C * (0.55 - (diffusion!.alphaC0 + diffusion!.alphaCT * 410))));
    const unlimited = cureRate(free as Resin).rate(0, ...at);
    expect(relative(cureRate(whole).rate(0, ...at), unlimited * factor)).toBeLessThan(1e-14);
    const twoTerm = recalledResin('kratz_5320');
    const steep = cureRate({ ...twoTerm, kinetics: { ...twoTerm.kinetics, D: 900 } as TwoTerm });
    // Far beyond a steep line the second term is gone and the first remains.
    const first = 82300000 * Math.exp(-82375 / (R * 300)) * 0.9 ** 0.75 * 0.1 ** 12.46;
    expect(relative(steep.rate(0, 300, 0.9), first)).toBeLessThan(1e-12);
  });

  it.each([
    [0, 1],
    [-1e5, 1],
    [1e5, 0],
    [0.5 / 30, 1 / (1 + Math.exp(0.5))],
  ])('keep the diffusion factor finite %f beyond its line', (beyond, expected) => {
    const factor = diffusionFactor(400, 0.5 + beyond, { C: 30, alphaC0: 0.5, alphaCT: 0 });
    expect(factor).toBeCloseTo(beyond === 0 ? 0.5 : expected, 14);
  });

  it('read an isoconversional table linearly and end with it', () => {
    const table = { law: 'isoconversional', degree: [0, 0.4, 0.9], E: [6e4, 7e4, 6.5e4], lnAf: [9, 12, 8] } as const;
    expect(isoconversionalRate(400, 0.1, table, R, 0)).toBeCloseTo(Math.exp(9.75 - 62500 / (R * 400)), 18);
    expect(isoconversionalRate(400, 0.9, table, R, 1)).toBeCloseTo(Math.exp(8 - 65000 / (R * 400)), 18);
    expect(isoconversionalRate(400, 0.95, table, R, 2)).toBe(0);
  });
});
