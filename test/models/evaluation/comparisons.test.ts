import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { CoolStage, Cycle, HeatStage, WindowLimit } from '../../../models/cycle/cycle.ts';
import { isAtLeast, isAtMost } from '../../../models/evaluation/finding.ts';
import {
  cycleOf,
  dwell,
  judged,
  type MadeRun,
  outcomeOf,
  part,
  partOf,
  pressure,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Units and Comparison), the absolute method of ASTM E29:
// readings as read, computed figures with an allowance of 1e-9 of the figure.

describe('comparing', () => {
  it('forms a limit in the written unit and converts it once: 360 − 10 °F is met by exactly 350 °F', () => {
    const units = { temperature: '°F', pressure: 'psi', vacuum: 'inHg' } as const;
    const cycle = cycleOf([dwell({ target: 360, plus: 10, minus: 10, time: { atLeast: 60 } })], { units });
    const minutes = (reading: number) =>
      partOf({
        channels: {
          TC1: part(
            [
              [0, 70],
              [70, 70],
              [71, reading],
              [131, reading],
              [132, 70],
              [140, 70],
            ],
            { unit: '°F' },
          ),
        },
        cycle,
      }).stages[0]!.minutes;
    expect(minutes(350)).toBe(60);
    expect(minutes(349.9)).toBe(0);
    // Read in °C: 350 °F is 176.666… °C, so that 176.7 °C is in and 176.6 °C is not.
    const inCelsius = (reading: number) =>
      partOf({
        channels: {
          TC1: [
            [0, 20],
            [70, 20],
            [71, reading],
            [131, reading],
            [132, 20],
            [140, 20],
          ],
        },
        cycle,
      }).stages[0]!.minutes;
    expect(inCelsius(176.6)).toBe(0);
    expect(inCelsius(176.7)).toBeGreaterThan(60);
  });

  it('a reading with no allowance: 190.0000001 °C is over a ceiling of 190 °C', () => {
    const peak = (c: number): Vertex[] => [
      [0, 20],
      [60, c],
      [120, 20],
    ];
    const outcome = (c: number) =>
      outcomeOf({ channels: { TC1: peak(c) }, cycle: cycleOf([dwell()], { ceiling: 190 }) }, 'ceiling');
    expect([outcome(190), outcome(190.0000001)]).toEqual(['met', 'not-met']);
  });

  it('a computed figure with one of 1e-9 of the figure', () => {
    expect([isAtLeast(120 - 1e-8, 120), isAtLeast(120 - 1e-6, 120)]).toEqual([true, false]);
    expect([isAtMost(120 + 1e-8, 120), isAtMost(120 + 1e-6, 120)]).toEqual([true, false]);
    expect([isAtLeast(0, undefined), isAtMost(0, undefined)]).toEqual([true, true]);
  });

  it('so that a time whose ends fall between the figures of a computer is what it is', () => {
    // At 0.3 °C/min from 175 ± nothing on a scan: the crossings fall at thirds of a minute.
    const history: Vertex[] = [
      [0, 20],
      [155 / 0.3 + 5 / 0.3, 180],
      [155 / 0.3 + 5 / 0.3 + 100, 180],
      [155 / 0.3 + 5 / 0.3 + 200, 80],
    ];
    const run = (atLeast: number) => ({
      channels: { TC1: history },
      cycle: cycleOf([dwell({ time: { atLeast } })]),
      every: 1 / 3,
    });
    // 5 °C at 0.3 °C/min, 100 min, 5 °C at 1 °C/min.
    const minutes = 5 / 0.3 + 100 + 5;
    expect(outcomeOf(run(minutes), 'dwell/time')).toBe('met');
    expect(outcomeOf(run(minutes + 0.001), 'dwell/time')).toBe('not-met');
  });
});

describe('units', () => {
  const toF = (c: number) => Math.round((1.8 * c + 32) * 1e9) / 1e9;
  const spanF = (c: number) => Math.round(1.8 * c * 1e9) / 1e9;

  /** Every fifth minute a multiple of 5 °C: such figures are whole in °F too. */
  const histories = fc.array(fc.array(fc.integer({ min: -3, max: 5 }), { minLength: 45, maxLength: 45 }), {
    minLength: 1,
    maxLength: 3,
  });

  function channelsOf(steps: readonly (readonly number[])[], unit: '°C' | '°F'): MadeRun['channels'] {
    const of = (own: readonly number[]): Vertex[] => {
      let c = 20;
      return own.map((step, i): Vertex => {
        // Up for the first third, level, and down for the last.
        c += 5 * (i === 0 ? 0 : i < 15 ? Math.max(0, step + 1) : i < 30 ? Math.sign(step) : -Math.max(0, step + 1));
        return [5 * i, unit === '°C' ? c : toF(c)];
      });
    };
    return {
      ...Object.fromEntries(steps.map((own, i) => [`TC${i + 1}`, part(of(own), { unit })])),
      P: pressure([
        [0, 0],
        [30, 7],
        [180, 7],
        [220, 0],
      ]),
    };
  }

  function cycleIn(unit: '°C' | '°F'): Cycle {
    const at = (c: number) => (unit === '°C' ? c : toF(c));
    const span = (c: number) => (unit === '°C' ? c : spanF(c));
    const heat: HeatStage = {
      name: 'heat',
      kind: 'heat',
      rate: { atLeast: span(0.5), atMost: span(3), over: [at(40), at(80)], average: 'window', window: 10, of: 'every' },
    };
    const cool: CoolStage = {
      name: 'cool',
      kind: 'cool',
      rate: { atMost: span(3), over: [at(90), at(50)], average: 'chord', of: 'lagging' },
      until: at(40),
    };
    const windows: WindowLimit[] = [
      {
        name: 'w',
        quantity: 'pressure',
        atLeast: 6,
        from: { at: 'all-reach', value: at(80) },
        until: { at: 'first-cools-to', value: at(60) },
      },
    ];
    return cycleOf(
      [
        heat,
        dwell({
          target: at(100),
          plus: span(10),
          minus: span(10),
          time: { atLeast: 40, atMost: 110 },
          counting: 'accumulated',
          below: 'not-allowed',
          forgive: { below: { by: span(5), for: 6 }, above: { by: span(5), for: 6 } },
          longest: { atMost: 120, clock: { opens: 'leading-enters', closes: 'last-leaves' } },
        }),
        cool,
      ],
      {
        units: { temperature: unit, pressure: 'bar', vacuum: 'bar' },
        ceiling: at(120),
        spread: { atMost: span(25), during: 'heating' },
        windows,
      },
    );
  }

  it('of log and cycle change no finding', () => {
    fc.assert(
      fc.property(histories, fc.constantFrom('°C' as const, '°F' as const), (steps, logUnit) => {
        const of = (unit: '°C' | '°F', log: '°C' | '°F') =>
          judged({ channels: channelsOf(steps, log), cycle: cycleIn(unit), every: 5 }).parts[0]!.findings;
        const celsius = of('°C', '°C');
        const other = of('°F', logUnit);
        expect(other.map(({ limit, outcome }) => [limit, outcome])).toEqual(
          celsius.map(({ limit, outcome }) => [limit, outcome]),
        );
        celsius.forEach((finding, i) => {
          const { observed, unit } = other[i]!;
          if (finding.observed === null) {
            expect(observed).toBeNull();
            return;
          }
          const isDifference = finding.unit.includes('/min') || finding.limit === 'spread';
          const same =
            unit === finding.unit
              ? finding.observed
              : isDifference
                ? 1.8 * finding.observed
                : 1.8 * finding.observed + 32;
          expect(observed).toBeCloseTo(same, 4);
        });
      }),
      { seed: 20260302, numRuns: 150 },
    );
  });
});
