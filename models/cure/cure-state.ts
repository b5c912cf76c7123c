/** Where a cure stands after a scan: what one piece of its history hands to the next. */
export interface CureState {
  alpha: number;
  /** Branch of the law that holds. */
  branch: number;
  /** Length of step to try next, s. */
  stepS: number;
  /** The last scan; NaN before the first. */
  timeS: number;
  temperatureK: number;
  /** Time spent outside the resin's valid range, s. */
  outsideValidS: number;
}

/** Below this nothing is left that a double could still show: the rest has reacted. */
export const NOTHING_LEFT = 1e-15;

/** The coldest and hottest a channel's reading may be (−200 to 1372 °C), in K. */
export const BELIEVABLE_K = [73.15, 1645.15] as const;
