import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Evaluation } from '../../../models/evaluation/evaluation.ts';
import { evaluateLog } from '../../../models/evaluation/judge.ts';
import { calibratedLoad } from '../../../models/run/calibrated-load.ts';
import { calibrationIn } from '../../../models/run/calibration-in.ts';
import type { Calibration, InstrumentOfChannel, InstrumentRecords } from '../../../models/run/instrument-records.ts';
import type { Load } from '../../../models/run/load.ts';
import { cycleOf, dwell, heldWith, type MadeRun, pressure, QUICK, readingsOf, SLOW } from '../../support/made-run.ts';

// Each instrument in date on the day it is used, its correction known and applied: AMS2750 in substance, and
// ISO/IEC 17025 and ISO 9001 7.1.5.2 as common practice.

const CALIBRATION: Calibration = {
  done: '2026-01-12',
  from: '2026-01-12',
  until: '2026-07-11',
  by: 'calibration bench',
  certificate: 'C-104',
  unit: '°C',
  points: [
    [0, 0],
    [200, -1],
  ],
  uncertainty: 1.1,
};

const sat = (channel: string, more: Partial<InstrumentOfChannel> = {}): InstrumentOfChannel => ({
  channel,
  instrument: `K-${channel}`,
  calibration: CALIBRATION,
  ranOut: null,
  replacedBy: null,
  ...more,
});

const records = (...channels: readonly InstrumentOfChannel[]): InstrumentRecords => ({
  format: 'dwellbook-instruments/1',
  from: '2026-03-02',
  until: '2026-03-02',
  channels,
});

const ASKED = cycleOf([dwell()], { instruments: { calibration: true }, decision: { rule: 'guarded' } });
const EMPTY: Load = { format: 'dwellbook-load/1', parts: [{ part: 'A' }], sensors: [] };

function judgedWith(
  known: InstrumentRecords | null,
  channels: MadeRun['channels'] = { TC1: QUICK, TC2: SLOW },
  { load = EMPTY, cycle = ASKED } = {},
): Evaluation {
  const log = readingsOf({ channels, cycle });
  const layouts = log.readings.channels.map(({ channel }) => channel);
  return evaluateLog(log, {
    cycle,
    load: calibratedLoad(load, known, layouts),
    instruments: known,
    resin: null,
    exclusions: [],
    believed: Object.keys(channels),
    barometer: null,
    open: false,
  });
}

const findingIn = (evaluation: Evaluation) =>
  evaluation.parts[0]?.findings.find(({ limit }) => limit === 'instruments/calibration');

/** What is judged, without what tells of the calibrations themselves. */
function judgedAlone({ parts, assumptions }: Evaluation) {
  const findings = parts.map((part) => ({
    ...part,
    findings: part.findings.filter(({ limit }) => limit !== 'instruments/calibration'),
  }));
  const sentences = assumptions.filter((sentence) => !sentence.includes('was read by'));
  return { parts: findings.map(({ verdict: _verdict, withoutEstimates: _without, ...part }) => part), sentences };
}

describe('instruments/calibration', () => {
  it('is met where every instrument a limit looks at is in date, naming the first that is due', () => {
    const sooner = { ...CALIBRATION, until: '2026-04-01' };
    expect(findingIn(judgedWith(records(sat('TC1'), sat('TC2', { calibration: sooner }))))).toMatchObject({
      outcome: 'met',
      because: 'All 2 instruments were in calibration on 2026-03-02; first due is K-TC2 at TC2, on 2026-04-01.',
    });
  });

  it('is not met by one that was due before the run began, and names it with its day', () => {
    const known = records(sat('TC1'), sat('TC2', { calibration: null, ranOut: '2026-02-27' }));
    expect(findingIn(judgedWith(known))).toMatchObject({
      outcome: 'not-met',
      sensor: 'TC2',
      because: 'K-TC2 at TC2 was due on 2026-02-27, and the run began on 2026-03-02.',
    });
  });

  it('is not met by one that ran out before the run ended', () => {
    const known = records(sat('TC1'), sat('TC2', { calibration: { ...CALIBRATION, until: '2026-03-02' } }));
    expect(findingIn(judgedWith(known))).toMatchObject({ outcome: 'met' });
    expect(findingIn(judgedWith({ ...known, until: '2026-03-03' }))).toMatchObject({
      outcome: 'not-met',
      because: 'K-TC2 at TC2 was due on 2026-03-02, and the run ended on 2026-03-03.',
    });
  });

  it.each<[string, InstrumentRecords | null, string]>([
    ['nothing on record', null, 'Not recorded.'],
    ['one channel without', records(sat('TC1')), 'No instrument is on record for TC2.'],
    [
      'no calibration ever',
      records(sat('TC1'), sat('TC2', { calibration: null })),
      'No calibration of K-TC2 at TC2 that holds on 2026-03-02 is on record.',
    ],
    [
      'another in its place during the run',
      records(sat('TC1'), sat('TC2', { replacedBy: 'K-9' })),
      'K-TC2 at TC2 gave its place to K-9 during the run.',
    ],
    [
      'a calibration in another quantity',
      records(sat('TC1'), sat('TC2', { calibration: { ...CALIBRATION, unit: 'bar' } })),
      'K-TC2 at TC2 was calibrated in bar, which cannot be applied to a channel in °C.',
    ],
  ])('nobody can tell with %s', (_what, known, because) => {
    expect(findingIn(judgedWith(known))).toMatchObject({ outcome: 'cannot-tell', because });
  });

  it('looks at the gauge of a window, and not at a channel no limit uses', () => {
    const channels = {
      TC1: QUICK,
      P: pressure([
        [0, 0],
        [280, 7],
      ]),
      P2: pressure([[0, 0]], { role: 'other' }),
    };
    const whole = { from: { at: 'start' }, until: { at: 'end' } } as const;
    const windows = [{ name: 'pressed', quantity: 'pressure' as const, ...whole, atLeast: -1 }];
    const cycle = cycleOf([dwell()], { instruments: { calibration: true }, windows });
    expect(findingIn(judgedWith(records(sat('TC1')), channels, { cycle }))).toMatchObject({
      outcome: 'cannot-tell',
      because: 'No instrument is on record for P.',
    });
  });

  it('tells in the assumptions of a calibration that was applied, and of none that had run out', () => {
    const { assumptions } = judgedWith(records(sat('TC1'), sat('TC2', { calibration: null, ranOut: '2026-02-27' })));
    expect(assumptions.filter((sentence) => sentence.includes('was read by'))).toEqual([
      'TC1 was read by K-TC1, calibrated on 2026-01-12, certificate C-104: corrected by 0 at 0 °C, −1 at 200 °C; U = 1.1 °C (k = 2).',
    ]);
  });
});

describe('corrections of the calibration on record', () => {
  const wave = heldWith([100, 176.2], [150, 183.1]);

  it('judge as the same in the load document do, and the load document goes before them', () => {
    const known = records(sat('TC1'), sat('TC2'));
    const own = { corrections: CALIBRATION.points, uncertainty: 1.1 };
    const sensors = [
      { channel: 'TC1', ...own },
      { channel: 'TC2', ...own },
    ];
    const channels = { TC1: wave, TC2: SLOW };
    const byRecord = judgedWith(known, channels);
    expect(judgedAlone(byRecord)).toEqual(judgedAlone(judgedWith(null, channels, { load: { ...EMPTY, sensors } })));
    expect(judgedAlone(byRecord)).not.toEqual(judgedAlone(judgedWith(null, channels)));
    const none = sensors.map(({ channel }) => ({
      channel,
      corrections: [[0, 0]] as [number, number][],
      uncertainty: 1.1,
    }));
    const written = { load: { ...EMPTY, sensors: none } };
    expect(judgedAlone(judgedWith(known, channels, written))).toEqual(judgedAlone(judgedWith(null, channels, written)));
  });

  it('of zero change nothing', () => {
    const tenths = fc.integer({ min: 1700, max: 1900 }).map((tenth) => tenth / 10);
    fc.assert(
      fc.property(fc.array(tenths, { minLength: 3, maxLength: 8 }), fc.integer({ min: -50, max: 400 }), (held, at) => {
        const channels = { TC1: heldWith(...held.map((figure, n) => [90 + 10 * n, figure] as const)), TC2: SLOW };
        const zero = { ...CALIBRATION, points: [[at, 0]] as [number, number][], uncertainty: null };
        const known = records(sat('TC1', { calibration: zero }), sat('TC2', { calibration: zero }));
        expect(judgedAlone(judgedWith(known, channels))).toEqual(judgedAlone(judgedWith(null, channels)));
      }),
      { numRuns: 30 },
    );
  });

  it('written in another unit come to the same in the channel’s', () => {
    // −1 °C at 100 °C is −1.8 °F at 212 °F; U of 1.1 °C is 1.98 °F.
    const celsius = { ...CALIBRATION, points: [[100, -1]] as [number, number][] };
    expect(calibrationIn(celsius, '°F')).toEqual({ corrections: [[212, -1.8]], uncertainty: 1.98 });
    // 1 bar is 100 kPa and 14.503 773 773 psi (NIST SP 811, app. B.8).
    const gauge = { ...CALIBRATION, unit: 'bar', points: [[7, 0.02]] as [number, number][], uncertainty: 0.05 };
    expect(calibrationIn(gauge, 'kPa')).toEqual({ corrections: [[700, 2]], uncertainty: 5 });
    expect(calibrationIn(gauge, 'psi')?.corrections?.[0]?.[0]).toBeCloseTo(7 * 14.503773773, 6);
    expect(calibrationIn(gauge, 'bar abs')).toBeNull();
  });
});
