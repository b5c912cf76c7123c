import type { Verdict } from '../../models/evaluation/evaluation.ts';
import type { LeakTestRecord } from '../../models/run/load.ts';
import type { PartKind, Tool, Zone } from './plan-kinds.ts';
import type { PracticeName } from './plan-practices.ts';
import type { Mishap } from './simulator/mishaps.ts';
import type { Programme } from './simulator/programme.ts';
import type { RecorderMishap } from './simulator/recorder-mishaps.ts';
import type { SensorFault } from './simulator/sensor-faults.ts';
import type { PressureProgramme } from './simulator/vessel-pressure.ts';

/** One part of a load. What is not written is as usual for its kind and place. */
export interface PlannedPart {
  readonly part: string;
  readonly kind: PartKind;
  readonly quantity?: number;
  /** Name of the tool; its make, where it is not the kind's own. */
  readonly tool?: string;
  readonly toolMake?: Tool;
  readonly zone: Zone;
  readonly bagLine?: string;
  /** One for each place of the kind; empty where the part has no thermocouple of its own. */
  readonly channels: readonly string[];
  readonly roll: string;
  /** Absent where nobody wrote it down. */
  readonly leakTest?: LeakTestRecord;
}

/** A decision on a suspected sensor, taken after the run. */
export interface PlannedDecision {
  readonly channel: string;
  readonly decision: 'exclude' | 'keep';
  /** Minute of the run an exclusion holds from. */
  readonly fromMin: number;
  readonly reason: string;
  readonly by: string;
}

/** One run of the workshop's year: what was done, what went wrong, and what must come of it. */
export interface PlannedRun {
  readonly run: string;
  readonly vessel: string;
  readonly startsAt: string;
  readonly practice: PracticeName;
  readonly workOrder: string;
  readonly operator: string;
  readonly parts: readonly PlannedPart[];
  readonly barometerMbar: number;
  readonly isBarometerRecorded: boolean;
  readonly programme?: Programme;
  readonly pressure?: PressureProgramme;
  /** Lines whose trap is fouled, and until which minute. */
  readonly fouledLines?: readonly { readonly line: string; readonly untilMin: number; readonly pumpMin: number }[];
  readonly mishaps?: readonly Mishap[];
  readonly faults?: readonly SensorFault[];
  readonly recorderMishaps?: readonly RecorderMishap[];
  readonly corrections?: Readonly<Record<string, readonly (readonly [number, number])[]>>;
  readonly uncertainty?: number;
  readonly decisions?: readonly PlannedDecision[];
  readonly notes?: readonly { readonly minute: number; readonly text: string; readonly by: string }[];
  /** What is so by construction. */
  readonly expected: {
    readonly verdict: Verdict;
    /** Limits that are not met, or that cannot be told, and no others. */
    readonly notMet?: readonly string[];
    readonly cannotTell?: readonly string[];
  };
}
