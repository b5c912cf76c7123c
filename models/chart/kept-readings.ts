/** Readings kept for drawing, and the group of which only first, lowest, highest and last will be. */
export class Kept {
  readonly #timeMs: Float64Array;
  readonly #value: Float64Array;
  readonly #keptMs: Float64Array;
  readonly #kept: Float64Array;
  #count = 0;
  #first = -1;
  #lowest = -1;
  #highest = -1;
  #last = -1;
  #low = 0;
  #high = 0;

  constructor(timeMs: Float64Array, value: Float64Array, room: number) {
    this.#timeMs = timeMs;
    this.#value = value;
    this.#keptMs = new Float64Array(room);
    this.#kept = new Float64Array(room);
  }

  /** Adds a reading to the group. */
  take(i: number, reading: number): void {
    if (this.#first < 0) {
      this.#first = i;
      this.#lowest = i;
      this.#highest = i;
      this.#low = reading;
      this.#high = reading;
    } else if (reading < this.#low) {
      this.#lowest = i;
      this.#low = reading;
    } else if (reading > this.#high) {
      this.#highest = i;
      this.#high = reading;
    }
    this.#last = i;
  }

  /** Ends the group and keeps its four readings, each once. */
  flush(): void {
    if (this.#first < 0) return;
    const [first, earlier, later, last] = [
      this.#first,
      Math.min(this.#lowest, this.#highest),
      Math.max(this.#lowest, this.#highest),
      this.#last,
    ];
    this.put(first);
    if (earlier !== first) this.put(earlier);
    if (later !== earlier) this.put(later);
    if (last !== later) this.put(last);
    this.#first = -1;
  }

  put(i: number): void {
    this.#enter(this.#timeMs[i]!, this.#value[i]!);
  }

  breakLine(timeMs: number): void {
    this.#enter(timeMs, Number.NaN);
  }

  entries(): { timeMs: Float64Array; value: Float64Array } {
    return { timeMs: this.#keptMs.subarray(0, this.#count), value: this.#kept.subarray(0, this.#count) };
  }

  #enter(timeMs: number, value: number): void {
    this.#keptMs[this.#count] = timeMs;
    this.#kept[this.#count] = value;
    this.#count += 1;
  }
}
