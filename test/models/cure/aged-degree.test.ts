import { describe, expect, it } from 'vitest';
import { agedDegree, equivalentSeconds, wordsOfAgedDegree } from '../../../models/cure/aged-degree.ts';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { historyOf, readReference, recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';

interface Row {
  set: string;
  T_C: number;
  days: number;
  alpha_out: number;
  two_dwell_final: number;
  two_dwell_gel_s: number;
}
const DAY_S = 86400;
// Source: test/reference/cure/out-time.json (SciPy DOP853 and LSODA).
const rows = readReference<{ rows: Row[] }>('out-time.json').rows.filter(({ set }) => set in referenceSets);

describe('agedDegree', () => {
  it.each(rows)('$set: $days d at $T_C °C age it to $alpha_out', ({ set, T_C, days, alpha_out, ...cured }) => {
    const resin = recalledResin(set);
    const { degree, basis } = agedDegree([{ seconds: days * DAY_S, temperatureK: T_C + 273.15 }], resin);
    expect(Math.abs(degree - alpha_out)).toBeLessThan(1e-9);
    expect(basis).toBe('beyond-fit');
    const { finalAlpha, gelS } = cureAlong(...historyOf(set, 'two_dwell'), resin, {
      startDegree: degree,
      tolerance: 1e-11,
    });
    expect(Math.abs(finalAlpha - cured.two_dwell_final)).toBeLessThan(1e-8);
    expect(Math.abs(gelS! - cured.two_dwell_gel_s)).toBeLessThan(1e-3);
  });

  it('does not depend on how a stay is cut up', () => {
    const resin = recalledResin('dusi_976');
    const span = (days: number) => ({ seconds: days * DAY_S, temperatureK: 295 });
    const whole = agedDegree([span(20)], resin).degree;
    expect(Math.abs(agedDegree([span(3), span(0), span(17)], resin).degree - whole)).toBeLessThan(1e-9);
  });

  it('says whether the set was fitted at these temperatures', () => {
    const resin = { ...recalledResin('dusi_976'), validC: [10, 180] as const };
    const fit = agedDegree([{ seconds: DAY_S, temperatureK: 294 }], resin);
    expect(fit.basis).toBe('fit');
    expect(wordsOfAgedDegree(fit, resin)).toContain('fitted from 10 to 180 °C');
    const cold = agedDegree([{ seconds: DAY_S, temperatureK: 255 }], resin);
    expect(cold).toMatchObject({ basis: 'beyond-fit', outsideValidS: DAY_S });
    expect(wordsOfAgedDegree(cold, resin)).toContain('an extrapolation');
  });
});

describe('equivalentSeconds', () => {
  it('counts a time at the reference as it is, and doubles the rate where Arrhenius does', () => {
    // E = R ln 2 / (1/294 − 1/304) doubles the rate over 10 K from 21 °C: common practice, "10 K halve the life".
    const E = (8.314462618 * Math.log(2)) / (1 / 294 - 1 / 304);
    expect(equivalentSeconds([{ seconds: 100, temperatureK: 294 }], 294, E)).toBe(100);
    expect(equivalentSeconds([{ seconds: 100, temperatureK: 304 }], 294, E)).toBeCloseTo(200, 9);
  });

  it('orders material as its own kinetics do', () => {
    // One nth-order reaction: equal ∫ k dt is equal degree.
    const resin = recalledResin('nth_epoxy_pultrusion');
    const spans = [
      { seconds: 5000, temperatureK: 300 },
      { seconds: 90000, temperatureK: 275 },
    ];
    const seconds = equivalentSeconds(spans, 294, 60500);
    const [aged, equivalent] = [agedDegree(spans, resin), agedDegree([{ seconds, temperatureK: 294 }], resin)];
    expect(Math.abs(aged.degree - equivalent.degree)).toBeLessThan(1e-9);
  });
});
