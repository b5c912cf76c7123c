import { struts, withoutLeakTest, withPart } from './plan-loads.ts';
import { STRUTS_B } from './plan-practices.ts';
import type { PlannedRun } from './plan-run.ts';
import type { Segment } from './simulator/programme.ts';

/** Autoclave 1 from July to November 2026, by issue B. */

const HERE = { vessel: 'Autoclave 1', practice: 'struts-b', isBarometerRecorded: true } as const;
const SOUND = { verdict: 'conforms' } as const;

/** Soaks timed on the controller alone, to the minute, as if every part kept up with the air. */
function timedOnAir(segment: Segment): Segment {
  if (segment.kind !== 'soak' || segment.onceLaggingC === undefined) return segment;
  return { kind: 'soak', minutes: segment.minutes === 125 ? 115 : segment.minutes };
}

export const AUTOCLAVE_1_AUTUMN: readonly PlannedRun[] = [
  {
    ...HERE,
    run: 'A1-0239',
    startsAt: '2026-07-14T06:35:30Z',
    workOrder: 'W-2178',
    operator: 'operator 3',
    parts: struts(483, 4, 'K-23'),
    barometerMbar: 1012,
    notes: [{ minute: 0, text: 'Trap of V3 cleaned on 6 July; line draws down as the others again', by: 'operator 3' }],
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'A1-0240',
    startsAt: '2026-08-05T06:31:00Z',
    workOrder: 'W-2184',
    operator: 'operator 1',
    parts: withPart(struts(487, 4, 'K-26'), 'SR-0490', { tool: 'ST-11', toolMake: 'steel block' }),
    barometerMbar: 1010,
    programme: { segments: STRUTS_B.programme.segments.map(timedOnAir), holdBackC: 15 },
    notes: [{ minute: 0, text: 'SR-0490 on the trial steel tool ST-11', by: 'process engineer 1' }],
    expected: { verdict: 'does-not-conform', notMet: ['dwell 1/time', 'dwell 2/time'] },
  },
  {
    ...HERE,
    run: 'A1-0241',
    startsAt: '2026-08-19T06:38:00Z',
    workOrder: 'W-2188',
    operator: 'operator 2',
    parts: struts(491, 4, 'K-26'),
    barometerMbar: 1005,
    recorderMishaps: [{ kind: 'clock-set-back', atMin: 211, byMin: 17 }],
    notes: [
      { minute: 211, text: 'Recorder clock was 17 minutes fast; set right while it was running', by: 'operator 2' },
    ],
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'A1-0242',
    startsAt: '2026-09-02T06:30:20Z',
    workOrder: 'W-2192',
    operator: 'operator 3',
    parts: struts(495, 4, 'K-26'),
    barometerMbar: 998,
    mishaps: [{ kind: 'power-cut', fromMin: 262, untilMin: 284, clockRanOn: true }],
    notes: [{ minute: 263, text: 'Mains failed; recorder on its battery, controller timed on', by: 'operator 3' }],
    expected: { verdict: 'does-not-conform', notMet: ['dwell 2/time'] },
  },
  {
    ...HERE,
    run: 'A1-0243',
    startsAt: '2026-09-16T06:34:40Z',
    workOrder: 'W-2195',
    operator: 'operator 1',
    parts: struts(499, 4, 'K-26'),
    barometerMbar: 1013,
    pressure: {
      ...STRUTS_B.pressure!,
      release: { when: { at: 'hottest-cools-to', temperatureC: 74 }, barPerMin: 0.9 },
    },
    expected: { verdict: 'does-not-conform', notMet: ['window/cure pressure'] },
  },
  {
    ...HERE,
    run: 'A1-0244',
    startsAt: '2026-09-30T06:32:10Z',
    workOrder: 'W-2199',
    operator: 'operator 2',
    parts: struts(503, 4, 'K-27'),
    barometerMbar: 1002,
    programme: {
      segments: STRUTS_B.programme.segments.map((segment) =>
        segment.kind === 'ramp' && segment.cPerMin === 1.05 ? { ...segment, cPerMin: 4.4 } : segment,
      ),
    },
    expected: { verdict: 'does-not-conform', notMet: ['heat-up 2/fastest', 'dwell 2/upper', 'ceiling'] },
  },
  {
    ...HERE,
    run: 'A1-0245',
    startsAt: '2026-10-14T06:40:50Z',
    workOrder: 'W-2203',
    operator: 'operator 3',
    parts: withoutLeakTest(struts(507, 4, 'K-27'), 'SR-0509'),
    barometerMbar: 1011,
    expected: { verdict: 'cannot-tell', cannotTell: ['leak-test'] },
  },
  {
    ...HERE,
    run: 'A1-0246',
    startsAt: '2026-10-28T07:29:00Z',
    workOrder: 'W-2206',
    operator: 'operator 1',
    parts: struts(511, 2, 'K-27'),
    barometerMbar: 996,
    faults: [{ kind: 'jumping', channel: 'TC3', fromMin: 120, untilMin: 300 }],
    decisions: [
      {
        channel: 'TC3',
        decision: 'exclude',
        fromMin: 119,
        reason: 'Jumps of up to 55 °C that no neighbour makes: broken strand at the plug',
        by: 'inspector 2',
      },
    ],
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'A1-0247',
    startsAt: '2026-11-11T07:33:30Z',
    workOrder: 'W-2210',
    operator: 'operator 2',
    parts: struts(513, 4, 'K-27'),
    barometerMbar: 1016,
    corrections: {
      TC1: [
        [20, 0.1],
        [110, -0.4],
        [180, -0.7],
      ],
      TC2: [
        [20, 0],
        [110, 0.3],
        [180, 0.5],
      ],
      TC7: [
        [20, -0.2],
        [110, -0.6],
        [180, -1.1],
      ],
    },
    uncertainty: 2.2,
    expected: SOUND,
  },
];
