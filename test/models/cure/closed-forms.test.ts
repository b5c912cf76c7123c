import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import type { Kinetics, Resin } from '../../../models/cure/resin.ts';
import { historyOf, readReference, recalledResin } from '../../reference/cure/reference-sets.ts';

// Source: test/reference/cure/closed-forms.json, exact solutions evaluated by mpmath at 40 digits.
type Row = Record<string, number>;
type Forms = Record<string, { rows: Row[] }>;
const forms = readReference<Forms>('closed-forms.json');

const tight = { tolerance: 1e-13 };

function resinOf(kinetics: Kinetics, initialDegree: number): Resin {
  return {
    format: 'dwellbook-resin/1',
    code: 'closed-form',
    name: 'closed form',
    source: { citation: 'closed form', status: 'illustrative' },
    initialDegree,
    gasConstant: 8.314462618,
    kinetics,
  };
}

function degreeAfter(seconds: number, temperatureC: number, resin: Resin): number {
  const temperatureK = Float64Array.of(temperatureC + 273.15, temperatureC + 273.15);
  return cureAlong(Float64Array.of(0, seconds), temperatureK, resin, tight).finalAlpha;
}

const nth = (n: number) => resinOf({ law: 'nth-order', A: 191400, E: 60500, n }, 0);
const polyester = recalledResin('bogetti_polyester');

describe('cureAlong against exact solutions', () => {
  it.each(forms.isothermal_nth_order!.rows)('nth order at $T_C °C after $t_s s', (row) => {
    expect(Math.abs(degreeAfter(row.t_s!, row.T_C!, nth(1.69)) - row.alpha_nth!)).toBeLessThan(1e-12);
    expect(Math.abs(degreeAfter(row.t_s!, row.T_C!, nth(1)) - row.alpha_first!)).toBeLessThan(1e-12);
    expect(Math.abs(degreeAfter(row.t_s!, row.T_C!, nth(2)) - row.alpha_second!)).toBeLessThan(1e-12);
  });

  it('completes a reaction of order below 1 in finite time, and stays complete', () => {
    // n = 1/2: 1 − α = (1 − θ/2)², complete at θ = 2.
    const k = 191400 * Math.exp(-60500 / (8.314462618 * 403.15));
    expect(degreeAfter(1.5 / k, 130, nth(0.5))).toBeCloseTo(1 - 0.0625, 11);
    expect(degreeAfter(2.01 / k, 130, nth(0.5))).toBe(1);
    expect(degreeAfter(200 / k, 130, nth(0.5))).toBe(1);
  });

  it.each(forms.isothermal_autocat_m_plus_n_2!.rows)('autocatalytic, m + n = 2, at $T_C °C after $t_s s', (row) => {
    expect(Math.abs(degreeAfter(row.t_s!, row.T_C!, polyester) - row.alpha!)).toBeLessThan(1e-12);
  });

  it.each(forms.isothermal_kamal_m1_n1!.rows)('Kamal, m = n = 1, at $T_C °C after $t_s s', (row) => {
    const kamal = resinOf({ law: 'kamal-sourour', A1: 4400, E1: 62500, A2: 7050, E2: 56800, m: 1, n: 1 }, 0);
    expect(Math.abs(degreeAfter(row.t_s!, row.T_C!, kamal) - row.alpha_m1_n1!)).toBeLessThan(1e-12);
  });

  it.each(forms.isothermal_kamal_time_to_alpha_quadrature!.rows)('time to $alpha at $T_C °C by quadrature', (row) => {
    const resin = { ...recalledResin('dusi_976'), gel: { degree: row.alpha! } };
    const temperatureK = Float64Array.of(row.T_C! + 273.15, row.T_C! + 273.15);
    const { gelS } = cureAlong(Float64Array.of(0, 2 * row.t_s!), temperatureK, resin, tight);
    expect(Math.abs(gelS! - row.t_s!)).toBeLessThan(1e-6);
  });

  it.each(forms.isothermal_3501_6!.rows)('3501-6 by partial fractions at $T_C °C', (row) => {
    const temperatureK = Float64Array.of(row.T_C! + 273.15, row.T_C! + 273.15);
    const timeTo = (degree: number) =>
      cureAlong(Float64Array.of(0, 30000), temperatureK, { ...recalledResin('lls_3501_6'), gel: { degree } }, tight)
        .gelS!;
    expect(Math.abs(timeTo(0.3) - row.t_to_0p3_s!)).toBeLessThan(1e-6);
    expect(Math.abs(timeTo(0.5) - row.t_to_0p5_s!)).toBeLessThan(1e-6);
    expect(Math.abs(timeTo(0.9) - row.t_to_0p9_s!)).toBeLessThan(1e-6);
  });

  it('follows linear heating exactly (temperature integral)', () => {
    for (const row of forms.linear_heating_exact!.rows) {
      const timeS = Float64Array.of(0, row.t_s!);
      const temperatureK = Float64Array.of(293.15, row.T_C! + 273.15);
      const reached = (resin: Resin) => cureAlong(timeS, temperatureK, resin, tight).finalAlpha;
      expect(Math.abs(reached(nth(1)) - row.alpha_first!)).toBeLessThan(1e-12);
      expect(Math.abs(reached(nth(1.69)) - row.alpha_nth_1p69!)).toBeLessThan(1e-12);
      expect(Math.abs(reached(polyester) - row.alpha_autocat_polyester!)).toBeLessThan(1e-12);
    }
  });

  it('follows two dwells exactly for separable laws', () => {
    const [timeS, temperatureK] = historyOf('bogetti_polyester', 'two_dwell');
    for (const [key, resin] of [
      ['alpha_first', nth(1)],
      ['alpha_nth_1p69', nth(1.69)],
      ['alpha_autocat_polyester', polyester],
    ] as const) {
      const { alpha } = cureAlong(timeS, temperatureK, resin, tight);
      for (const row of forms.two_dwell_exact_separable!.rows) {
        const vertex = timeS.indexOf(row.t_s!);
        if (vertex >= 0) expect(Math.abs(alpha[vertex]! - row[key]!)).toBeLessThan(1e-12);
      }
    }
  });
});
