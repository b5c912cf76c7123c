import { radomes, struts } from './plan-loads.ts';
import type { PlannedRun } from './plan-run.ts';
import { AUTOCLAVE_1_AUTUMN } from './plan-runs-autoclave-1-autumn.ts';
import { AUTOCLAVE_1_ISSUE_A } from './plan-runs-autoclave-1-issue-a.ts';
import { AUTOCLAVE_1_SPRING } from './plan-runs-autoclave-1-spring.ts';
import { AUTOCLAVE_2_RUNS } from './plan-runs-autoclave-2.ts';
import { OVEN_2_RUNS } from './plan-runs-oven-2.ts';
import { POST_CURE_RUNS } from './plan-runs-post-cure.ts';
import { BLANKET_1_RUNS, PRESS_1_RUNS } from './plan-runs-press-blanket.ts';

/** Every run of the workshop's year, in order of time. */
export const PLANNED_RUNS: readonly PlannedRun[] = [
  ...AUTOCLAVE_1_ISSUE_A,
  ...AUTOCLAVE_1_SPRING,
  ...AUTOCLAVE_1_AUTUMN,
  ...AUTOCLAVE_2_RUNS,
  ...OVEN_2_RUNS,
  ...POST_CURE_RUNS,
  ...PRESS_1_RUNS,
  ...BLANKET_1_RUNS,
].sort((one, other) => Date.parse(one.startsAt) - Date.parse(other.startsAt));

/** Recorded, and nobody has yet said what lay in the vessel. */
export const UNLOADED_RUN: PlannedRun = {
  run: 'A1-0248',
  vessel: 'Autoclave 1',
  practice: 'struts-b',
  startsAt: '2026-11-25T07:36:00Z',
  workOrder: 'W-2215',
  operator: 'operator 3',
  parts: struts(517, 4, 'K-27'),
  barometerMbar: 1009,
  isBarometerRecorded: true,
  expected: { verdict: 'conforms' },
};

/** From the new recorder of Oven 1, which has no layout yet. */
export const UNREAD_RUN: PlannedRun = {
  run: 'O1-0001',
  vessel: 'Oven 1',
  practice: 'radomes',
  startsAt: '2026-11-26T08:20:00Z',
  workOrder: 'W-2216',
  operator: 'operator 1',
  parts: radomes(321, 2, 'G-08'),
  barometerMbar: 1012,
  isBarometerRecorded: true,
  expected: { verdict: 'conforms' },
};
