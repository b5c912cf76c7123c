import { describe, expect, it } from 'vitest';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dipTo,
  dwell,
  excluded,
  findingOf,
  heldWith,
  type MadeRun,
  part,
  partOf,
  pressure,
  QUICK,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§6, --open): a limit whose stretch has not ended and that is
// not yet broken for good is pending. The log stops at 150 min, 72.5 min into the dwell.

const until = (history: readonly Vertex[]): Vertex[] => [...history.filter(([at]) => at < 150), [150, 180]];
const STAGES = [
  { name: 'heat', kind: 'heat', rate: { atLeast: 1, atMost: 3, over: [50, 100], average: 'chord', of: 'every' } },
  dwell({
    time: { atLeast: 120 },
    below: 'not-allowed',
    longest: { atMost: 140, clock: { opens: 'leading-enters', closes: 'last-leaves' } },
  }),
  { name: 'cool', kind: 'cool', rate: { atMost: 3, over: [170, 70], average: 'chord', of: 'every' }, until: 60 },
] as const;
const LIMITS: Partial<Cycle> = {
  ceiling: 190,
  spread: { atMost: 10, during: 'dwells' },
  sensors: { workingAtLeast: 2, mustWork: ['lag'] },
  log: { longestGap: 8 },
  windows: [
    { name: 'gas', quantity: 'pressure', atLeast: 6, from: { at: 'heat-on' }, until: { at: 'all-cool-to', value: 60 } },
    { name: 'done', quantity: 'pressure', atLeast: 6, from: { at: 'heat-on' }, until: { at: 'opens', stage: 'dwell' } },
  ],
};

function going(first: MadeRun['channels'][string], more: Partial<MadeRun> = {}): MadeRun {
  return {
    channels: { TC1: first, TC2: until(QUICK), P: pressure([[150, 7]]) },
    cycle: cycleOf(STAGES, LIMITS),
    load: { parts: [], sensors: [{ channel: 'TC1', place: 'lag' }] },
    open: true,
    ...more,
  };
}

describe('a run that goes on', () => {
  const sound = going(until(QUICK));

  it.each([
    'dwell/time',
    'dwell/longest',
    'dwell/upper',
    'dwell/lower',
    'cool/fastest',
    'window/gas',
    'ceiling',
    'spread',
    'sensors/working',
    'sensors/must-work',
    'log/gap',
  ])('leaves %s pending, which without --open nobody could tell or had ended with the log', (limit) => {
    expect(findingOf(sound, limit)!.outcome).toBe('pending');
    expect(findingOf({ ...sound, open: false }, limit)!.outcome).not.toBe('pending');
  });

  it.each(['heat/slowest', 'heat/fastest', 'window/done'])('has %s behind it', (limit) => {
    expect(findingOf(sound, limit)!.outcome).toBe('met');
  });

  it('is pending as a whole, until something is broken for good', () => {
    expect(partOf(sound).verdict).toBe('pending');
    expect(partOf(going(until(heldWith(...dipTo(172, 120))))).verdict).toBe('does-not-conform');
  });

  it.each<[string, MadeRun]>([
    ['dwell/upper', going(until(heldWith(...dipTo(188, 120))))],
    ['dwell/lower', going(until(heldWith(...dipTo(172, 120))))],
    ['ceiling', going(until(heldWith(...dipTo(192, 120))))],
    ['spread', going(until(heldWith(...dipTo(168, 120))))],
    [
      'window/gas',
      {
        ...going(until(QUICK)),
        channels: {
          ...sound.channels,
          P: pressure([
            [100, 7],
            [105, 5],
            [150, 7],
          ]),
        },
      },
    ],
    ['sensors/working', going(part(until(QUICK), { absent: [[100, 120]] }))],
    ['sensors/must-work', going(until(QUICK), { exclusions: [excluded('TC1', 120)] })],
  ])('has %s broken for good', (limit, run) => {
    expect(findingOf(run, limit)!.outcome).toBe('not-met');
  });
});
