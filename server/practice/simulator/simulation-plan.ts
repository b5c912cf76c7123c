import type { Resin } from '../../../models/cure/resin.ts';
import type { Cycle } from '../../../models/cycle/cycle.ts';
import type { Exclusion, LoadPart } from '../../../models/run/load.ts';
import type { VesselPhysics } from './air.ts';
import type { BagLine } from './bag-line.ts';
import type { Mishap } from './mishaps.ts';
import type { Point } from './point.ts';
import type { Programme } from './programme.ts';
import type { Recorder } from './recorder.ts';
import type { RecorderMishap } from './recorder-mishaps.ts';
import type { SensorFault } from './sensor-faults.ts';
import type { PressureProgramme } from './vessel-pressure.ts';

/** A thermocouple of the load, and the column of tool and laminate it lies in. */
export interface PlannedSensor {
  readonly channel: string;
  readonly parts?: readonly string[];
  readonly place?: string;
  readonly uncertainty?: number;
  readonly corrections?: readonly (readonly [number, number])[];
  readonly point: Point;
}

/** Everything one run is made of: what the vessel is told, what lies in it, what goes wrong, and who writes it down. */
export interface SimulationPlan {
  /** Name of the record: the file is named for it. */
  readonly run: string;
  /** ISO instant of the first scan. */
  readonly startsAt: string;
  readonly recorder: Recorder;
  readonly cycle: Cycle;
  readonly resin: Resin;
  readonly workOrder?: string;
  readonly vessel: VesselPhysics;
  readonly ambientC: number;
  readonly barometerMbar: number;
  /** Whether the load document carries it. */
  readonly isBarometerRecorded: boolean;
  readonly programme: Programme;
  readonly pressure: PressureProgramme | null;
  readonly ventsAtBar: number | null;
  readonly lines: readonly BagLine[];
  readonly parts: readonly LoadPart[];
  readonly sensors: readonly PlannedSensor[];
  readonly exclusions?: readonly Exclusion[];
  readonly mishaps?: readonly Mishap[];
  readonly faults?: readonly SensorFault[];
  readonly recorderMishaps?: readonly RecorderMishap[];
  readonly tailMin?: number;
}
