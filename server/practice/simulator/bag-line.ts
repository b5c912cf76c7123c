/** One vacuum line from the pump to a bag. Vacuum in bar below ambient. */
export interface BagLine {
  readonly name: string;
  /** What the pump reaches. */
  readonly sourceBar: number;
  /** Time constant of pumping the bag down; a fouled trap or a pinched hose makes it long. */
  readonly pumpMin: number;
  /** Share of the vacuum that leaks away in a minute. */
  readonly leakPerMin: number;
  /** Minute the pump is opened to the bag. */
  readonly opensMin?: number;
  /** Trap fouled until this minute of the run: `pumpMin` is this until then. */
  readonly fouled?: { readonly untilMin: number; readonly pumpMin: number };
}

export interface BagState {
  readonly vacuumBar: number;
  advance(
    stepS: number,
    minute: number,
    options: { powered: boolean; isVented: boolean; leakPerMin: number; gaugeBar: number },
  ): void;
}

/** Opening to atmosphere empties a line in about this time. */
const VENT_MIN = 0.35;
/** Vessel pressure presses gas through the same hole: bar each minute for 1/min of leak and 1 bar gauge. */
const PRESSED_IN = 0.02;

/** Pump-down, leak, and venting to atmosphere: a vented bag that leaks reads above atmosphere. */
export function beginBag(line: BagLine): BagState {
  let vacuumBar = 0;

  const advance: BagState['advance'] = (stepS, minute, { powered, isVented, leakPerMin, gaugeBar }) => {
    const leak = line.leakPerMin + leakPerMin;
    const isPumping = powered && !isVented && minute >= (line.opensMin ?? 0);
    const pumpMin = line.fouled && minute < line.fouled.untilMin ? line.fouled.pumpMin : line.pumpMin;
    const out = isPumping ? 1 / pumpMin : isVented ? 1 / VENT_MIN : 0;
    const towardsBar = isPumping ? line.sourceBar : 0;
    const total = out + leak;
    const restBar = total === 0 ? vacuumBar : (out * towardsBar - leak * PRESSED_IN * gaugeBar) / total;
    vacuumBar = restBar + (vacuumBar - restBar) * Math.exp((-total * stepS) / 60);
  };
  return {
    get vacuumBar() {
      return vacuumBar;
    },
    advance,
  };
}
