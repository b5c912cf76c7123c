import { postCured } from './plan-loads.ts';
import { POST_CURES } from './plan-practices.ts';
import type { PlannedRun } from './plan-run.ts';

/** Oven 2 by night: free-standing post-cures. Two of them run through a change of the clocks. */

const HERE = { vessel: 'Oven 2', practice: 'post-cures', isBarometerRecorded: false, barometerMbar: 1010 } as const;
const SOUND = { verdict: 'conforms' } as const;

export const POST_CURE_RUNS: readonly PlannedRun[] = [
  {
    ...HERE,
    run: 'O2-0501',
    startsAt: '2025-11-25T17:30:00Z',
    workOrder: 'W-2106',
    operator: 'operator 1',
    parts: postCured([401, 402, 403], 'K-17'),
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'O2-0502',
    startsAt: '2026-01-07T17:35:00Z',
    workOrder: 'W-2116',
    operator: 'operator 2',
    parts: postCured([405, 406, 412], 'K-17'),
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'O2-0503',
    startsAt: '2026-03-28T20:05:00Z',
    workOrder: 'W-2142',
    operator: 'operator 3',
    parts: postCured([427, 428, 431], 'K-20'),
    notes: [{ minute: 0, text: 'Clocks go forward tonight', by: 'operator 3' }],
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'O2-0504',
    startsAt: '2026-06-24T16:40:00Z',
    workOrder: 'W-2172',
    operator: 'operator 1',
    parts: postCured([443, 444], 'K-21'),
    mishaps: [{ kind: 'power-cut', fromMin: 250, untilMin: 290 }],
    notes: [{ minute: 251, text: 'Mains failed for forty minutes; recorder on its battery', by: 'operator 1' }],
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'O2-0505',
    startsAt: '2026-10-24T19:20:00Z',
    workOrder: 'W-2205',
    operator: 'operator 2',
    parts: postCured([483, 484, 487], 'K-26'),
    notes: [{ minute: 0, text: 'Clocks go back tonight', by: 'operator 2' }],
    expected: SOUND,
  },
  {
    ...HERE,
    run: 'O2-0506',
    startsAt: '2026-11-18T17:25:00Z',
    workOrder: 'W-2212',
    operator: 'operator 3',
    parts: postCured([491, 492, 493], 'K-26'),
    programme: {
      segments: POST_CURES.programme.segments.map((segment) =>
        segment.kind === 'ramp' && segment.cPerMin === 0.7 ? { ...segment, cPerMin: 1.3 } : segment,
      ),
    },
    expected: { verdict: 'does-not-conform', notMet: ['heat-up/fastest'] },
  },
];
