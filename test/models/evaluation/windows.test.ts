import { describe, expect, it } from 'vitest';
import type { Cycle, Forgiveness, WindowLimit } from '../../../models/cycle/cycle.ts';
import {
  cycleOf,
  dwell,
  findingOf,
  type MadeChannel,
  type MadeRun,
  minutesTo,
  pressure,
  QUICK,
  type Vertex,
  vacuum,
} from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document (§2, Units, and Events that bound a window).

const FROM_START = { from: { at: 'start' }, until: { at: 'end' } } as const;

function windowed(
  channels: Record<string, MadeChannel>,
  limit: Partial<WindowLimit>,
  more: Partial<Cycle> = {},
): MadeRun {
  const windows = [{ name: 'w', quantity: 'pressure', ...FROM_START, ...limit } as WindowLimit];
  return { channels: { TC1: QUICK, ...channels }, cycle: cycleOf([dwell()], { windows, ...more }) };
}

const steady = (figure: number, ...between: Vertex[]): Vertex[] => [[0, figure], ...between, [280, figure]];

/** At 0.4 bar/min down to 6.2 bar and back: below 6.5 bar for 0.75 + 0.75 min. */
const sag = (at: number): Vertex[] => [
  [at, 7],
  [at + 2, 6.2],
  [at + 4, 7],
];

describe('a pressure window', () => {
  it.each([
    [6.5, 7.5, 'met', 0.5],
    [7, 7, 'met', 0],
    [7.1, 8, 'not-met', -0.1],
    [6, 6.9, 'not-met', -0.1],
  ] as const)('of %d to %d bar with 7 bar read is %s', (atLeast, atMost, outcome, margin) => {
    const finding = findingOf(windowed({ P: pressure(steady(7)) }, { atLeast, atMost }), 'window/w')!;
    expect(finding).toMatchObject({ outcome, observed: 7, possible: 7, atLeast, atMost, unit: 'bar', sensor: 'P' });
    expect(finding.margin).toBeCloseTo(margin, 6);
  });

  it('judges readings from one event to the other, ends included', () => {
    const spike = (at: number) => pressure(steady(7, [at - 1, 7], [at, 8], [at + 1, 7]));
    const limit = {
      atMost: 7.5,
      from: { at: 'first-reaches', value: 100 }, // 40 min
      until: { at: 'first-cools-to', value: 60 }, // 260 min
    } as const;
    const outcomes = [38, 40, 150, 260, 262].map(
      (at) => findingOf(windowed({ P: spike(at) }, limit), 'window/w')!.outcome,
    );
    expect(outcomes).toEqual(['met', 'not-met', 'not-met', 'not-met', 'met']);
  });

  it('shows the worst reading and its minute', () => {
    const finding = findingOf(windowed({ P: pressure(steady(7, ...sag(100))) }, { atLeast: 6.5 }), 'window/w')!;
    expect(finding).toMatchObject({ outcome: 'not-met', observed: 6.2 });
    expect([minutesTo(finding.from), minutesTo(finding.until)]).toEqual([102, 102]);
    expect(finding.because).toBe(
      'P went to 6.2 bar; at least 6.5 bar asked from the start of the log until the end of the log.',
    );
  });

  it.each<[Forgiveness, boolean]>([
    [{ by: 0.3, for: 1.5 }, true],
    [{ by: 0.29, for: 1.5 }, false],
    [{ by: 0.3, for: 1.4 }, false],
    [{ by: 0.3, for: 1.5, inTotal: 1.4 }, false],
  ])('0.3 bar low for 1.5 min under %o is forgiven: %s', (forgive, isForgiven) => {
    const finding = findingOf(
      windowed({ P: pressure(steady(7, ...sag(100))) }, { atLeast: 6.5, forgive }),
      'window/w',
    )!;
    expect(finding.outcome).toBe(isForgiven ? 'met' : 'not-met');
    expect(finding.forgiven).toBe(isForgiven ? true : undefined);
    // To 6.2 bar, the forgiven limit, or to 6.5 bar.
    expect(finding.margin).toBeCloseTo(isForgiven ? 0 : -0.3, 6);
  });

  it('counts excursions on either side together: one low, one high, of one allowed', () => {
    const high: Vertex[] = [
      [150, 7],
      [152, 7.8],
      [154, 7],
    ];
    const outcome = (times: number) => {
      const forgive = { by: 0.3, for: 2, times };
      const run = windowed({ P: pressure(steady(7, ...sag(100), ...high)) }, { atLeast: 6.5, atMost: 7.5, forgive });
      return findingOf(run, 'window/w')!.outcome;
    };
    expect([outcome(2), outcome(1)]).toEqual(['met', 'not-met']);
  });

  it('is judged on every channel, and names the worst', () => {
    const run = windowed({ P: pressure(steady(7)), P2: pressure(steady(6)) }, { atLeast: 6.5 });
    expect(findingOf(run, 'window/w')).toMatchObject({ outcome: 'not-met', observed: 6, sensor: 'P2' });
  });
});

describe('bag lines', () => {
  const run = (third: number): MadeRun => ({
    ...windowed(
      { V1: vacuum(steady(0.8)), V2: vacuum(steady(0.5)), V3: vacuum(steady(third)) },
      { quantity: 'vacuum', atLeast: 0.75 },
    ),
    load: {
      parts: [
        { part: 'A', bagLine: 'V1' },
        { part: 'B', bagLine: 'V2' },
      ],
      sensors: [],
    },
  });

  it('judge each part by its own: A by V1, B by V2', () => {
    expect(findingOf(run(0.8), 'window/w', 'A')!.outcome).toBe('met');
    expect(findingOf(run(0.8), 'window/w', 'B')).toMatchObject({ outcome: 'not-met', sensor: 'V2' });
  });

  it('that no part names belong to none, and are judged for all', () => {
    expect(findingOf(run(0.6), 'window/w', 'A')).toMatchObject({ outcome: 'not-met', sensor: 'V3' });
  });
});

describe('units of a window', () => {
  const units = (pressureUnit: string, vacuumUnit = 'bar') => ({
    units: { temperature: '°C', pressure: pressureUnit, vacuum: vacuumUnit } as const,
  });

  it('are converted once: 100 psi asked and 100 psi read, 6.895 bar read against it just short', () => {
    const of = (figure: number, unit: string) =>
      findingOf(windowed({ P: pressure(steady(figure), { unit }) }, { atLeast: 100 }, units('psi')), 'window/w')!;
    expect(of(100, 'psi')).toMatchObject({ outcome: 'met', observed: 100, margin: 0 });
    // 100 psi = 689 475.7 Pa (NIST SP 811, app. B.8).
    expect(of(6.8947, 'bar').outcome).toBe('not-met');
    expect(of(6.8948, 'bar').outcome).toBe('met');
  });

  it.each([
    ['bar', 'mbar abs', 'a bag at 200 mbar abs is 0.8 bar below 1000 mbar', 0.75, 200, 0.8],
    ['mbar abs', 'bar', 'a bag 0.8 bar below 1000 mbar is at 200 mbar abs', 250, 0.8, 200],
  ] as const)('%s against a log in %s needs the barometer: %s', (written, read, _, limit, figure, observed) => {
    const bound = written === 'bar' ? { atLeast: limit } : { atMost: limit };
    const run = windowed(
      { V: vacuum(steady(figure), { unit: read }) },
      { quantity: 'vacuum', ...bound },
      units('bar', written),
    );
    expect(findingOf({ ...run, barometer: '1000 mbar' }, 'window/w')).toMatchObject({ outcome: 'met', observed });
    const without = findingOf(run, 'window/w')!;
    expect(without).toMatchObject({ outcome: 'cannot-tell', observed: null });
    expect(without.because).toContain('barometer');
  });

  it('takes the barometer of the load where none is given beside it', () => {
    const run = windowed({ V: vacuum(steady(200), { unit: 'mbar abs' }) }, { quantity: 'vacuum', atLeast: 0.75 });
    const load = { parts: [], sensors: [], barometer: '1000 mbar' };
    expect(findingOf({ ...run, load }, 'window/w')).toMatchObject({ outcome: 'met', observed: 0.8 });
    const given = findingOf({ ...run, load, barometer: '900 mbar' }, 'window/w');
    expect(given).toMatchObject({ outcome: 'not-met', observed: 0.7 });
  });

  it.each([
    ['bar', 'bar abs', 8, 7],
    ['bar abs', 'bar', 7, 8],
  ] as const)(
    'a vessel gauge in %s against a log in %s: %d read is %d at 1000 mbar',
    (written, read, figure, observed) => {
      const run = windowed({ P: pressure(steady(figure), { unit: read }) }, { atLeast: observed }, units(written));
      expect(findingOf({ ...run, barometer: '1000 mbar' }, 'window/w')).toMatchObject({ outcome: 'met', observed });
      expect(findingOf(run, 'window/w')!.outcome).toBe('cannot-tell');
    },
  );

  it.each([
    ['bar', 'mbar abs', 'vacuum', 1001], // more than the barometer: a vacuum of −1 mbar
    ['mbar abs', 'bar', 'vacuum', 1.001], // deeper than the barometer: −1 mbar abs
    ['bar abs', 'bar', 'pressure', -1.001], // below nothing at all
  ] as const)('%s from a log in %s that comes to less than nothing: barometer or gauge is wrong', (...given) => {
    const [written, read, quantity, figure] = given;
    const channel = { role: quantity, unit: read, history: steady(figure) };
    const isPressure = quantity === 'pressure';
    const run = windowed(
      { X: channel },
      { quantity, atLeast: 0.1 },
      isPressure ? units(written) : units('bar', written),
    );
    const finding = findingOf({ ...run, barometer: '1000 mbar' }, 'window/w')!;
    expect(finding.outcome).toBe('cannot-tell');
    expect(finding.because).toContain('barometer or gauge is wrong');
  });
});

describe('a gap of pressure', () => {
  const gapped = (at: number, between: Vertex[] = []) =>
    windowed(
      { P: pressure(steady(7, ...between), { absent: [[at, at + 10]] }) },
      { atLeast: 6.5, from: { at: 'opens', stage: 'dwell' }, until: { at: 'closes', stage: 'dwell' } },
    );

  it('may hide anything: inside the window, 77.5 to 202.5 min, nobody can tell', () => {
    expect(findingOf(gapped(120), 'window/w')!.outcome).toBe('cannot-tell');
  });

  it('outside it costs nothing, though it be next to it', () => {
    expect(findingOf(gapped(67), 'window/w')!.outcome).toBe('met');
    expect(findingOf(gapped(203), 'window/w')!.outcome).toBe('met');
  });

  it('hides no breach that was read', () => {
    expect(findingOf(gapped(120, sag(150)), 'window/w')!.outcome).toBe('not-met');
  });
});
