import { describe, expect, it } from 'vitest';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dwell,
  excluded,
  findingOf,
  judged,
  type MadeRun,
  part,
  partOf,
  QUICK,
  type Vertex,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Sensors that lie). The sensors of these runs read as
// others do but for a moment, so that nothing besides what is said is suspected.

/** As `QUICK`, with three steps of over 10 °C that its neighbours do not make, to a peak at 150 min. */
const jumping = (peak: number): Vertex[] => [
  ...QUICK.slice(0, 2),
  [119, 180],
  [120, 192],
  [121, 180],
  [149, 180],
  [150, peak],
  [151, 180],
  ...QUICK.slice(2),
];

function runOf(channels: MadeRun['channels'], more: Partial<Cycle> = {}, believed: string[] = []): MadeRun {
  return { channels, cycle: cycleOf([dwell()], { ceiling: 200, ...more }), believed };
}

describe('one suspect', () => {
  const channels = { TC1: QUICK, TC2: QUICK, TC3: jumping(205) };

  it('leaves open what differs with and without it, and what does not stays', () => {
    const { findings, verdict } = partOf(runOf(channels));
    expect(findings.find(({ limit }) => limit === 'ceiling')).toMatchObject({
      outcome: 'cannot-tell',
      observed: 205,
      awaits: 'TC3',
    });
    expect(findings.find(({ limit }) => limit === 'dwell/time')).toMatchObject({ outcome: 'met', observed: 125 });
    expect(verdict).toBe('cannot-tell');
  });

  it('is one open decision, with its kind and the limits that hang on it', () => {
    const { decisions, sensors } = judged(runOf(channels));
    expect(decisions).toMatchObject([{ channel: 'TC3', kind: 'jumping', changes: ['dwell/upper', 'ceiling'] }]);
    expect(sensors.map(({ channel, state }) => [channel, state])).toEqual([
      ['TC1', 'working'],
      ['TC2', 'working'],
      ['TC3', 'suspect'],
    ]);
  });

  it('says how it comes out either way', () => {
    expect(findingOf(runOf(channels), 'ceiling')!.because).toMatch(
      /^It hangs on whether TC3 is believed: with, it is not met \(205 °C\); without, met \((19\d(\.\d+)?|180) °C\)\.$/,
    );
  });

  it('that a person believes is judged as it reads, and no decision is open', () => {
    const believed = runOf(channels, {}, ['TC3']);
    expect(findingOf(believed, 'ceiling')).toMatchObject({ outcome: 'not-met', observed: 205 });
    expect(judged(believed)).toMatchObject({ decisions: [], verdict: 'does-not-conform' });
  });

  it('that a person excluded is no suspect any more', () => {
    const decided = { ...runOf(channels), exclusions: [excluded('TC3', 119)] };
    expect(findingOf(decided, 'ceiling')).toMatchObject({ outcome: 'met', observed: 180 });
    const { sensors, decisions } = judged(decided);
    expect(decisions).toEqual([]);
    expect(sensors[2]).toMatchObject({ state: 'excluded', exclusion: { by: 'inspector 2', reason: 'lead crushed' } });
    expect(sensors[2]!.faults).toMatchObject([{ kind: 'jumping' }]);
  });

  it('changes no breach that an unsuspected sensor shows too', () => {
    const hot = [...QUICK.slice(0, 2), [160, 180], [165, 201], [170, 180], ...QUICK.slice(2)] as Vertex[];
    const run = runOf({ TC1: hot, TC2: QUICK, TC3: jumping(205) });
    expect(findingOf(run, 'ceiling')).toMatchObject({ outcome: 'not-met', observed: 205 });
  });

  it('on which nothing hangs opens no decision: 195 °C under a ceiling of 200 °C, without an upper limit', () => {
    const run = { ...runOf({ TC1: QUICK, TC2: QUICK, TC3: jumping(195) }), cycle: cycleOf([dwell({ plus: 20 })]) };
    const evaluation = judged(run);
    expect(evaluation.sensors[2]!.state).toBe('suspect');
    expect(evaluation).toMatchObject({ decisions: [], verdict: 'conforms' });
  });

  it('without whom no sensor would be left: what would have held cannot be told', () => {
    const load = {
      parts: [{ part: 'A' }],
      sensors: [{ channel: 'TC1' }, { channel: 'TC2' }, { channel: 'TC3', parts: ['A'] }],
    };
    const run = { ...runOf({ TC1: QUICK, TC2: QUICK, TC3: jumping(195) }, { ceiling: 200 }), load };
    expect(findingOf(run, 'ceiling', 'A')).toMatchObject({ outcome: 'cannot-tell', awaits: 'TC3' });
  });
});

describe('a fault holds from its first instant', () => {
  it('jumping from the first step: 203 °C at 110 min, before it, is believed either way', () => {
    const early = [...QUICK.slice(0, 2), [109.5, 180], [110, 203], [111, 203], [112, 180], ...jumping(190).slice(2)];
    const run = runOf({ TC1: early.slice(0, 6).concat(QUICK.slice(2)) as Vertex[], TC2: QUICK, TC3: QUICK });
    expect(findingOf(run, 'ceiling')!.outcome).toBe('not-met');
  });

  it('open from its first absent scan: 203 °C read before it counts, and so the ceiling is broken', () => {
    const history = [...QUICK.slice(0, 2), [98, 180], [103, 203], [108, 180], ...QUICK.slice(2)] as Vertex[];
    const run = runOf({ TC1: QUICK, TC2: QUICK, TC3: part(history, { absent: [[150, 160]] }) });
    expect(findingOf(run, 'ceiling')!.outcome).toBe('not-met');
  });
});

describe('several suspects', () => {
  const sensors = (peaks: readonly number[]) =>
    Object.fromEntries([
      ...Array.from({ length: 7 }, (_, i) => [`OK${i + 1}`, QUICK]),
      ...peaks.map((peak, i) => [`TC${i + 1}`, jumping(peak)]),
    ]);

  it('two that both break it: only without both would it hold, so both decisions are open', () => {
    const run = runOf(sensors([205, 206]));
    expect(findingOf(run, 'ceiling')!.because).toMatch(/^It hangs on whether TC1 and TC2 are believed: /);
    expect(judged(run).decisions.map(({ channel }) => channel)).toEqual(['TC1', 'TC2']);
  });

  it('two of which one breaks it: it hangs on that one alone', () => {
    const run = runOf(sensors([195, 206]), {}, []);
    expect(findingOf(run, 'ceiling')!.awaits).toBe('TC2');
    expect(judged(run).decisions.find(({ channel }) => channel === 'TC1')?.changes ?? []).not.toContain('ceiling');
  });

  it('five: each alone and all together are tried, which still shows what hangs on all of them', () => {
    const run = runOf(sensors([205, 206, 207, 208, 209]));
    expect(findingOf(run, 'ceiling')!.outcome).toBe('cannot-tell');
    expect(judged(run).decisions.map(({ channel }) => channel)).toEqual(['TC1', 'TC2', 'TC3', 'TC4', 'TC5']);
  });
});
