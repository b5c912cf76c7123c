import { describe, expect, it } from 'vitest';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dwell,
  excluded,
  findingOf,
  heldWith,
  type MadeRun,
  minutesTo,
  part,
  QUICK,
  SLOW,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, The other limits).

const run = (channels: MadeRun['channels'], more: Partial<Cycle>, others: Partial<MadeRun> = {}): MadeRun => ({
  channels,
  cycle: cycleOf([dwell()], more),
  ...others,
});

describe('ceiling', () => {
  it.each([
    [190, 'met', 0],
    [190.1, 'not-met', -0.1],
  ] as const)('of 190 °C with a highest reading of %d °C is %s', (peak, outcome, margin) => {
    const history = heldWith([120, 180], [121, peak], [122, 180]);
    const finding = findingOf(run({ TC1: QUICK, TC2: history }, { ceiling: 190 }), 'ceiling')!;
    expect(finding).toMatchObject({ outcome, observed: peak, atMost: 190, sensor: 'TC2', unit: '°C' });
    expect(finding.margin).toBeCloseTo(margin, 6);
    expect(minutesTo(finding.from)).toBe(121);
  });

  it('is looked at over the whole log: 191 °C before the dwell is over', () => {
    const early: Vertex[] = [
      [0, 191],
      [10, 20],
      [90, 180],
      [200, 180],
      [280, 20],
    ];
    expect(findingOf(run({ TC1: early }, { ceiling: 190 }), 'ceiling')!.outcome).toBe('not-met');
  });

  it('is pending while the run goes on, unless broken already', () => {
    const outcome = (ceiling: number) =>
      findingOf(run({ TC1: QUICK }, { ceiling }, { open: true }), 'ceiling')!.outcome;
    expect([outcome(190), outcome(179)]).toEqual(['pending', 'not-met']);
  });

  // Between two readings of 180 °C 10 min apart at 20 °C/min: 180 + 20 · 5 = 280 °C.
  it.each([
    [{}, 'cannot-tell'],
    [{ log: { changesAtMost: 2 } }, 'met'], // 190 °C
    [{ log: { changesAtMost: 2.1 } }, 'cannot-tell'], // 190.5 °C
  ] as const)('asks what a gap of 10 min may hide, with %o: %s', (more, outcome) => {
    const gapped = part(QUICK, { absent: [[120, 130]] });
    expect(findingOf(run({ TC1: gapped }, { ceiling: 190, ...more }), 'ceiling')!.outcome).toBe(outcome);
  });
});

describe('what a gap may hide', () => {
  // Read at 100 °C at 40 min and at 120 °C at 50 min; at 10 °C/min up to (100 + 120) / 2 + 10 · 5 = 160 °C, or down to
  // 60 °C, between.
  const history: Vertex[] = [
    [0, 20],
    [40, 100],
    [50, 120],
    [60, 120],
    [160, 20],
  ];
  const gapped = part(history, { absent: [[40, 50]] });
  const log = { changesAtMost: 10 };

  it.each([
    [160, 'met'],
    [159.9, 'cannot-tell'],
  ] as const)('reaches from both ends: a ceiling of %d °C is %s', (ceiling, outcome) => {
    const stages = [dwell({ target: 100 })];
    const asked = { channels: { TC1: gapped }, cycle: cycleOf(stages, { ceiling, log }) };
    expect(findingOf(asked, 'ceiling')!.outcome).toBe(outcome);
  });

  it.each([
    [60, 'met'],
    [45, 'cannot-tell'],
  ] as const)('parts it from a sensor that was read: at most %d °C apart is %s', (atMost, outcome) => {
    const channels = { TC1: history, TC2: gapped };
    expect(findingOf(run(channels, { spread: { atMost, during: 'run' }, log }), 'spread')!.outcome).toBe(outcome);
  });
});

describe('spread', () => {
  // While heating TC1 is 0.4 t ahead until 80 min: 32 °C. The dwell opens at 96.875 min, when TC2 is 5 °C behind:
  // 4.8 °C at the scan at 97 min, and 4 °C at 202 min, the last before it closes. In the cooling they are 20 °C apart.
  const two = { TC1: QUICK, TC2: SLOW };
  it.each([
    ['heating', undefined, 32, 80],
    ['dwells', undefined, 4.8, 97],
    ['dwells', 5, 4, 202],
    ['run', undefined, 32, 80],
  ] as const)('during %s, after %s min: %d °C at %d min', (during, after, observed, minute) => {
    const limit = (atMost: number) => ({ spread: { atMost, during, ...(after === undefined ? {} : { after }) } });
    const finding = findingOf(run(two, limit(observed)), 'spread')!;
    expect(finding).toMatchObject({ outcome: 'met', observed, margin: 0, unit: '°C' });
    expect(minutesTo(finding.from)).toBe(minute);
    expect(findingOf(run(two, limit(observed - 0.1)), 'spread')!.outcome).toBe('not-met');
  });

  it('over the run sees the cooling too: 20 °C apart from 210 min on', () => {
    const together = { TC1: QUICK, TC2: [...QUICK.slice(0, 2), [210, 180], [290, 20]] as Vertex[] };
    expect(findingOf(run(together, { spread: { atMost: 25, during: 'run' } }), 'spread')!.observed).toBe(20);
    expect(findingOf(run(together, { spread: { atMost: 25, during: 'heating' } }), 'spread')!.observed).toBe(0);
  });

  it('while heating is looked at between dwells too', () => {
    const ramp = (top: number): Vertex[] => [
      [0, 20],
      [45, 110],
      [105, 110],
      [top, 180],
      [260, 180],
      [340, 20],
    ];
    const cycle = cycleOf([dwell({ name: 'dwell 1', target: 110 }), { name: 'heat 2', kind: 'heat' }, dwell()], {
      spread: { atMost: 50, during: 'heating' },
    });
    // TC2 heats at 1.4 °C/min, TC1 at 2 °C/min from 105 min on: 0.6 · 35 = 21 °C at 140 min.
    const finding = findingOf({ channels: { TC1: ramp(140), TC2: ramp(155) }, cycle }, 'spread')!;
    expect(finding.observed).toBeCloseTo(21, 6);
    expect(minutesTo(finding.from)).toBe(140);
  });

  it('is of those that have a reading, and of those not excluded', () => {
    const limit = { spread: { atMost: 40, during: 'run' } } as const;
    const third: Vertex[] = [
      [0, 60],
      [60, 180],
      [200, 180],
      [290, 0],
    ];
    expect(findingOf(run({ ...two, TC3: third }, limit), 'spread')!.observed).toBe(64); // 180 − 116 °C at 60 min
    const without = findingOf(run({ ...two, TC3: third }, limit, { exclusions: [excluded('TC3', 0)] }), 'spread')!;
    expect(without.observed).toBe(32);
  });

  it('in the dwells is open where none is seen to open, and pending while the run goes on', () => {
    const stopped = { TC1: QUICK.slice(0, 3), TC2: QUICK.slice(0, 3) };
    const limit = { spread: { atMost: 40, during: 'dwells' } } as const;
    expect(findingOf(run(stopped, limit), 'spread')!.outcome).toBe('cannot-tell');
    expect(findingOf(run(stopped, limit, { open: true }), 'spread')!.outcome).toBe('pending');
  });

  // TC2 is silent for 10 min at 180 °C, beside TC1 at 180 °C: at 2 °C/min it may have been 10 °C away.
  it.each([
    [10, 'met'],
    [9.9, 'cannot-tell'],
  ] as const)('asks what a gap may hide: at most %d °C is %s', (atMost, outcome) => {
    const channels = { TC1: QUICK, TC2: part(QUICK, { absent: [[120, 130]] }) };
    const limits = { spread: { atMost, during: 'run' }, log: { changesAtMost: 2 } } as const;
    expect(findingOf(run(channels, limits), 'spread')!.outcome).toBe(outcome);
  });
});
