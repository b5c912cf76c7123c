import { describe, expect, it } from 'vitest';
import type { CureOfPart } from '../../models/chart/chart-inputs.ts';
import { parseResin } from '../../models/cure/parse-resin.ts';
import type { Resin, Viscosity } from '../../models/cure/resin.ts';
import { parseLoad } from '../../models/run/parse-load.ts';
import { cureCourses } from '../../server/actions/cure-courses.ts';
import { historyOf, readReference, recalledResin } from '../reference/cure/reference-sets.ts';
import {
  cycleOf,
  dwell,
  judged,
  type MadeRun,
  minutesTo,
  part,
  pressure,
  readingsOf,
  type Vertex,
} from '../support/made-run.ts';

const sets: Record<string, Viscosity> = {
  lls_3501_6: { law: 'lee-loos-springer', muInf: 7.93e-14, U: 90800, K: 14.1, validTo: 0.5 },
  dusi_976: { law: 'lee-loos-springer', muInf: 1.06e-6, U: 37600, K: 18.8, validTo: 0.5 },
  hubert_8552: { law: 'castro-macosko', A: 3.45e-10, E: 76536, gelDegree: 0.47, a: 3.8, b: 2.5 },
};
const withViscosity = (set: string, more: object = {}): Resin =>
  parseResin({ ...recalledResin(set), viscosity: { ...sets[set], ...more } });

/** The two-dwell cycle, read every 10 s as the reference is. */
function twoDwell(set: string): Vertex[] {
  const [timeS, temperatureK] = historyOf(set, 'two_dwell');
  return Array.from(timeS, (s, i): Vertex => [s / 60, temperatureK[i]! - 273.15]);
}

function cureOf(run: Omit<MadeRun, 'cycle'>): CureOfPart {
  const made = { ...run, cycle: cycleOf([dwell()]) };
  const evaluated = judged(made).parts[0]!;
  const load = parseLoad({ format: 'dwellbook-load/1', parts: [], ...run.load });
  return cureCourses(readingsOf(made).readings, load, run.resin!, evaluated);
}

const secondsTo = (ms: number) => 60 * minutesTo(new Date(ms).toISOString())!;

describe('viscosity along a course', () => {
  // Source: test/reference/cure/viscosity.json (SciPy, on a 10 s grid).
  const { minima } = readReference<{ minima: { set: string; t_min_s: number; mu_min_Pa_s: number }[] }>(
    'viscosity.json',
  );

  it.each(minima)('$set is thinnest, $mu_min_Pa_s Pa s, at $t_min_s s', ({ set, t_min_s, mu_min_Pa_s }) => {
    const { courses } = cureOf({ channels: { TC1: twoDwell(set) }, resin: withViscosity(set), every: 1 / 6 });
    const { thinnest } = courses[0]!;
    expect(secondsTo(thinnest!.atMs)).toBeCloseTo(t_min_s, 3);
    expect(Math.abs(thinnest!.viscosityPaS / mu_min_Pa_s - 1)).toBeLessThan(1e-5);
  });

  it.each([
    { set: 'hubert_8552', more: {}, gelDegree: 0.47, ends: 0.47, because: 'at gel' },
    { set: 'lls_3501_6', more: { validTo: 0.4 }, gelDegree: 0.5, ends: 0.4, because: 'where the fit ends' },
    { set: 'lls_3501_6', more: {}, gelDegree: 0.35, ends: 0.35, because: 'at gel, of which the law knows nothing' },
  ])('$set ends $because', ({ set, more, gelDegree, ends }) => {
    const resin = { ...withViscosity(set, more), gel: { degree: gelDegree } };
    const { courses } = cureOf({ channels: { TC1: twoDwell(set) }, resin, every: 1 / 6 });
    const { degree, viscosityPaS } = courses[0]!;
    expect(degree.at(-1)).toBeGreaterThan(ends);
    degree.forEach((alpha, i) => {
      expect(Number.isNaN(viscosityPaS![i])).toBe(alpha > ends);
    });
  });

  it('flows from where its set says to the gel of the reference', () => {
    const resin = withViscosity('hubert_8552', { flowsBelow: 50 });
    const { courses, viscosity } = cureOf({ channels: { TC1: twoDwell('hubert_8552') }, resin, every: 1 / 6 });
    const { flow, timeMs, viscosityPaS } = courses[0]!;
    // Source: test/reference/cure/kinetics.json, the gel of this case.
    expect(secondsTo(flow!.untilMs)).toBeCloseTo(8273.6, 0);
    expect(flow).toMatchObject({ by: 'viscosity', isFromStart: false });
    const after = timeMs.findIndex((ms) => ms >= flow!.fromMs);
    expect(viscosityPaS![after - 1]).toBeGreaterThan(50);
    expect(viscosityPaS![after]).toBeLessThanOrEqual(50);
    expect(viscosity).toEqual({ validTo: null, flowsBelowPaS: 50 });
  });

  it('is not there where the set gives none, nor a flow that has no end', () => {
    const { gel: _, ...noGel } = recalledResin('hubert_8552');
    const { courses, viscosity } = cureOf({ channels: { TC1: twoDwell('hubert_8552') }, resin: noGel });
    expect([courses[0]!.viscosityPaS, courses[0]!.thinnest, courses[0]!.flow, viscosity]).toEqual([
      null,
      null,
      null,
      null,
    ]);
  });
});

describe('void growth along a run', () => {
  // Source: test/reference/cure/void-growth.json: what 50 % relative humidity takes.
  const { rows } = readReference<{ rows: { T_C: number; Pmin_RH50_kPa: number }[] }>('void-growth.json');
  const paAt = (temperatureC: number) => 1000 * rows.find(({ T_C }) => T_C === temperatureC)!.Pmin_RH50_kPa;
  // Held hot from minute 30; the gas comes from minute 40 on, 1 bar a minute.
  const hot: Vertex[] = [
    [0, 20],
    [30, 150],
    [80, 150],
  ];
  const cold = hot.map(([minute, figure]): Vertex => [minute, figure === 150 ? 120 : figure]);
  const gas: Vertex[] = [
    [0, 0],
    [40, 0],
    [47, 7],
    [80, 7],
  ];
  const at50 = { parts: [{ part: 'A', humidity: 50 }], sensors: [], barometer: '1000 mbar' };
  const growthOf = (load: MadeRun['load'] & object = at50, more: Partial<MadeRun> = {}) =>
    cureOf({
      channels: { TC1: hot, TC2: cold, gas: pressure(gas) },
      resin: recalledResin('hubert_8552'),
      load,
      ...more,
    }).voidGrowth;

  it('is that of the hottest judged sensor', () => {
    const growth = growthOf()!;
    expect(growth.most.leastPa / paAt(150)).toBeCloseTo(1, 12);
    expect(growth.humidityPercent).toBe(50);
  });

  it('tells where the vessel’s pressure lay below it', () => {
    const { vessel } = growthOf()!;
    expect(vessel!.below).toHaveLength(1);
    const [{ fromMs, untilMs }] = vessel!.below as [{ fromMs: number; untilMs: number }];
    // Above 1 bar absolute the pressure that was there does not do: by the formula turned round, where 1 bar is needed.
    const neededK = 4892 / Math.log((4962 * 50 * 101325) / 1e5);
    expect(secondsTo(fromMs) / 60).toBeCloseTo(((neededK - 273.15 - 20) / 130) * 30, 1);
    expect(secondsTo(untilMs) / 60).toBeCloseTo(40 + (paAt(150) - 1e5) / 1e5, 3);
  });

  it('counts a gauge from the barometer, and says nothing of the vessel without one', () => {
    const { barometer: _, ...none } = at50;
    expect(growthOf(none)!.vessel).toBeNull();
    const absolute = { TC1: hot, gas: pressure(gas, { unit: 'bar abs' }) };
    expect(growthOf(none, { channels: absolute })!.vessel!.below).toHaveLength(1);
    expect(growthOf(at50, { channels: { TC1: hot } })!.vessel).toBeNull();
  });

  it('ends at the last gel, and asks nothing of a sensor that nobody believes', () => {
    const long: Vertex[] = hot.map(([minute, figure]) => [minute === 80 ? 400 : minute, figure]);
    const growth = growthOf(at50, { channels: { TC1: long, gas: pressure(gas) } })!;
    expect(growth.gelMs).not.toBeNull();
    growth.timeMs.forEach((ms, i) => {
      expect(Number.isNaN(growth.leastPa[i])).toBe(ms > growth.gelMs!);
    });
    const excluding = { channel: 'TC1', from: '2026-03-02T08:00:00Z', reason: 'lead crushed', by: 'inspector 2' };
    const without = growthOf({ ...at50, exclusions: [excluding] })!;
    expect(without.most.leastPa / paAt(120)).toBeCloseTo(1, 12);
  });

  it('is not told without a humidity, or by a set that does not say when it gels', () => {
    expect(growthOf({ ...at50, parts: [{ part: 'A' }] })).toBeNull();
    const { gel: _, ...noGel } = recalledResin('hubert_8552');
    expect(growthOf(at50, { resin: noGel })).toBeNull();
  });

  it('is that of the part’s own lay-up', () => {
    const load = {
      ...at50,
      parts: [
        { part: 'A', humidity: 25 },
        { part: 'B', humidity: 50 },
      ],
    };
    expect(growthOf(load)!.most.leastPa / paAt(150)).toBeCloseTo(0.5, 12);
  });

  it('takes the part’s sensors alone', () => {
    const own = part(cold, { parts: ['A'] });
    const channels = { TC1: part(hot, { parts: ['B'] }), TC2: own, gas: pressure(gas) };
    const sensors = [
      { channel: 'TC1', parts: ['B'] },
      { channel: 'TC2', parts: ['A'] },
    ];
    const load = { ...at50, parts: [{ part: 'A', humidity: 50 }, { part: 'B' }], sensors };
    expect(growthOf(load, { channels })!.most.leastPa / paAt(120)).toBeCloseTo(1, 12);
  });
});
