import { radomes, withPart } from './plan-loads.ts';
import type { PlannedRun } from './plan-run.ts';

/** Oven 2: radomes under vacuum bag. */

const HERE = { vessel: 'Oven 2', practice: 'radomes', isBarometerRecorded: true } as const;
const SOUND = { verdict: 'conforms' } as const;

export const OVEN_2_RUNS: readonly PlannedRun[] = [
  {
    ...HERE,
    run: 'O2-0401',
    startsAt: '2025-11-18T08:10:00Z',
    workOrder: 'W-2103',
    operator: 'operator 3',
    parts: radomes(301, 2, 'G-05'),
    barometerMbar: 1000,
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'O2-0402',
    startsAt: '2025-12-16T08:15:00Z',
    workOrder: 'W-2112',
    operator: 'operator 1',
    parts: radomes(303, 3, 'G-05'),
    barometerMbar: 1011,
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'O2-0403',
    startsAt: '2026-02-03T08:12:00Z',
    workOrder: 'W-2123',
    operator: 'operator 2',
    parts: radomes(306, 2, 'G-05'),
    barometerMbar: 1006,
    faults: [{ kind: 'wrong-unit', channel: 'TC5', written: '°C' }],
    decisions: [
      {
        channel: 'TC5',
        decision: 'exclude',
        fromMin: 0,
        reason: 'Input 5 was set to °C; the others to °F',
        by: 'inspector 1',
      },
    ],
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'O2-0404',
    startsAt: '2026-03-17T08:09:00Z',
    workOrder: 'W-2137',
    operator: 'operator 3',
    parts: radomes(308, 3, 'G-06'),
    barometerMbar: 1014,
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'O2-0405',
    startsAt: '2026-05-05T07:11:00Z',
    workOrder: 'W-2152',
    operator: 'operator 1',
    parts: radomes(311, 2, 'G-06'),
    barometerMbar: 1009,
    mishaps: [{ kind: 'bag-leak', line: 'VAC 2', fromMin: 160, untilMin: 176, perMin: 0.16 }],
    notes: [{ minute: 177, text: 'VAC 2: sealant lifted at the back corner; pressed down again', by: 'operator 1' }],
    expected: { verdict: 'does-not-conform', notMet: ['window/bag vacuum'] },
  },
  {
    ...HERE,
    run: 'O2-0406',
    startsAt: '2026-06-10T07:14:00Z',
    workOrder: 'W-2167',
    operator: 'operator 2',
    parts: withPart(radomes(313, 3, 'G-06'), 'RD-0314', { leakTest: { start: 26.2, end: 22.9, minutes: 5 } }),
    barometerMbar: 1012,
    expected: { verdict: 'does-not-conform', notMet: ['leak-test'] },
  },
  {
    ...HERE,
    run: 'O2-0407',
    startsAt: '2026-08-11T07:08:00Z',
    workOrder: 'W-2186',
    operator: 'operator 3',
    parts: radomes(316, 2, 'G-08'),
    barometerMbar: 1015,
    faults: [{ kind: 'unplugged', channel: 'TC6' }],
    expected: { verdict: 'cannot-tell' },
  },
  {
    ...HERE,
    run: 'O2-0408',
    startsAt: '2026-11-04T08:13:00Z',
    workOrder: 'W-2208',
    operator: 'operator 1',
    parts: radomes(318, 3, 'G-08'),
    barometerMbar: 1003,
    expected: SOUND,
  },
];
