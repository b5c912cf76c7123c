/** What goes wrong in the vessel, by the minute of the run. What goes wrong in the recorder is elsewhere. */
export type Mishap =
  | {
      readonly kind: 'power-cut';
      readonly fromMin: number;
      readonly untilMin: number;
      /** Whether the controller's programme stood still, or its clock ran on. */
      readonly clockRanOn?: boolean;
    }
  | { readonly kind: 'heater-weak'; readonly fromMin: number; readonly untilMin: number; readonly dropC: number }
  | {
      readonly kind: 'bag-leak';
      readonly line: string;
      readonly fromMin: number;
      readonly untilMin: number;
      readonly perMin: number;
    }
  | { readonly kind: 'pressure-loss'; readonly fromMin: number; readonly untilMin: number; readonly barPerMin: number };

/** What holds at one minute. */
export interface Conditions {
  readonly powered: boolean;
  readonly programmeRuns: boolean;
  /** The controller's own sensor reads this much too high, so the air stays this much too cold. */
  readonly setpointDropC: number;
  readonly lossBarPerMin: number;
  readonly leakPerMin: (line: string) => number;
}

export function conditionsAt(mishaps: readonly Mishap[], minute: number): Conditions {
  const now = mishaps.filter((mishap) => minute >= mishap.fromMin && minute < mishap.untilMin);
  const cut = now.find((mishap) => mishap.kind === 'power-cut');
  return {
    powered: cut === undefined,
    programmeRuns: cut === undefined || cut.clockRanOn === true,
    setpointDropC: now.reduce((sum, mishap) => sum + (mishap.kind === 'heater-weak' ? mishap.dropC : 0), 0),
    lossBarPerMin: now.reduce((sum, mishap) => sum + (mishap.kind === 'pressure-loss' ? mishap.barPerMin : 0), 0),
    leakPerMin: (line) =>
      now.reduce((sum, mishap) => sum + (mishap.kind === 'bag-leak' && mishap.line === line ? mishap.perMin : 0), 0),
  };
}
