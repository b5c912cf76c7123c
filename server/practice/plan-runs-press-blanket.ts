import { repair, skins } from './plan-loads.ts';
import { REPAIRS, SKINS } from './plan-practices.ts';
import type { PlannedRun } from './plan-run.ts';

/** The heated press, and repairs under the blanket. */

const PRESS = { vessel: 'Press 1', practice: 'skins', isBarometerRecorded: false, barometerMbar: 1010 } as const;
const BLANKET = { vessel: 'Heat blanket 1', practice: 'repairs', isBarometerRecorded: true } as const;
const SOUND = { verdict: 'conforms' } as const;

export const PRESS_1_RUNS: readonly PlannedRun[] = [
  {
    ...PRESS,
    run: 'P1-0071',
    startsAt: '2025-12-02T09:20:00Z',
    workOrder: 'W-2108',
    operator: 'operator 2',
    parts: skins(31, 4, 'G-05'),
    expected: SOUND,
  },
  {
    ...PRESS,
    run: 'P1-0072',
    startsAt: '2026-02-17T09:31:00Z',
    workOrder: 'W-2128',
    operator: 'operator 1',
    parts: skins(33, 4, 'G-05'),
    expected: SOUND,
  },
  {
    ...PRESS,
    run: 'P1-0073',
    startsAt: '2026-04-28T08:25:00Z',
    workOrder: 'W-2150',
    operator: 'operator 3',
    parts: skins(35, 3, 'G-06'),
    mishaps: [{ kind: 'heater-weak', fromMin: 70, untilMin: 82, dropC: 8 }],
    notes: [{ minute: 71, text: 'Heater fuse of the press blown, changed', by: 'operator 3' }],
    expected: { verdict: 'does-not-conform', notMet: ['cure/lower', 'material/out-life'] },
  },
  {
    ...PRESS,
    run: 'P1-0074',
    startsAt: '2026-07-22T08:28:00Z',
    workOrder: 'W-2180',
    operator: 'operator 2',
    parts: skins(37, 4, 'G-06'),
    pressure: { ...SKINS.pressure!, toBar: 7.1 },
    expected: SOUND,
  },
  {
    ...PRESS,
    run: 'P1-0075',
    startsAt: '2026-10-20T08:30:00Z',
    workOrder: 'W-2204',
    operator: 'operator 1',
    parts: skins(39, 4, 'G-08'),
    expected: { verdict: 'cannot-tell', cannotTell: ['material/out-life'] },
  },
];

export const BLANKET_1_RUNS: readonly PlannedRun[] = [
  {
    ...BLANKET,
    run: 'HB-0011',
    startsAt: '2026-03-10T09:00:00Z',
    workOrder: 'W-2134',
    operator: 'operator 3',
    parts: repair('RD-0302', 'G-05'),
    barometerMbar: 1013,
    expected: SOUND,
  },
  {
    ...BLANKET,
    run: 'HB-0012',
    startsAt: '2026-06-02T08:15:00Z',
    workOrder: 'W-2162',
    operator: 'operator 2',
    parts: repair('RD-0309', 'G-06'),
    barometerMbar: 1008,
    programme: {
      segments: REPAIRS.programme.segments.map((segment) =>
        segment.kind === 'soak' && segment.minutes === 250 ? { kind: 'soak', minutes: 215 } : segment,
      ),
    },
    expected: { verdict: 'does-not-conform', notMet: ['repair dwell/time'] },
  },
  {
    ...BLANKET,
    run: 'HB-0013',
    startsAt: '2026-09-08T08:20:00Z',
    workOrder: 'W-2193',
    operator: 'operator 1',
    parts: repair('RD-0312', 'G-08'),
    barometerMbar: 1017,
    expected: SOUND,
  },
];
