import { isDue, type Trigger } from './trigger.ts';

/** How the vessel is put under pressure and let down. Gauge pressure in bar. */
export interface PressureProgramme {
  readonly toBar: number;
  readonly barPerMin: number;
  readonly when: Trigger;
  /** A first, small pressure that is held until `when`. */
  readonly first?: { readonly toBar: number; readonly when: Trigger };
  readonly release: { readonly when: Trigger; readonly barPerMin: number };
}

export interface VesselPressure {
  readonly gaugeBar: number;
  readonly isReleased: boolean;
  advance(stepS: number, seen: Seen, options: { powered: boolean; lossBarPerMin: number }): void;
}

/** What triggers look at. */
export interface Seen {
  readonly minute: number;
  readonly leadingC: number;
  readonly laggingC: number;
  /** True from the programme's first cooling on. */
  readonly isCooling: boolean;
}

/** The valve opens this far below the pressure asked for, and shuts on it: the saw-tooth of a real record. */
const DEADBAND_BAR = 0.06;
const SEEPS_BAR_PER_MIN = 0.012;

/** Gas supply, regulator with a dead band, seals that seep, and the exhaust. */
export function beginPressure(programme: PressureProgramme | null): VesselPressure {
  let gaugeBar = 0;
  let isFilling = false;
  let isReleased = programme === null;
  let isExhausting = false;
  let stage = 0;

  const advance: VesselPressure['advance'] = (stepS, seen, { powered, lossBarPerMin }) => {
    if (programme === null) return;
    const stepMin = stepS / 60;
    if (stage === 0 && programme.first && isDue(programme.first.when, seen)) stage = 1;
    if (stage < 2 && isDue(programme.when, seen)) stage = 2;
    if (stage === 2 && seen.isCooling && isDue(programme.release.when, seen)) isExhausting = true;
    const askedBar = stage === 2 ? programme.toBar : stage === 1 ? (programme.first?.toBar ?? 0) : 0;

    gaugeBar = Math.max(0, gaugeBar - (SEEPS_BAR_PER_MIN + lossBarPerMin) * stepMin);
    if (isExhausting) {
      gaugeBar = Math.max(0, gaugeBar - Math.min(programme.release.barPerMin, 0.05 + gaugeBar) * stepMin);
      if (gaugeBar < 0.005) isReleased = true;
      return;
    }
    if (!powered || askedBar === 0) return;
    if (gaugeBar < askedBar - DEADBAND_BAR) isFilling = true;
    if (!isFilling) return;
    gaugeBar = Math.min(askedBar, gaugeBar + programme.barPerMin * stepMin);
    if (gaugeBar >= askedBar) isFilling = false;
  };
  return {
    get gaugeBar() {
      return gaugeBar;
    },
    get isReleased() {
      return isReleased;
    },
    advance,
  };
}
