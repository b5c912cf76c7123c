import { describe, expect, it } from 'vitest';
import { sayBeside } from '../../../models/evaluation/finding.ts';
import {
  cycleOf,
  dipTo,
  dwell,
  findingOf,
  heldWith,
  type MadeRun,
  part,
  partOf,
  pressure,
  QUICK,
  SLOW,
} from '../../support/made-run.ts';

// One sentence a workshop would understand: figures with their unit once, who, and what was asked.

const cycle = cycleOf(
  [
    {
      name: 'heat',
      kind: 'heat',
      rate: { atLeast: 1, atMost: 3, over: [50, 100], average: 'window', window: 10, of: 'every' },
    },
    dwell({
      below: 'not-allowed',
      longest: { atMost: 130, clock: { opens: 'leading-enters', closes: 'last-leaves' } },
    }),
  ],
  {
    ceiling: 190,
    spread: { atMost: 40, during: 'heating' },
    sensors: { workingAtLeast: 2, own: true, mustWork: ['lag'] },
    log: { longestGap: 8 },
    windows: [
      {
        name: 'gas',
        quantity: 'pressure',
        atLeast: 6.5,
        atMost: 7.5,
        from: { at: 'all-reach', value: 100 },
        until: { at: 'all-cool-to', value: 60 },
      },
    ],
  },
);
const run: MadeRun = {
  channels: { TC1: heldWith(...dipTo(172, 120)), TC2: SLOW, P: pressure([[290, 7]]) },
  cycle,
  load: {
    parts: [{ part: 'A' }],
    sensors: [
      { channel: 'TC1', parts: ['A'] },
      { channel: 'TC2', parts: ['A'], place: 'lag' },
    ],
  },
};

describe('the sentence of a finding', () => {
  it.each([
    ['heat/slowest', 'TC2 was slowest with 1.6 °C/min over 10 min from 50 to 100 °C; at least 1 °C/min asked.'],
    ['heat/fastest', 'TC1 was fastest with 2 °C/min over 10 min from 50 to 100 °C; at most 3 °C/min allowed.'],
    [
      'dwell/time',
      '77 min unbroken (one dip stopped the clock), between TC2 coming in and TC1 leaving; at least 120 min asked.',
    ],
    ['dwell/longest', '135 min from opening to closing (opened by TC1, closed by TC2); at most 130 min allowed.'],
    ['dwell/upper', 'TC1 reached 180 °C; at most 185 °C allowed.'],
    ['dwell/lower', 'TC1 fell 3 °C below 175 °C; no dip is allowed.'],
    [
      'window/gas',
      'P read 7 bar at its nearest to the limit; 6.5 to 7.5 bar asked from when all judged sensors are at 100 °C or above until all judged sensors have cooled to 60 °C.',
    ],
    ['ceiling', 'TC1 was hottest with 180 °C; at most 190 °C allowed.'],
    ['spread', 'Hottest and coldest sensor were 32 °C apart at most while heating; at most 40 °C allowed.'],
    ['sensors/working', 'Both judged sensors worked from heat-on to the end of the last dwell; at least 2 asked.'],
    ['sensors/own', 'The part is judged by sensors of its own: TC1, TC2.'],
    ['sensors/must-work', 'The sensor at lag worked.'],
    [
      'log/gap',
      'No channel that a limit uses was silent for more than 8 min between heat-on and the end of the cycle.',
    ],
  ])('%s', (limit, because) => {
    expect(findingOf(run, limit)!.because).toBe(because);
  });

  it('is one sentence, with no unit twice and no empty words', () => {
    for (const { because } of partOf(run).findings) {
      expect(because).toMatch(/^[^.]([^.]|\.\d)*\.$/);
      expect(because).not.toMatch(/ {2}|°C °C|bar bar|min min|undefined|null|NaN/);
    }
  });

  it('says what keeps it open: the run, the log’s end, a gap, or the uncertainty of the reading', () => {
    const ceiling = (more: Partial<MadeRun>, guard = false) => {
      const limits = { ceiling: 181, ...(guard ? { decision: { rule: 'guarded' } as const } : {}) };
      return findingOf({ channels: { TC1: QUICK }, cycle: cycleOf([dwell()], limits), ...more }, 'ceiling')!.because;
    };
    const asked = 'TC1 was hottest with 180 °C; at most 181 °C allowed';
    expect(ceiling({ open: true })).toBe(`${asked}; the run goes on.`);
    expect(ceiling({ channels: { TC1: part(QUICK, { absent: [[120, 130]] }) } })).toBe(
      `${asked}; a gap may hide more.`,
    );
    expect(ceiling({ channels: { TC1: part(QUICK, { uncertainty: 2 }) } }, true)).toBe(
      `${asked}; the uncertainty of the reading leaves it open.`,
    );
    const stopped = { channels: { TC1: QUICK.slice(0, 3) }, cycle };
    expect(findingOf(stopped, 'dwell/upper')!.because).toBe(
      'TC1 reached 180 °C; at most 185 °C allowed; the log stops before it is over.',
    );
  });

  it('shows as many decimals as tell a figure from its limit, and a true minus sign', () => {
    expect(sayBeside(119.96, { atLeast: 120 })).toBe('119.96');
    expect(sayBeside(120.0000001, { atLeast: 120 })).toBe('120');
    expect(sayBeside(6.4998, { atLeast: 6.5 }, 3)).toBe('6.4998');
    expect(sayBeside(-3.25, { atMost: 3 })).toBe('−3.3');
  });
});
