import { struts } from './plan-loads.ts';
import { STRUTS_A } from './plan-practices.ts';
import type { PlannedRun } from './plan-run.ts';

/** Autoclave 1 from November 2025 to February 2026, while issue A of the strut cycle held. */

const HERE = { vessel: 'Autoclave 1', practice: 'struts-a', isBarometerRecorded: true } as const;
const SOUND = { verdict: 'conforms' } as const;

export const AUTOCLAVE_1_ISSUE_A: readonly PlannedRun[] = [
  {
    ...HERE,
    run: 'A1-0218',
    startsAt: '2025-11-06T07:30:00Z',
    workOrder: 'W-2101',
    operator: 'operator 1',
    parts: struts(401, 4, 'K-17'),
    barometerMbar: 1012,
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'A1-0219',
    startsAt: '2025-11-19T07:42:20Z',
    workOrder: 'W-2104',
    operator: 'operator 2',
    parts: struts(405, 4, 'K-17'),
    barometerMbar: 997,
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'A1-0220',
    startsAt: '2025-12-03T08:05:10Z',
    workOrder: 'W-2109',
    operator: 'operator 1',
    parts: struts(409, 3, 'K-17'),
    barometerMbar: 1003,
    faults: [{ kind: 'open', channel: 'TC4', fromMin: 262 }],
    decisions: [
      {
        channel: 'TC4',
        decision: 'exclude',
        fromMin: 261.5,
        reason: 'Open circuit: lead found crushed under the door seal at unloading',
        by: 'inspector 1',
      },
    ],
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'A1-0221',
    startsAt: '2025-12-17T07:28:30Z',
    workOrder: 'W-2113',
    operator: 'operator 3',
    parts: struts(412, 4, 'K-18'),
    barometerMbar: 1021,
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'A1-0222',
    startsAt: '2026-01-14T07:35:00Z',
    workOrder: 'W-2118',
    operator: 'operator 2',
    parts: struts(416, 4, 'K-18'),
    barometerMbar: 989,
    mishaps: [{ kind: 'bag-leak', line: 'V2', fromMin: 22, untilMin: 34, perMin: 0.24 }],
    notes: [{ minute: 35, text: 'V2: hose coupling had worked loose, pushed home', by: 'operator 2' }],
    expected: { verdict: 'does-not-conform', notMet: ['window/bag vacuum until venting'] },
  },
  {
    ...HERE,
    run: 'A1-0223',
    startsAt: '2026-01-28T07:31:40Z',
    workOrder: 'W-2121',
    operator: 'operator 1',
    parts: struts(420, 4, 'K-18'),
    barometerMbar: 1008,
    recorderMishaps: [{ kind: 'last-line-cut' }],
    notes: [
      { minute: 300, text: 'Memory stick pulled out before the recorder had finished writing', by: 'operator 1' },
    ],
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'A1-0224',
    startsAt: '2026-02-11T07:44:50Z',
    workOrder: 'W-2126',
    operator: 'operator 3',
    parts: struts(424, 3, 'K-18'),
    barometerMbar: 1001,
    pressure: { ...STRUTS_A.pressure!, when: { at: 'minute', minute: 96 } },
    notes: [{ minute: 97, text: 'Gas bottle bank was empty; changed over, full pressure late', by: 'operator 3' }],
    expected: { verdict: 'does-not-conform', notMet: ['window/cure pressure'] },
  },
];
