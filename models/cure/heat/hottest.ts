/** Where and when a stack was hottest. */
export interface Hottest {
  readonly temperatureK: number;
  readonly positionM: number;
  readonly timeS: number;
}

/** The top of the parabola through three points, if the middle one is the greatest; else the middle point itself. */
export function parabolaTop(
  x: readonly [number, number, number],
  y: readonly [number, number, number],
): readonly [number, number] {
  const [before, after] = [(y[1] - y[0]) / (x[1] - x[0]), (y[2] - y[1]) / (x[2] - x[1])];
  const curvature = (after - before) / (x[2] - x[0]);
  if (!(curvature < 0 && before >= 0 && after <= 0)) return [x[1], y[1]];
  // y = y1 + s (x − x1) + curvature (x − x1)², s the slope at x1.
  const slope = before + curvature * (x[1] - x[0]);
  return [x[1] - slope / (2 * curvature), y[1] - (slope * slope) / (4 * curvature)];
}

/** Keeps the hottest place and moment of a stack while its steps go by. */
export class HottestWatch {
  readonly #positionM: Float64Array;
  /** The last three steps: time, temperature and place of their hottest point. */
  #steps: Hottest[] = [];
  #hottest: Hottest | null = null;

  constructor(positionM: Float64Array) {
    this.#positionM = positionM;
  }

  accept(timeS: number, temperatureK: Float64Array): void {
    let node = 0;
    for (let i = 1; i < temperatureK.length; i += 1) if (temperatureK[i]! > temperatureK[node]!) node = i;
    let [positionM, hottestK] = [this.#positionM[node]!, temperatureK[node]!];
    if (node > 0 && node < temperatureK.length - 1) {
      [positionM, hottestK] = parabolaTop(
        [this.#positionM[node - 1]!, positionM, this.#positionM[node + 1]!],
        [temperatureK[node - 1]!, hottestK, temperatureK[node + 1]!],
      );
    }
    const step = { timeS, positionM, temperatureK: hottestK };
    this.#steps = [...this.#steps.slice(-2), step];
    const [first, middle, last] = this.#steps;
    if (first !== undefined && middle !== undefined && last !== undefined) {
      const [topS, topK] = parabolaTop(
        [first.timeS, middle.timeS, last.timeS],
        [first.temperatureK, middle.temperatureK, last.temperatureK],
      );
      this.#keep({ timeS: topS, positionM: middle.positionM, temperatureK: topK });
    }
    this.#keep(step);
  }

  hottest(): Hottest | null {
    return this.#hottest;
  }

  #keep(candidate: Hottest): void {
    if (this.#hottest === null || candidate.temperatureK > this.#hottest.temperatureK) this.#hottest = candidate;
  }
}
