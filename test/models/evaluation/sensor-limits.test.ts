import { describe, expect, it } from 'vitest';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dwell,
  excluded,
  findingOf,
  type MadeRun,
  minutesTo,
  part,
  pressure,
  QUICK,
  SLOW,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, The other limits, and What is missing).
// A gap here is over 5 min: 5 intervals of 1 min. The dwell closes at 202.5 min.

const silent = (from: number, until: number) => part(QUICK, { absent: [[from, until]] });
const run = (channels: MadeRun['channels'], more: Partial<Cycle>, others: Partial<MadeRun> = {}): MadeRun => ({
  channels,
  cycle: cycleOf([dwell()], more),
  ...others,
});

describe('sensors/working', () => {
  const least = (third: MadeRun['channels'][string], others: Partial<MadeRun> = {}) =>
    findingOf(
      run({ TC1: QUICK, TC2: QUICK, TC3: third }, { sensors: { workingAtLeast: 3 } }, others),
      'sensors/working',
    )!;

  it.each([
    ['working all through', QUICK, {}, 3],
    ['silent for 10 min', silent(120, 130), {}, 2],
    ['silent for 5 min, which is no gap', silent(120, 125), {}, 3],
    ['excluded in the dwell', QUICK, { exclusions: [excluded('TC3', 150)] }, 2],
    ['excluded after the dwell closed', QUICK, { exclusions: [excluded('TC3', 210)] }, 3],
    ['silent after the dwell closed', silent(210, 230), {}, 3],
    ['silent while the recorder was', QUICK, { silent: [[120, 140]] }, 3],
  ] as const)('of three, the third %s', (_, third, others, count) => {
    expect(least(third, others)).toMatchObject({ outcome: count === 3 ? 'met' : 'not-met', observed: count });
  });

  it('begins at heat-on: silent before it, from 2 to 18 min, costs nothing', () => {
    const late: Vertex[] = [
      [0, 20],
      [20, 20],
      [100, 180],
      [200, 180],
      [280, 20],
    ];
    const channels = { TC1: late, TC2: late, TC3: part(late, { absent: [[2, 18]] }) };
    const finding = findingOf(run(channels, { sensors: { workingAtLeast: 3 } }), 'sensors/working')!;
    expect(finding).toMatchObject({ outcome: 'met', observed: 3 });
    expect(minutesTo(finding.from)).toBe(22.5);
  });

  it('is the least at any instant: two lost one after the other leave two, at once one', () => {
    const of = (second: MadeRun['channels'][string], third: MadeRun['channels'][string]) =>
      findingOf(run({ TC1: QUICK, TC2: second, TC3: third }, { sensors: { workingAtLeast: 2 } }), 'sensors/working')!;
    expect(of(silent(120, 130), silent(130, 140))).toMatchObject({ outcome: 'met', observed: 2 });
    expect(of(silent(120, 130), silent(128, 140))).toMatchObject({ outcome: 'not-met', observed: 1 });
  });

  it('is pending while the dwell goes on, unless too few worked already', () => {
    const open = (third: MadeRun['channels'][string]) =>
      least(third, { open: true, channels: { TC1: QUICK.slice(0, 3), TC2: QUICK.slice(0, 3), TC3: third } }).outcome;
    expect(open(QUICK.slice(0, 3))).toBe('pending');
    expect(open(part(QUICK.slice(0, 3), { absent: [[120, 130]] }))).toBe('not-met');
  });
});

describe('sensors/own', () => {
  const load = {
    parts: [{ part: 'A' }, { part: 'B' }],
    sensors: [{ channel: 'TC1', parts: ['A'] }, { channel: 'TC2' }],
  };
  const own = (partName: string) =>
    findingOf(run({ TC1: QUICK, TC2: SLOW }, { sensors: { own: true } }, { load }), 'sensors/own', partName)!;

  it('is met by a part with a thermocouple of its own, and names it', () => {
    expect(own('A')).toMatchObject({ outcome: 'met', because: 'The part is judged by sensors of its own: TC1.' });
  });

  it('is broken by a part that is judged by all of the load', () => {
    expect(own('B')).toMatchObject({ outcome: 'not-met' });
    expect(own('B').because).toContain('TC1, TC2');
  });
});

describe('sensors/must-work', () => {
  const load = {
    parts: [{ part: 'A' }],
    sensors: [
      { channel: 'TC1', parts: ['A'], place: 'edge' },
      { channel: 'TC2', parts: ['A'], place: 'lag' },
    ],
  };
  const mustWork = (second: MadeRun['channels'][string], others: Partial<MadeRun> = {}, place = 'lag') =>
    findingOf(
      run({ TC1: QUICK, TC2: second }, { sensors: { mustWork: [place] } }, { load, ...others }),
      'sensors/must-work',
    )!;

  it('is met where the sensor there worked to the last closing', () => {
    expect(mustWork(SLOW)).toMatchObject({ outcome: 'met', because: 'The sensor at lag worked.' });
    expect(mustWork(SLOW, { exclusions: [excluded('TC2', 210)] }).outcome).toBe('met');
  });

  it('is broken by a silence of 10 min, and by an exclusion before that', () => {
    expect(mustWork(silent(120, 130)).outcome).toBe('not-met');
    expect(mustWork(SLOW, { exclusions: [excluded('TC2', 150)] }).outcome).toBe('not-met');
  });

  it('says when the excluded sensor had been the lagging one, and not when it had not', () => {
    expect(mustWork(SLOW, { exclusions: [excluded('TC2', 60)] }).because).toContain('which had been the lagging one');
    const leading = mustWork(SLOW, { exclusions: [excluded('TC1', 60)] }, 'edge');
    expect(leading.outcome).toBe('not-met');
    expect(leading.because).not.toContain('lagging');
  });

  it('cannot be told where no sensor is recorded at that place', () => {
    expect(mustWork(SLOW, {}, 'core')).toMatchObject({ outcome: 'cannot-tell' });
    expect(mustWork(SLOW, {}, 'core').because).toContain('core');
  });
});

describe('log/gap', () => {
  const gap = (channels: MadeRun['channels'], others: Partial<MadeRun> = {}, more: Partial<Cycle> = {}) =>
    findingOf(run(channels, { log: { longestGap: 8 }, ...more }, others), 'log/gap');

  it('is a finding only where the cycle writes how long', () => {
    expect(findingOf(run({ TC1: silent(120, 130) }, {}), 'log/gap')).toBeUndefined();
    expect(findingOf(run({ TC1: silent(120, 130) }, { log: { changesAtMost: 20 } }), 'log/gap')).toBeUndefined();
  });

  it.each([
    [8, 'met', null],
    [9, 'cannot-tell', 9],
  ] as const)('of at most 8 min: silent for %d min is %s', (minutes, outcome, observed) => {
    expect(gap({ TC1: silent(120, 120 + minutes) })).toMatchObject({ outcome, observed, atMost: 8, unit: 'min' });
  });

  it.each([
    [
      'before heat-on',
      [
        [0, 20],
        [20, 20],
        [100, 180],
        [200, 180],
        [280, 20],
      ],
      [2, 18],
    ],
    ['after the last stage', QUICK, [210, 230]],
  ] as const)('looks at no silence %s', (_, history, absent) => {
    expect(gap({ TC1: part(history, { absent: [absent] }) })!.outcome).toBe('met');
  });

  it('looks at the channels a limit uses: pressure only where there is a window', () => {
    const channels = { TC1: QUICK, P: pressure([[280, 7]], { absent: [[120, 130]] }) };
    const windows = [
      { name: 'w', quantity: 'pressure', atLeast: 6, from: { at: 'start' }, until: { at: 'end' } },
    ] as const;
    expect(gap(channels)!.outcome).toBe('met');
    expect(gap(channels, {}, { windows })).toMatchObject({ outcome: 'cannot-tell', sensor: 'P' });
  });

  it('ends at the end of the last window: a silence after it is nobody’s', () => {
    const windows = (until: number) =>
      [
        {
          name: 'w',
          quantity: 'pressure',
          atLeast: 6,
          from: { at: 'start' },
          until: { at: 'first-cools-to', value: until },
        },
      ] as const;
    const channels = { TC1: QUICK, P: pressure([[280, 7]], { absent: [[230, 250]] }) };
    expect(gap(channels, {}, { windows: windows(140) })!.outcome).toBe('met'); // 220 min
    expect(gap(channels, {}, { windows: windows(100) })!.outcome).toBe('cannot-tell'); // 240 min
  });

  it('ends with an exclusion: TC2 silent from 120 min on and excluded from there', () => {
    const channels = { TC1: QUICK, TC2: silent(120, 300) };
    expect(gap(channels)!.outcome).toBe('cannot-tell');
    expect(gap(channels, { exclusions: [excluded('TC2', 121)] })!.outcome).toBe('met');
  });
});
