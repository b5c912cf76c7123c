/** What the vessel's controller was told: ramps and soaks of the air (or platen, or blanket) setpoint. */
export type Segment =
  | { readonly kind: 'ramp'; readonly toC: number; readonly cPerMin: number }
  | {
      readonly kind: 'soak';
      readonly minutes: number;
      /** A guaranteed soak: its clock runs only while the lagging part thermocouple is at or above this. */
      readonly onceLaggingC?: number;
    };

export interface Programme {
  readonly segments: readonly Segment[];
  /** The ramp waits while air is further than this from the setpoint. */
  readonly holdBackC?: number;
}

export interface ProgrammeClock {
  readonly setpointC: number;
  /** The programme is cooling, or has ended: the cooler may run. */
  readonly mayCool: boolean;
  readonly hasEnded: boolean;
  advance(stepS: number, airC: number, laggingC: number): void;
}

/** Runs a programme from the start temperature. */
export function beginProgramme({ segments, holdBackC = 15 }: Programme, startC: number): ProgrammeClock {
  let at = 0;
  let setpointC = startC;
  let soakedMin = 0;
  let mayCool = false;

  const advance = (stepS: number, airC: number, laggingC: number): void => {
    const segment = segments[at];
    if (segment === undefined) return;
    const stepMin = stepS / 60;
    if (segment.kind === 'soak') {
      if (laggingC >= (segment.onceLaggingC ?? -Infinity)) soakedMin += stepMin;
      if (soakedMin < segment.minutes - 1e-9) return;
      soakedMin = 0;
      at += 1;
      return;
    }
    const isCooling = segment.toC < setpointC;
    if (isCooling) mayCool = true;
    const isAhead = isCooling ? airC - setpointC > holdBackC : setpointC - airC > holdBackC;
    if (isAhead) return;
    const stepC = segment.cPerMin * stepMin;
    if (Math.abs(segment.toC - setpointC) > stepC) {
      setpointC += isCooling ? -stepC : stepC;
      return;
    }
    setpointC = segment.toC;
    at += 1;
  };
  return {
    get setpointC() {
      return setpointC;
    },
    get mayCool() {
      return mayCool;
    },
    get hasEnded() {
      return at >= segments.length;
    },
    advance,
  };
}
