import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { parseResin } from '../../../models/cure/parse-resin.ts';
import type { Resin, Viscosity } from '../../../models/cure/resin.ts';
import { viscosityPaS } from '../../../models/cure/viscosity.ts';
import { viscosityAlong } from '../../../models/cure/viscosity-along.ts';
import { DomainError } from '../../../models/errors.ts';
import { historyOf, readReference, recalledResin } from '../../reference/cure/reference-sets.ts';

// Source: test/reference/cure/viscosity.json (SciPy).
const reference = readReference<{
  rows: { set: string; T_C: number; alpha: number; mu_Pa_s: number }[];
  minima: { set: string; t_min_s: number; mu_min_Pa_s: number; alpha_at_min: number }[];
}>('viscosity.json');

const sets: Record<string, Viscosity> = {
  lls_3501_6: { law: 'lee-loos-springer', muInf: 7.93e-14, U: 90800, K: 14.1, validTo: 0.5 },
  dusi_976: { law: 'lee-loos-springer', muInf: 1.06e-6, U: 37600, K: 18.8, validTo: 0.5 },
  hubert_8552: { law: 'castro-macosko', A: 3.45e-10, E: 76536, gelDegree: 0.47, a: 3.8, b: 2.5 },
};
const R = 8.314462618;
const withViscosity = (set: string): Resin => parseResin({ ...recalledResin(set), viscosity: sets[set] });

/** The two-dwell cycle read every 10 s. */
function twoDwell(set: string): [Float64Array, Float64Array] {
  const [vertexS, vertexK] = historyOf(set, 'two_dwell');
  const timeS = Float64Array.from({ length: 1801 }, (_, i) => 10 * i);
  return [
    timeS,
    timeS.map((s) => {
      const next = Math.max(
        1,
        vertexS.findIndex((at) => at >= s),
      );
      const share = (s - vertexS[next - 1]!) / (vertexS[next]! - vertexS[next - 1]!);
      return vertexK[next - 1]! + share * (vertexK[next]! - vertexK[next - 1]!);
    }),
  ];
}

describe('viscosity', () => {
  it.each(reference.rows)('$set at $T_C °C and $alpha: $mu_Pa_s Pa s', ({ set, T_C, alpha, mu_Pa_s }) => {
    expect(Math.abs(viscosityPaS(T_C + 273.15, alpha, sets[set]!, R) / mu_Pa_s - 1)).toBeLessThan(1e-12);
  });

  it.each(reference.minima)('$set is thinnest, $mu_min_Pa_s Pa s, at $t_min_s s', ({ set, ...minimum }) => {
    const [timeS, temperatureK] = twoDwell(set);
    const resin = withViscosity(set);
    const { alpha } = cureAlong(timeS, temperatureK, resin);
    const { least } = viscosityAlong(timeS, temperatureK, alpha, resin, 10);
    expect(least.timeS).toBe(minimum.t_min_s);
    expect(Math.abs(least.viscosityPaS / minimum.mu_min_Pa_s - 1)).toBeLessThan(1e-5);
    expect(alpha[timeS.indexOf(least.timeS)]!).toBeCloseTo(minimum.alpha_at_min, 6);
  });

  it('is infinite from the gel of Castro and Macosko on, and unknown beyond the fit of Lee, Loos and Springer', () => {
    expect(viscosityPaS(400, 0.47, sets.hubert_8552!, R)).toBe(Number.POSITIVE_INFINITY);
    expect(viscosityPaS(400, 0.5001, sets.lls_3501_6!, R)).toBeNaN();
    expect(viscosityPaS(400, 0.5, sets.lls_3501_6!, R)).toBeGreaterThan(0);
  });

  it('finds the flow window where the limit is crossed, between scans', () => {
    const [timeS, temperatureK] = twoDwell('hubert_8552');
    const resin = withViscosity('hubert_8552');
    const { alpha } = cureAlong(timeS, temperatureK, resin);
    const { flows, viscosityPaS: along } = viscosityAlong(timeS, temperatureK, alpha, resin, 50);
    const at = (s: number) => along[Math.floor(s / 10)]!;
    expect(at(flows!.fromS)).toBeGreaterThan(50);
    expect(at(flows!.fromS + 10)).toBeLessThan(50);
    expect(at(flows!.untilS)).toBeLessThan(50);
    expect(at(flows!.untilS + 10)).toBeGreaterThan(50);
    expect(viscosityAlong(timeS, temperatureK, alpha, resin, 1).flows).toBeNull();
  });

  it('is refused without a viscosity or with a limit that is none', () => {
    const [timeS, temperatureK] = twoDwell('dusi_976');
    const { alpha } = cureAlong(timeS, temperatureK, recalledResin('dusi_976'));
    expect(() => viscosityAlong(timeS, temperatureK, alpha, recalledResin('dusi_976'), 10)).toThrow(DomainError);
    expect(() => viscosityAlong(timeS, temperatureK, alpha, withViscosity('dusi_976'), 0)).toThrow(DomainError);
    const wrong = { ...recalledResin('dusi_976'), viscosity: { ...sets.dusi_976, K: -1 } };
    expect(() => parseResin(wrong)).toThrow(/viscosity\.K/);
  });
});
