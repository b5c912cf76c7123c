import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cycleOf, type MadeRun, minutesTo, type Vertex } from '../../support/made-run.ts';
import { at, HEAT, HOLD, HOUR, RAMP } from '../../support/open-run.ts';

describe('forecastsOf', () => {
  it('says when the lagging sensor is expected in, along its present rate', () => {
    const { forecast } = at(30, RAMP);
    expect(forecast.stage?.name).toBe('heat-up 1');
    expect(forecast.leading?.channel).toBe('TC1');
    expect(forecast.lagging?.channel).toBe('TC2');
    expect(forecast.lagging?.rateCPerMin).toBeCloseTo(1.7, 6);
    expect(forecast.entry?.by).toBe('TC2');
    expect(minutesTo(forecast.entry?.expectedAt)).toBeCloseTo(50, 2);
    expect(forecast.dwell).toBeNull();
  });

  it('ends a dwell no sooner than its least time after the lagging sensor came in', () => {
    const { forecast } = at(70, RAMP);
    expect(forecast.stage?.name).toBe('dwell 1');
    expect(forecast.dwell?.by).toBe('TC2');
    expect(forecast.dwell?.minutesSeen).toBeCloseTo(20, 3);
    expect(minutesTo(forecast.dwell?.notBefore)).toBeCloseTo(110, 3);
  });

  it('counts a contiguous dwell afresh after a dip that is not forgiven', () => {
    const dipped: MadeRun = {
      cycle: HOUR,
      channels: {
        TC1: [
          [0, 20],
          [45, 110],
          [60, 110],
          [64, 100],
          [68, 110],
          [200, 110],
        ],
        TC2: RAMP.channels.TC2!,
      },
    };
    // Back at 105 °C half-way from 100 to 110 °C: minute 66.
    expect(minutesTo(at(80, dipped).forecast.dwell?.notBefore)).toBeCloseTo(126, 3);
    // While it is out of the band nothing of the hour counts.
    expect(minutesTo(at(64, dipped).forecast.dwell?.notBefore)).toBeCloseTo(124, 3);
  });

  it('adds up an accumulated dwell', () => {
    const accumulated = cycleOf([HEAT, HOLD({ time: { atLeast: 60, atMost: 100 }, counting: 'accumulated' })]);
    const dipped: MadeRun = {
      cycle: accumulated,
      every: 0.5,
      channels: {
        TC1: [
          [0, 20],
          [42.5, 105],
          [60, 110],
          [64, 100],
          [68, 110],
          [200, 110],
        ],
      },
    };
    // Out from minute 62 to minute 66: the hour that began at 42.5 ends four minutes later.
    const { dwell: ahead } = at(80, dipped).forecast;
    expect(minutesTo(ahead?.notBefore)).toBeCloseTo(106.5, 3);
    expect(minutesTo(ahead?.notAfter)).toBeCloseTo(142.5, 3);
  });

  it('counts a suspect against: the clock that runs without it is not the one that is told', () => {
    const stuck: MadeRun = {
      ...RAMP,
      channels: {
        ...RAMP.channels,
        TC3: [
          [0, 20],
          [41, 102],
          [41.5, 102.5],
          [200, 102.5],
        ],
      },
    };
    const undecided = at(90, stuck, []).forecast;
    expect(undecided.dwell).toBeNull();
    expect(undecided.entry?.by).toBe('TC3');
    expect(undecided.entry?.expectedAt).toBeNull();
    const decided = at(90, { ...stuck, exclusions: [exclusion('TC3')] }, []).forecast;
    expect(minutesTo(decided.dwell?.notBefore)).toBeCloseTo(110, 3);
  });

  it('counts without a suspect where that comes later', () => {
    const leading: MadeRun = {
      cycle: cycleOf([HEAT, HOLD({ clock: { opens: 'leading-enters', closes: 'last-leaves' } })]),
      channels: {
        // 10 °C too high from the start, so in the band 5 min before TC2 and TC3 at 2 °C/min.
        TC1: [
          [0, 30],
          [40, 110],
          [200, 110],
        ],
        TC2: RAMP.channels.TC1!,
        TC3: RAMP.channels.TC1!,
      },
    };
    expect(minutesTo(at(60, leading).forecast.dwell?.notBefore)).toBeCloseTo(97.5, 3);
    const undecided = at(60, leading, []).forecast.dwell;
    expect(minutesTo(undecided?.notBefore)).toBeCloseTo(102.5, 3);
    expect(undecided?.because).toContain('counted without TC1');
  });

  it('is kept by the run: the time is met from the instant told on, and not before', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.8, max: 3, noNaN: true }),
        fc.double({ min: 0.8, max: 3, noNaN: true }),
        fc.integer({ min: 1, max: 55 }),
        (rate1, rate2, later) => {
          const line = (rate: number): Vertex[] => [
            [0, 20],
            [90 / rate, 110],
            [260, 110],
          ];
          const run: MadeRun = { cycle: HOUR, channels: { TC1: line(rate1), TC2: line(rate2) }, every: 0.5 };
          const opens = 85 / Math.min(rate1, rate2);
          const now = Math.ceil(opens) + later;
          const told = minutesTo(at(now, run).forecast.dwell?.notBefore)!;
          expect(at(Math.ceil(told * 2) / 2, run).outcome).toBe('met');
          expect(at(Math.ceil(told * 2) / 2 - 0.5, run).outcome).toBe(
            told === Math.ceil(told * 2) / 2 - 0.5 ? 'met' : 'pending',
          );
        },
      ),
      { numRuns: 30 },
    );
  });
});

function exclusion(channel: string) {
  return { channel, from: '2026-03-02T08:00:00Z', reason: 'stuck', by: 'inspector 2' };
}
