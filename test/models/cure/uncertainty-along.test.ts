import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { withParameters } from '../../../models/cure/parameters.ts';
import { parseResin } from '../../../models/cure/parse-resin.ts';
import type { Resin } from '../../../models/cure/resin.ts';
import { uncertaintyAlong } from '../../../models/cure/uncertainty-along.ts';
import { DomainError } from '../../../models/errors.ts';
import { cholesky } from '../../../models/numerics/cholesky.ts';
import { historyOf, readReference, recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';

const [timeS, temperatureK] = historyOf('dusi_976', 'two_dwell');

/** A fit of the Kamal law with its constants correlated as such fits are: ln A and E almost bound to each other. */
const spreads = [0.06, 220, 0.04, 180, 0.01, 0.012];
const parameters = ['lnA1', 'E1', 'lnA2', 'E2', 'm', 'n'];
const correlation = (i: number, j: number) => {
  if (i === j) return 1;
  const pair = new Set([i, j]);
  return (pair.has(0) && pair.has(1)) || (pair.has(2) && pair.has(3)) ? 0.95 : pair.has(4) && pair.has(5) ? 0.4 : 0;
};
const matrix = spreads.map((si, i) => spreads.map((sj, j) => correlation(i, j) * si * sj));
const fitted: Resin = parseResin({ ...recalledResin('dusi_976'), covariance: { parameters, matrix } });

/** Standard normal numbers, repeatable: Park and Miller's generator (CACM 31, 1988) and the Box–Muller transform. */
function normalNumbers(seed: number): () => number {
  let state = seed;
  const uniform = () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

/** Standard deviations of degree, Tg and gel time over random trials. */
function monteCarlo(trials: number, resin: Resin, temperatureUncertaintyK: number): number[] {
  const normal = normalNumbers(20260302);
  const L = cholesky(resin.covariance?.matrix ?? []);
  const figures = Array.from({ length: trials }, () => {
    const z = L.map(() => normal());
    const names = resin.covariance?.parameters ?? [];
    const moves = new Map(names.map((name, i) => [name, L[i]!.reduce((sum, entry, j) => sum + entry * z[j]!, 0)]));
    const offsetK = (temperatureUncertaintyK / 2) * normal();
    const trial = cureAlong(
      timeS,
      temperatureK.map((k) => k + offsetK),
      withParameters(resin, moves)!,
    );
    return [trial.finalAlpha, trial.finalTgK!, trial.gelS!];
  });
  return [0, 1, 2].map((k) => {
    const mean = figures.reduce((sum, figure) => sum + figure[k]!, 0) / trials;
    return Math.sqrt(figures.reduce((sum, figure) => sum + (figure[k]! - mean) ** 2, 0) / (trials - 1));
  });
}

describe('uncertaintyAlong', () => {
  it('agrees with Monte Carlo within 5 %, thermocouple and correlated constants together', () => {
    // 4000 trials know a standard deviation to 1.1 %. JCGM 101:2008 is the method.
    const [degree, tgK, gelS] = monteCarlo(4000, fitted, 2.2);
    const propagated = uncertaintyAlong(timeS, temperatureK, fitted, { temperatureUncertaintyK: 2.2 });
    expect(propagated.reckonedWith).toEqual(['temperature', 'kinetics']);
    expect(Math.abs(propagated.gelS!.expanded! / (2 * gelS!) - 1)).toBeLessThan(0.05);
    expect(Math.abs(propagated.degree.expanded! / (2 * degree!) - 1)).toBeLessThan(0.05);
    expect(Math.abs(propagated.tgK!.expanded! / (2 * tgK!) - 1)).toBeLessThan(0.05);
  });

  it('would be far off without the correlations', () => {
    const diagonal = matrix.map((row, i) => row.map((entry, j) => (i === j ? entry : 0)));
    const apart = { ...fitted, covariance: { parameters, matrix: diagonal } };
    const [bound, free] = [fitted, apart].map((resin) => uncertaintyAlong(timeS, temperatureK, resin).gelS!.expanded!);
    expect(free! / bound!).toBeGreaterThan(1.5);
  });

  // Source: test/reference/cure/temperature-offset.json (SciPy): the two-dwell cycle shifted by ±1.1 °C.
  const rows = readReference<{ rows: { set: string; offset_C: number; alpha_18000: number; gel_s: number }[] }>(
    'temperature-offset.json',
  ).rows.filter(({ set }) => set in referenceSets);

  it.each([...new Set(rows.map(({ set }) => set))])('%s: 2.2 °C at k = 2 spread what SciPy has', (set) => {
    const of = (offset: number) => rows.find((row) => row.set === set && row.offset_C === offset)!;
    const [resin, history] = [recalledResin(set), historyOf(set, 'two_dwell')];
    const { degree, gelS } = uncertaintyAlong(...history, resin, { temperatureUncertaintyK: 2.2 });
    expect(Math.abs(degree.expanded! - (of(1.1).alpha_18000 - of(-1.1).alpha_18000))).toBeLessThan(1e-7);
    expect(Math.abs(gelS!.expanded! - (of(-1.1).gel_s - of(1.1).gel_s))).toBeLessThan(1e-3);
  });

  it('reckons with nothing where nothing is known', () => {
    const { degree, reckonedWith } = uncertaintyAlong(timeS, temperatureK, recalledResin('dusi_976'));
    expect(degree.expanded).toBe(0);
    expect(reckonedWith).toEqual([]);
  });

  it('cannot tell the gel time where one side of the interval does not gel', () => {
    const before = historyOf('dusi_976', 'iso_120C');
    const gelS = cureAlong(...before, recalledResin('dusi_976')).gelS!;
    const [stopS, stopK] = [Float64Array.of(0, gelS + 1), Float64Array.of(393.15, 393.15)];
    const cut = uncertaintyAlong(stopS, stopK, recalledResin('dusi_976'), { temperatureUncertaintyK: 2.2 });
    expect(cut.gelS).toEqual({ value: expect.closeTo(gelS, 1), expanded: null });
  });

  it('refuses a negative uncertainty, and covariances of what the kinetics have not', () => {
    expect(() => uncertaintyAlong(timeS, temperatureK, fitted, { temperatureUncertaintyK: -1 })).toThrow(DomainError);
    const named =
      (names: string[], entries = [[1]]) =>
      () =>
        parseResin({ ...recalledResin('dusi_976'), covariance: { parameters: names, matrix: entries } });
    expect(named(['lnA3'])).toThrow(/covariance\.parameters\[0\]/);
    expect(named(['law'])).toThrow(/covariance\.parameters\[0\]/);
    expect(
      named(
        ['m', 'm'],
        [
          [1, 0],
          [0, 1],
        ],
      ),
    ).toThrow(/used twice/);
    expect(named(['m'], [[-1]])).toThrow(/covariance\.matrix/);
    expect(named(['m', 'n'], [[1, 0]])).toThrow(/covariance\.matrix/);
  });
});
