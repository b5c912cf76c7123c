import { describe, expect, it } from 'vitest';
import type { Resin } from '../../../models/cure/resin.ts';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dwell,
  excluded,
  findingOf,
  instantAt,
  judged,
  type MadeChannel,
  type MadeRun,
  part,
  partOf,
  pressure,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Cure estimates). The resin is of first order and half
// cured in 60 min at 180 °C: held there from the start, its degree after t min is 1 − 2^(−t/60) (closed form of
// dα/dt = k (1 − α)), and its gel, at a degree of 0.5, comes at 60 min.

const R = 8.314462618;
const E = 60_000;
const HALVING: Resin = {
  format: 'dwellbook-resin/1',
  code: 'halving',
  name: 'First order, halving in an hour at 180 °C',
  source: { citation: 'closed form', status: 'illustrative' },
  initialDegree: 0,
  gasConstant: R,
  kinetics: { law: 'nth-order', A: (Math.LN2 / 3600) * Math.exp(E / (R * 453.15)), E, n: 1 },
  glassTransition: { law: 'dibenedetto', tg0C: 0, tgInfC: 200, lambda: 1 }, // a straight line: 200 α °C
  gel: { degree: 0.5 },
};

const held = (minutes: number): Vertex[] => [
  [0, 180],
  [minutes, 180],
];
/** Cold at once after 120 min, so that the record shows that no more cure comes. */
const COOLED: Vertex[] = [
  [0, 180],
  [120, 180],
  [120.5, 20],
  [150, 20],
];

function runOf(
  first: Vertex[] | MadeChannel,
  cure: Partial<NonNullable<Cycle['cure']>>,
  more: Partial<MadeRun> = {},
): MadeRun {
  const cycle = cycleOf([dwell()], { cure: { resin: 'halving', ...cure } });
  return { channels: { TC1: first }, cycle, resin: HALVING, every: 0.5, ...more };
}

describe('cure/degree', () => {
  const degree = (degreeAtLeast: number, more: Partial<MadeRun> = {}, first: Vertex[] | MadeChannel = held(120)) =>
    findingOf(runOf(first, { degreeAtLeast }, more), 'cure/degree')!;

  it('after 120 min at 180 °C is 1 − 1/4', () => {
    const finding = degree(0.7);
    expect(finding).toMatchObject({ outcome: 'met', sensor: 'TC1', atLeast: 0.7 });
    expect(finding.observed).toBeCloseTo(0.75, 6);
    expect(finding.margin).toBeCloseTo(0.05, 6);
  });

  it('names the set and its source, and that it is illustrative', () => {
    expect(degree(0.7).because).toContain('estimate by the set halving, closed form (illustrative)');
  });

  it('too little is not met once the record shows the cooling; before that more may come', () => {
    expect(degree(0.9, {}, COOLED).outcome).toBe('not-met');
    expect(degree(0.9).outcome).toBe('cannot-tell');
    expect(degree(0.9, { open: true }).outcome).toBe('pending');
    expect(degree(0.9, { open: true }, COOLED).outcome).toBe('pending');
  });

  it('is the least over the judged sensors: one colder sensor decides', () => {
    const channels = {
      TC1: held(120),
      TC2: [
        [0, 170],
        [120, 170],
      ] as Vertex[],
    };
    const k = 2 ** -(2 * Math.exp((E / R) * (1 / 453.15 - 1 / 443.15)));
    expect(degree(0.7, { channels })).toMatchObject({ outcome: 'cannot-tell', sensor: 'TC2' });
    expect(degree(0.7, { channels }).observed).toBeCloseTo(1 - k, 6);
  });

  it('leaves out a sensor that was excluded, and cannot tell where none is left', () => {
    const channels = {
      TC1: held(120),
      TC2: [
        [0, 100],
        [120, 100],
      ] as Vertex[],
    };
    const without = (...names: string[]) => ({ channels, exclusions: names.map((name) => excluded(name, 110)) });
    expect(degree(0.7, without('TC2'))).toMatchObject({ outcome: 'met', sensor: 'TC1' });
    expect(degree(0.7, without('TC1', 'TC2'))).toMatchObject({ outcome: 'cannot-tell', observed: null });
  });

  it('starts from the part’s own degree where its roll had aged: 1 − (1 − 0.2)/4 = 0.8', () => {
    const load = { parts: [{ part: 'A', startDegree: 0.2 }], sensors: [] };
    expect(degree(0.7, { load }).observed).toBeCloseTo(0.8, 6);
  });

  it('cannot be told without a resin set', () => {
    const { resin: _, ...without } = runOf(held(120), { degreeAtLeast: 0.7 });
    expect(findingOf(without, 'cure/degree')).toMatchObject({
      outcome: 'cannot-tell',
      because: 'No resin set was given; at least 0.7 asked.',
    });
  });

  it('refuses a set other than the cycle’s', () => {
    const other = { ...runOf(held(120), { degreeAtLeast: 0.7 }), resin: { ...HALVING, code: 'other' } };
    expect(() => judged(other)).toThrow(expect.objectContaining({ code: 'resin-not-the-cycles' }));
  });

  // Silent from 60 to 80 min between readings of 180 °C: 100 min of it are seen, which alone make 0.685.
  it.each([
    [0.68, 20, 'met'],
    [0.75, 20, 'cannot-tell'],
    [0.99, 20, 'cannot-tell'], // up to 380 °C in the middle of it
    [0.76, 0.1, 'not-met'], // 1 °C at most
    [0.74, 0.1, 'met'],
  ] as const)('of %d asked over a gap at %d °C/min at most is %s', (degreeAtLeast, changesAtMost, outcome) => {
    const gapped = part(COOLED, { absent: [[60, 80]] });
    const cycle = cycleOf([dwell()], { cure: { resin: 'halving', degreeAtLeast }, log: { changesAtMost } });
    expect(findingOf({ ...runOf(gapped, {}), cycle }, 'cure/degree')!.outcome).toBe(outcome);
  });

  it('of a sensor first read at 30 min: what came before bounds nothing upwards, 90 min are sure', () => {
    const late = { channels: { TC1: part(held(120), { absent: [[-1, 30]] }), TC2: part(held(120)) } };
    expect(degree(0.64, late).outcome).toBe('met'); // 1 − 2^(−1.5) = 0.646
    expect(degree(0.66, late)).toMatchObject({ outcome: 'cannot-tell', possible: null });
  });
});

describe('cure/tg', () => {
  it('is that of the least cured: 200 °C · 0.75 = 150 °C', () => {
    const finding = findingOf(runOf(held(120), { tgAtLeast: 140 }), 'cure/tg')!;
    expect(finding).toMatchObject({ outcome: 'met', unit: '°C', sensor: 'TC1' });
    expect(finding.observed).toBeCloseTo(150, 4);
  });

  it('cannot be told by a set without a glass transition', () => {
    const { glassTransition: _, ...without } = HALVING;
    const finding = findingOf({ ...runOf(held(120), { tgAtLeast: 140 }), resin: without }, 'cure/tg')!;
    expect(finding).toMatchObject({ outcome: 'cannot-tell', observed: null });
    expect(finding.because).toContain('gives no glass transition');
  });
});

describe('cure/pressure-before-gel, with gel at 60 min', () => {
  const pressureLimit = (channels: MadeRun['channels'], more: Partial<MadeRun> = {}) =>
    findingOf(runOf(held(120), { pressureBeforeGel: 5 }, { channels, ...more }), 'cure/pressure-before-gel')!;
  const withP = (history: Vertex[], channel: Partial<MadeChannel> = {}) =>
    pressureLimit({ TC1: held(120), P: pressure(history, channel) });

  it.each([
    [
      '5 bar from 20 min on',
      [
        [0, 0],
        [20, 5],
        [120, 5],
      ],
      'met',
    ],
    [
      '5 bar only at 61 min',
      [
        [0, 0],
        [61, 5],
        [120, 5],
      ],
      'not-met',
    ],
    [
      '5 bar from 20 min, and down to 4 before gel',
      [
        [0, 0],
        [20, 5],
        [40, 4],
        [50, 6],
        [120, 6],
      ],
      'not-met',
    ],
    [
      '5 bar from 20 min, and down after gel',
      [
        [0, 0],
        [20, 5],
        [61, 5],
        [70, 0],
        [120, 0],
      ],
      'met',
    ],
    [
      'never more than 4 bar',
      [
        [0, 0],
        [20, 4],
        [120, 4],
      ],
      'not-met',
    ],
  ] as const)('%s is %s', (_, history, outcome) => {
    expect(withP(history as unknown as Vertex[]).outcome).toBe(outcome);
  });

  it('is open where a gap lies between reaching and gel', () => {
    expect(
      withP(
        [
          [0, 0],
          [20, 5],
          [120, 5],
        ],
        { absent: [[30, 40]] },
      ).outcome,
    ).toBe('cannot-tell');
    expect(
      withP(
        [
          [0, 0],
          [20, 5],
          [120, 5],
        ],
        { absent: [[70, 80]] },
      ).outcome,
    ).toBe('met');
  });

  it('is open where nothing gelled by the end, and pending while the run goes on', () => {
    const short = {
      TC1: held(50),
      P: pressure([
        [0, 5],
        [50, 5],
      ]),
    };
    expect(pressureLimit(short)).toMatchObject({ outcome: 'cannot-tell' });
    expect(pressureLimit(short, { open: true })).toMatchObject({ outcome: 'pending' });
  });

  it('without a pressure channel cannot be told', () => {
    expect(pressureLimit({ TC1: held(120) }).because).toContain('no pressure channel');
  });
});

describe('gel as an event', () => {
  it('is the earliest of the judged sensors: 60 min at 180 °C, whatever a colder one does', () => {
    const windows = [
      { name: 'w', quantity: 'pressure', atLeast: 4, from: { at: 'gel' }, until: { at: 'end' } },
    ] as const;
    const channels = {
      TC1: held(120),
      TC2: [
        [0, 100],
        [120, 100],
      ] as Vertex[],
      P: pressure([
        [0, 5],
        [120, 5],
      ]),
    };
    const run = { channels, cycle: cycleOf([dwell()], { windows }), resin: HALVING };
    expect(partOf(run).windows[0]!.from).toBe(instantAt(60));
    const { resin: _, ...without } = run;
    expect(findingOf(without, 'window/w')).toMatchObject({ outcome: 'cannot-tell' });
  });
});

describe('the verdict without estimates', () => {
  it('is shown beside the one with them', () => {
    const held300: Vertex[] = [...COOLED];
    const run = {
      ...runOf(held300, { degreeAtLeast: 0.9 }),
      cycle: cycleOf([dwell({ time: { atLeast: 60 } })], { cure: { resin: 'halving', degreeAtLeast: 0.9 } }),
    };
    expect(partOf(run)).toMatchObject({ verdict: 'does-not-conform', withoutEstimates: 'conforms' });
  });

  it('has the estimates of every sensor in the record, limits or not', () => {
    const [estimate] = partOf({ channels: { TC1: held(120) }, cycle: cycleOf([dwell()]), resin: HALVING }).cure;
    expect(estimate).toMatchObject({ channel: 'TC1', gelAt: instantAt(60) });
    expect(estimate!.degree).toBeCloseTo(0.75, 6);
    expect(estimate!.tgC).toBeCloseTo(150, 4);
  });
});
