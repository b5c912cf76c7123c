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
