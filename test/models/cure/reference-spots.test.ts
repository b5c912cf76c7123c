import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { beginCure } from '../../../models/cure/cure-progress.ts';
import { glassTransitionK } from '../../../models/cure/glass-transition.ts';
import type { Resin } from '../../../models/cure/resin.ts';
import { historyOf, readReference, recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';

const tight = { tolerance: 1e-12 };

/** Degrees at moments between the vertices of a history. */
function degreesAt(
  atS: readonly number[],
  [timeS, temperatureK]: [Float64Array, Float64Array],
  resin: Resin,
): number[] {
  const all = Float64Array.from(new Set([...timeS, ...atS])).sort();
  const straight = (s: number) => {
    const next = Math.max(
      1,
      timeS.findIndex((vertex) => vertex >= s),
    );
    const share = (s - timeS[next - 1]!) / (timeS[next]! - timeS[next - 1]!);
    return temperatureK[next - 1]! + share * (temperatureK[next]! - temperatureK[next - 1]!);
  };
  const { alpha } = cureAlong(all, all.map(straight), resin, { tolerance: 1e-13 });
  return atS.map((s) => alpha[all.indexOf(s)]!);
}

describe('spot checks', () => {
  // Source: test/reference/cure/spot-checks.json.
  const { quadrature, R_8p314_minus_CODATA } = readReference<{
    quadrature: { set: string; T_C: number; t_s: number; alpha: number }[];
    R_8p314_minus_CODATA: { t7200: number; t18000: number };
  }>('spot-checks.json');

  it.each(quadrature)('$set comes to $alpha at $T_C °C after $t_s s, by quadrature', ({ set, T_C, t_s, alpha }) => {
    const resin = { ...recalledResin(set), gel: { degree: alpha } };
    const { gelS } = cureAlong(Float64Array.of(0, 2 * t_s), Float64Array.of(T_C + 273.15, T_C + 273.15), resin, tight);
    expect(Math.abs(gelS! - t_s)).toBeLessThan(1e-6);
  });

  it('is worked out with the gas constant of its study: 8.314 makes the difference SciPy has', () => {
    const set = recalledResin('hubert_8552');
    const at = [7200, 18000];
    const [codata, short] = [set, { ...set, gasConstant: 8.314 }].map((resin) =>
      degreesAt(at, historyOf('hubert_8552', 'two_dwell'), resin),
    );
    expect(Math.abs(short![0]! - codata![0]! - R_8p314_minus_CODATA.t7200)).toBeLessThan(1e-10);
    expect(Math.abs(short![1]! - codata![1]! - R_8p314_minus_CODATA.t18000)).toBeLessThan(1e-10);
  });
});

describe('the solutions of SciPy, beside the degree', () => {
  // Source: test/reference/cure/kinetics.json.
  it.each(Object.keys(referenceSets))('%s: Tg along every case, to 1e-9 °C', (set) => {
    const { glassTransition } = recalledResin(set);
    for (const { alpha, Tg_C } of Object.values(referenceSets[set]!.cases)) {
      for (const [i, degree] of alpha.entries()) {
        expect(Math.abs(glassTransitionK(degree, glassTransition!) - 273.15 - Tg_C[i]!)).toBeLessThan(1e-9);
      }
    }
  });

  const switched = Object.entries(referenceSets.lls_3501_6!.cases).flatMap(([name, { events_s }]) =>
    events_s.switch === undefined ? [] : [{ name, atS: events_s.switch }],
  );
  it('switches its branch of 3501-6 in every case that gets there', () => expect(switched.length).toBeGreaterThan(4));
  it.each(switched)(
    '3501-6 $name: switches at $atS s, within 1e-3 s, at the default tolerance too',
    ({ name, atS }) => {
      const resin = { ...recalledResin('lls_3501_6'), gel: { degree: 0.3 } };
      for (const options of [tight, {}]) {
        expect(Math.abs(cureAlong(...historyOf('lls_3501_6', name), resin, options).gelS! - atS)).toBeLessThan(1e-3);
      }
    },
  );

  it.each(Object.keys(referenceSets))('%s: gel within 1e-3 s at the default tolerance', (set) => {
    for (const [name, { events_s }] of Object.entries(referenceSets[set]!.cases)) {
      const progress = beginCure(recalledResin(set));
      const [timeS, temperatureK] = historyOf(set, name);
      progress.acceptAll(timeS, temperatureK, new Float64Array(timeS.length));
      if (events_s.gel !== undefined) expect(Math.abs(progress.gelS! - events_s.gel)).toBeLessThan(1e-3);
    }
  });
});

describe('exact separable solutions', () => {
  // Source: test/reference/cure/closed-forms.json, mpmath at 40 digits.
  const { rows } = readReference<{ two_dwell_exact_separable: { rows: Record<string, number>[] } }>(
    'closed-forms.json',
  ).two_dwell_exact_separable;
  const nth = (n: number): Resin => {
    const { diffusion: _, ...resin } = recalledResin('nth_epoxy_pultrusion');
    return { ...resin, initialDegree: 0, kinetics: { law: 'nth-order', A: 191400, E: 60500, n } };
  };

  it.each([
    ['alpha_first', nth(1)],
    ['alpha_nth_1p69', nth(1.69)],
    ['alpha_autocat_polyester', recalledResin('bogetti_polyester')],
  ] as const)('%s: two dwells, at every moment of the table to 1e-12', (key, resin) => {
    const found = degreesAt(
      rows.map(({ t_s }) => t_s!),
      historyOf('bogetti_polyester', 'two_dwell'),
      resin,
    );
    for (const [i, row] of rows.entries()) expect(Math.abs(found[i]! - row[key]!)).toBeLessThan(1e-12);
  });
});

type Mark = 'alpha_7200' | 'alpha_8400' | 'alpha_18000';
const MARKS: readonly Mark[] = ['alpha_7200', 'alpha_8400', 'alpha_18000'];

describe('a thermocouple that is off', () => {
  // Source: test/reference/cure/temperature-offset.json (SciPy).
  const { rows } = readReference<{ rows: ({ set: string; offset_C: number; gel_s: number } & Record<Mark, number>)[] }>(
    'temperature-offset.json',
  );

  it.each(rows)('$set, $offset_C °C off: degrees to 1e-8 and gel to 1e-3 s', (row) => {
    const { set } = row;
    const [timeS, temperatureK] = historyOf(set, 'two_dwell');
    const shifted = temperatureK.map((kelvin) => kelvin + row.offset_C);
    const found = degreesAt([7200, 8400, 18000], [timeS, shifted], recalledResin(set));
    for (const [i, key] of MARKS.entries()) {
      expect(Math.abs(found[i]! - row[key])).toBeLessThan(1e-8);
    }
    expect(Math.abs(cureAlong(timeS, shifted, recalledResin(set), tight).gelS! - row.gel_s)).toBeLessThan(1e-3);
  });
});
