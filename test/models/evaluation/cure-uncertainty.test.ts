import { describe, expect, it } from 'vitest';
import type { Resin } from '../../../models/cure/resin.ts';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dwell,
  findingOf,
  type MadeRun,
  minutesTo,
  part,
  partOf,
  type Vertex,
} from '../../support/made-run.ts';

// A resin of first order, half cured in 60 min at 180 °C, its gel at a degree of 0.5 and its Tg 200 α °C. Held at T for
// t its degree is 1 − exp(−k t), so that by hand (closed form)
//   dα/dT = (1 − α) k t E/(R T²),   dα/d ln A = (1 − α) k t,   dt_gel/dT = −t_gel E/(R T²),   dt_gel/d ln A = −t_gel.
const R = 8.314462618;
const E = 60_000;
const T = 453.15;
const HALVING: Resin = {
  format: 'dwellbook-resin/1',
  code: 'halving',
  name: 'First order, halving in an hour at 180 °C',
  source: { citation: 'closed form', status: 'illustrative' },
  initialDegree: 0,
  gasConstant: R,
  kinetics: { law: 'nth-order', A: (Math.LN2 / 3600) * Math.exp(E / (R * T)), E, n: 1 },
  glassTransition: { law: 'dibenedetto', tg0C: 0, tgInfC: 200, lambda: 1 },
  gel: { degree: 0.5 },
};
const WITH_COVARIANCE: Resin = { ...HALVING, covariance: { parameters: ['lnA'], matrix: [[0.03 ** 2]] } };
const PER_K = E / (R * T * T);
const KT = 2 * Math.LN2; // at 120 min
const DEGREE_PER_K = 0.25 * KT * PER_K;

const HELD: Vertex[] = [
  [0, 180],
  [120, 180],
];

function runOf(uncertainty: number | null, more: Partial<MadeRun> = {}, asked: Partial<Cycle> = {}): MadeRun {
  const cycle = cycleOf([dwell()], { cure: { resin: 'halving', degreeAtLeast: 0.7, tgAtLeast: 140 }, ...asked });
  const channel = part(HELD, uncertainty === null ? {} : { uncertainty });
  return { channels: { TC1: channel }, cycle, resin: HALVING, every: 0.5, ...more };
}

const estimateOf = (run: MadeRun) => partOf(run).cure[0]!;
const halfWidth = (interval: readonly [number, number] | null | undefined) => (interval![1] - interval![0]) / 2;
const gelMinutes = (run: MadeRun) => estimateOf(run).gelInterval!.map((instant) => minutesTo(instant)!);

/** Standard normal numbers, repeatable: Park and Miller's generator (CACM 31, 1988) and the Box–Muller transform. */
function normalNumbers(seed: number): () => number {
  let state = seed;
  const uniform = () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

describe('the interval of an estimate', () => {
  it('is what 2.2 °C of the thermocouple come to, by the closed form', () => {
    const estimate = estimateOf(runOf(2.2));
    expect(halfWidth(estimate.degreeInterval)).toBeCloseTo(DEGREE_PER_K * 2.2, 4);
    expect(halfWidth(estimate.tgIntervalC)).toBeCloseTo(200 * DEGREE_PER_K * 2.2, 2);
    const [early, late] = gelMinutes(runOf(2.2));
    expect((late! - early!) / 2).toBeCloseTo(60 * PER_K * 2.2, 2);
    expect((late! + early!) / 2).toBeCloseTo(60, 3);
  });

  it('adds the covariance of the constants in squares, where the set has it', () => {
    const run = runOf(2.2, { resin: WITH_COVARIANCE });
    // An expanded 2 · 0.03 in ln A.
    const inLnA = 0.25 * KT * 0.06;
    expect(halfWidth(estimateOf(run).degreeInterval)).toBeCloseTo(Math.hypot(DEGREE_PER_K * 2.2, inLnA), 4);
    const [early, late] = gelMinutes(run);
    expect((late! - early!) / 2).toBeCloseTo(60 * Math.hypot(PER_K * 2.2, 0.06), 1);
  });

  it('covers 95 % of runs whose thermocouple is off by what is said of it', () => {
    // JCGM 101:2008: 1000 runs with the reading shifted at random; 95.45 % of a normal lie within k = 2, ± 0.7 %.
    const [low, high] = estimateOf(runOf(2.2)).degreeInterval!;
    const normal = normalNumbers(20261201);
    let inside = 0;
    for (let n = 0; n < 1000; n += 1) {
      const shifted = part(HELD, { offset: 1.1 * normal() });
      const { degree } = estimateOf(runOf(null, { channels: { TC1: shifted }, every: 5 }));
      if (degree >= low && degree <= high) inside += 1;
    }
    expect(inside).toBeGreaterThan(933);
    expect(inside).toBeLessThan(976);
  });

  it('is not told where no uncertainty of the thermocouple is on record, whatever is known of the constants', () => {
    for (const resin of [HALVING, WITH_COVARIANCE]) {
      expect(estimateOf(runOf(null, { resin }))).toMatchObject({
        degreeInterval: null,
        tgIntervalC: null,
        gelInterval: null,
      });
    }
  });

  it('leaves the gel open where a colder thermocouple would not have gelled', () => {
    const short = part(
      HELD.map(([minute, figure]): Vertex => [minute && 61, figure]),
      { uncertainty: 2.2 },
    );
    const estimate = estimateOf(runOf(2.2, { channels: { TC1: short } }));
    expect(minutesTo(estimate.gelAt)).toBeCloseTo(60, 3);
    expect(estimate.gelInterval).toBeNull();
    expect(estimate.degreeInterval).not.toBeNull();
  });

  it('takes the uncertainty the load gives before that of the layout', () => {
    const load = { parts: [], sensors: [{ channel: 'TC1', uncertainty: 1.1 }] };
    expect(halfWidth(estimateOf(runOf(2.2, { load })).degreeInterval)).toBeCloseTo(DEGREE_PER_K * 1.1, 4);
  });
});

describe('the findings of cure', () => {
  it('bear the expanded uncertainty of their figure', () => {
    const run = runOf(2.2);
    expect(findingOf(run, 'cure/degree')!.uncertainty).toBeCloseTo(DEGREE_PER_K * 2.2, 4);
    expect(findingOf(run, 'cure/tg')!.uncertainty).toBeCloseTo(200 * DEGREE_PER_K * 2.2, 2);
    expect(findingOf(runOf(null), 'cure/degree')!.uncertainty).toBeNull();
  });

  it('bear it in the unit of the cycle', () => {
    const units = { temperature: '°F', pressure: 'bar', vacuum: 'bar' } as const;
    const stages = [dwell({ target: 356, plus: 9, minus: 9 })];
    const cycle = cycleOf(stages, { units, cure: { resin: 'halving', tgAtLeast: 280 } });
    const finding = findingOf(runOf(2.2, { cycle }), 'cure/tg')!;
    expect(finding).toMatchObject({ unit: '°F', outcome: 'met' });
    expect(finding.uncertainty).toBeCloseTo(1.8 * 200 * DEGREE_PER_K * 2.2, 2);
  });

  // The rules move limits on a temperature, a pressure or a vacuum by U; an estimate is none of them.
  it('are decided as written by either rule, however wide the interval', () => {
    const asked = { cure: { resin: 'halving', degreeAtLeast: 0.74, tgAtLeast: 148 } };
    for (const rule of ['as-indicated', 'guarded'] as const) {
      const run = runOf(2.2, {}, { ...asked, decision: { rule } });
      expect(findingOf(run, 'cure/degree')).toMatchObject({ outcome: 'met', uncertainty: expect.closeTo(0.0268, 3) });
      expect(findingOf(run, 'cure/tg')).toMatchObject({ outcome: 'met' });
    }
  });
});
