/** The last stretch of a temperature history: enough to say what it was `spanS` ago, straight lines between scans. */
export class RecentTemperatures {
  readonly spanS: number;
  #timeS = new Float64Array(64);
  #temperatureK = new Float64Array(64);
  #count = 0;

  constructor(spanS: number) {
    this.spanS = spanS;
  }

  push(timeS: number, temperatureK: number): void {
    if (this.#count === this.#timeS.length) this.#makeRoom();
    this.#timeS[this.#count] = timeS;
    this.#temperatureK[this.#count] = temperatureK;
    this.#count += 1;
  }

  /** Temperature at a moment within the last `spanS`; that of the nearer end outside what is kept. */
  at(timeS: number): number {
    const next = this.#firstAfter(timeS);
    if (next === 0) return this.#temperatureK[0]!;
    if (next === this.#count) return this.#temperatureK[next - 1]!;
    const [s0, s1] = [this.#timeS[next - 1]!, this.#timeS[next]!];
    const [k0, k1] = [this.#temperatureK[next - 1]!, this.#temperatureK[next]!];
    return k0 + ((k1 - k0) * (timeS - s0)) / (s1 - s0);
  }

  /** Scan times strictly between two moments, rising. */
  scansBetween(fromS: number, toS: number): number[] {
    const found: number[] = [];
    for (let i = this.#firstAfter(fromS); i < this.#count && this.#timeS[i]! < toS; i += 1) found.push(this.#timeS[i]!);
    return found;
  }

  copy(): RecentTemperatures {
    const copied = new RecentTemperatures(this.spanS);
    copied.#timeS = this.#timeS.slice();
    copied.#temperatureK = this.#temperatureK.slice();
    copied.#count = this.#count;
    return copied;
  }

  /** Index of the first scan later than a moment. */
  #firstAfter(timeS: number): number {
    let low = 0;
    let high = this.#count;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.#timeS[middle]! <= timeS) low = middle + 1;
      else high = middle;
    }
    return low;
  }

  /** Forgets the scans that no moment still to come looks back to; doubles the room where most are still needed. */
  #makeRoom(): void {
    const latestS = this.#timeS[this.#count - 1]!;
    const first = Math.max(0, this.#firstAfter(latestS - this.spanS) - 1);
    const kept = this.#count - first;
    const room = kept * 2 > this.#timeS.length ? this.#timeS.length * 2 : this.#timeS.length;
    const timeS = new Float64Array(room);
    const temperatureK = new Float64Array(room);
    timeS.set(this.#timeS.subarray(first, this.#count));
    temperatureK.set(this.#temperatureK.subarray(first, this.#count));
    this.#timeS = timeS;
    this.#temperatureK = temperatureK;
    this.#count = kept;
  }
}
