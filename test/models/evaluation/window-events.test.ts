import { describe, expect, it } from 'vitest';
import type { CycleEvent, DwellStage, WindowLimit } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dwell,
  excluded,
  findingOf,
  type MadeRun,
  minutesTo,
  part,
  partOf,
  pressure,
  QUICK,
  SLOW,
  type Vertex,
  vacuum,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Events that bound a window).
// TC1: 20 + 2 t up to 180 °C at 80 min, down from 200 min. TC2: 20 + 1.6 t up to 100 min, down from 210 min.

const PRESSURE: Vertex[] = [
  [0, 0],
  [10, 0],
  [20, 7], // 0.7 bar/min: 3.5 bar at 15 min
  [220, 7],
  [230, 0], // 3.5 bar at 225 min
];
const VACUUM: Vertex[] = [
  [0, 0],
  [10, 0.8], // 0.4 bar at 5 min
  [240, 0.8],
  [250, 0], // 0.4 bar at 245 min
];

const windowOf = (from: CycleEvent, until: CycleEvent): WindowLimit => ({
  name: 'w',
  quantity: 'pressure',
  atMost: 10,
  from,
  until,
});

function runOf(from: CycleEvent, until: CycleEvent, more: Partial<MadeRun> = {}, stage: Partial<DwellStage> = {}) {
  return {
    channels: { TC1: QUICK, TC2: SLOW, P: pressure(PRESSURE), V: vacuum(VACUUM) },
    cycle: cycleOf([dwell(stage)], { windows: [windowOf(from, until)] }),
    ...more,
  } satisfies MadeRun;
}

const startOf = (event: CycleEvent, more: Partial<MadeRun> = {}) =>
  minutesTo(partOf(runOf(event, { at: 'end' }, more)).windows[0]!.from);

describe('events that bound a window', () => {
  it.each<[CycleEvent, number]>([
    [{ at: 'start' }, 0],
    [{ at: 'heat-on' }, 2.5], // TC1, the leading one, at 25 °C
    [{ at: 'first-reaches', value: 100 }, 40],
    [{ at: 'all-reach', value: 100 }, 50],
    [{ at: 'opens', stage: 'dwell' }, 96.875],
    [{ at: 'closes', stage: 'dwell' }, 202.5],
    [{ at: 'first-cools-to', value: 60 }, 260],
    [{ at: 'all-cool-to', value: 60 }, 270],
    [{ at: 'pressure-reaches', value: 3.5 }, 15],
    [{ at: 'pressure-falls-to', value: 3.5 }, 225],
    [{ at: 'vacuum-reaches', value: 0.4 }, 5],
    [{ at: 'vacuum-falls-to', value: 0.4 }, 245],
    [{ at: 'end' }, 290],
    [{ at: 'heat-on', plus: 10 }, 12.5],
    [{ at: 'opens', stage: 'dwell', plus: -6.875 }, 90],
  ])('%o happens at %d min', (event, minutes) => {
    expect(startOf(event)).toBe(minutes);
  });

  it('all-reach asks for all at once: TC1 is back at 90 °C when TC2 comes to 100 °C, so it is when TC1 is back too', () => {
    const back: Vertex[] = [
      [0, 20],
      [40, 100],
      [45, 90],
      [60, 90], // 100 °C again at 65 min
      [105, 180],
      [200, 180],
      [280, 20],
    ];
    expect(
      startOf({ at: 'all-reach', value: 100 }, { channels: { TC1: back, TC2: SLOW, P: pressure(PRESSURE) } }),
    ).toBe(65);
  });

  it('cooling is looked for after the last dwell closed, not on a dip before it', () => {
    const dipped: Vertex[] = [
      [0, 20],
      [80, 180],
      [100, 140],
      [120, 180],
      [200, 180],
      [280, 20],
    ];
    expect(startOf({ at: 'first-cools-to', value: 150 }, { channels: { TC1: dipped, P: pressure(PRESSURE) } })).toBe(
      215,
    );
  });

  it('cooling is looked for after the hottest reading where the dwell never opened: 160 °C at 70 min, 60 °C at 120', () => {
    const cold: Vertex[] = [
      [0, 20],
      [70, 160],
      [140, 20],
    ];
    expect(startOf({ at: 'all-cool-to', value: 60 }, { channels: { TC1: cold, P: pressure([[140, 1]]) } })).toBe(120);
  });

  it('falling to is only after having been above: what starts below never fell', () => {
    const never = { channels: { TC1: QUICK, P: pressure([[280, 1]]) } };
    const finding = findingOf(runOf({ at: 'pressure-falls-to', value: 3.5 }, { at: 'end' }, never), 'window/w')!;
    expect(finding.outcome).toBe('cannot-tell');
    expect(finding.because).toContain('3.5 bar');
  });

  it('of several channels is that of the last: the second vessel gauge reaches 3.5 bar at 25 min and falls at 235', () => {
    const late = PRESSURE.map(([at, bar]): Vertex => [at + 10, bar]);
    const more = { channels: { TC1: QUICK, P: pressure(PRESSURE), P2: pressure(late) } };
    expect(startOf({ at: 'pressure-reaches', value: 3.5 }, more)).toBe(25);
    expect(startOf({ at: 'pressure-falls-to', value: 3.5 }, more)).toBe(235);
  });

  it('an absolute vacuum is reached downwards: 600 mbar abs at 5 min, lost at 245 min', () => {
    const mbar = VACUUM.map(([at, bar]): Vertex => [at, 1000 - 1000 * bar]);
    const units = { temperature: '°C', pressure: 'bar', vacuum: 'mbar abs' } as const;
    const at = (event: CycleEvent) => {
      const cycle = cycleOf([dwell()], { units, windows: [windowOf(event, { at: 'end' })] });
      const channels = { TC1: QUICK, P: pressure(PRESSURE), V: vacuum(mbar, { unit: 'mbar abs' }) };
      return minutesTo(partOf({ channels, cycle }).windows[0]!.from);
    };
    expect(at({ at: 'vacuum-reaches', value: 600 })).toBe(5);
    expect(at({ at: 'vacuum-falls-to', value: 600 })).toBe(245);
  });

  it('an excluded sensor is waited for no longer: without TC2 all have reached 100 °C at 45 min, its exclusion', () => {
    expect(startOf({ at: 'all-reach', value: 100 }, { exclusions: [excluded('TC2', 45)] })).toBe(45);
  });
});

describe('an event that is not seen', () => {
  const stopped = { channels: { TC1: QUICK.slice(0, 3), P: pressure(PRESSURE.slice(0, 4)) } };

  it.each<[CycleEvent, string]>([
    [{ at: 'first-cools-to', value: 60 }, '60 °C'],
    [{ at: 'closes', stage: 'dwell' }, 'dwell'],
    [{ at: 'all-reach', value: 200 }, '200 °C'],
    [{ at: 'pressure-reaches', value: 8 }, '8 bar'],
    [{ at: 'opens', stage: 'dwell', plus: 500 }, '500 min after'],
  ])('%o opens no window: cannot tell, naming %s', (from, named) => {
    const finding = findingOf(runOf(from, { at: 'end' }, stopped), 'window/w')!;
    expect(finding).toMatchObject({ outcome: 'cannot-tell', observed: null });
    expect(finding.because).toContain(named);
    expect(findingOf(runOf(from, { at: 'end' }, { ...stopped, open: true }), 'window/w')!.outcome).toBe('pending');
  });

  it.each([
    [10, false, 'cannot-tell'],
    [10, true, 'pending'],
    [6, false, 'not-met'],
    [6, true, 'not-met'],
  ] as const)(
    'closes no window: at most %d bar where 7 were read is judged to the log’s end (--open: %s): %s',
    (...given) => {
      const [atMost, open, outcome] = given;
      const windows = [{ ...windowOf({ at: 'heat-on' }, { at: 'first-cools-to', value: 60 }), atMost }];
      const run = { ...runOf({ at: 'start' }, { at: 'end' }, stopped), cycle: cycleOf([dwell()], { windows }), open };
      expect(findingOf(run, 'window/w')!.outcome).toBe(outcome);
    },
  );

  it('for want of a channel is named: the log has no vacuum channel', () => {
    const finding = findingOf(runOf({ at: 'vacuum-reaches', value: 0.4 }, { at: 'end' }, stopped), 'window/w')!;
    expect(finding.outcome).toBe('cannot-tell');
    expect(finding.because).toContain('no vacuum channel');
  });

  it('because the window closes before it opens: cooling at 260 min, closing at 202.5 min', () => {
    const run = runOf({ at: 'first-cools-to', value: 60 }, { at: 'closes', stage: 'dwell' });
    const finding = findingOf(run, 'window/w')!;
    expect(finding.outcome).toBe('cannot-tell');
    expect(finding.because).toContain('before it opens');
  });

  it('holds no reading where the channel was silent all through', () => {
    const silent = { channels: { TC1: QUICK, P: pressure(PRESSURE, { absent: [[100, 150]] }) } };
    const run = runOf({ at: 'opens', stage: 'dwell', plus: 30 }, { at: 'opens', stage: 'dwell', plus: 60 }, silent);
    const finding = findingOf(run, 'window/w')!;
    expect(finding).toMatchObject({ outcome: 'cannot-tell', observed: null });
    expect(finding.because).toContain('no reading');
  });

  it('may lie in a gap: TC1 silent over 100 °C leaves a window from there open where the breach may lie outside', () => {
    // 90 °C at 35 min, 110 °C at 45 min; at 20 °C/min 100 °C no sooner than 35.5 min, and seen by 45 min.
    const channels = { TC1: part(QUICK, { absent: [[35, 45]] }), P: pressure([[280, 7]]) };
    const breach = (at: number) => ({
      ...channels,
      P: pressure([
        [at, 7],
        [at + 1, 11],
        [at + 2, 7],
        [280, 7],
      ]),
    });
    const at = (minute: number) =>
      findingOf(runOf({ at: 'first-reaches', value: 100 }, { at: 'end' }, { channels: breach(minute) }), 'window/w')!;
    expect(at(20).outcome).toBe('met');
    expect(at(38).outcome).toBe('cannot-tell');
    expect(at(50).outcome).toBe('not-met');
  });
});
