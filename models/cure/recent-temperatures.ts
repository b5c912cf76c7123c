/** The last stretch of a temperature history: enough to say what it was `spanS` ago, straight lines between scans. */
export class RecentTemperatures {
  readonly spanS: number;
  #timeS: number[] = [];
  #temperatureK: number[] = [];
  /** Index of the oldest scan still needed. */
  #first = 0;

  constructor(spanS: number) {
    this.spanS = spanS;
  }

  push(timeS: number, temperatureK: number): void {
    this.#timeS.push(timeS);
    this.#temperatureK.push(temperatureK);
  }

  /** Forgets what lies further back than `spanS` before a moment. */
  forgetBefore(timeS: number): void {
    const oldestS = timeS - this.spanS;
    while (this.#first + 1 < this.#timeS.length && this.#timeS[this.#first + 1]! <= oldestS) this.#first += 1;
    if (this.#first > 1024 && this.#first > this.#timeS.length / 2) {
      this.#timeS = this.#timeS.slice(this.#first);
      this.#temperatureK = this.#temperatureK.slice(this.#first);
      this.#first = 0;
    }
  }

  /** Temperature at a moment not before the oldest scan kept nor after the latest; that of the nearer end otherwise. */
  at(timeS: number): number {
    let low = this.#first;
    let high = this.#timeS.length - 1;
    if (timeS <= this.#timeS[low]!) return this.#temperatureK[low]!;
    if (timeS >= this.#timeS[high]!) return this.#temperatureK[high]!;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (this.#timeS[middle]! <= timeS) low = middle;
      else high = middle;
    }
    const share = (timeS - this.#timeS[low]!) / (this.#timeS[high]! - this.#timeS[low]!);
    return this.#temperatureK[low]! + share * (this.#temperatureK[high]! - this.#temperatureK[low]!);
  }

  /** Scan times strictly between two moments, rising. */
  scansBetween(fromS: number, toS: number): number[] {
    const found: number[] = [];
    for (let i = this.#first; i < this.#timeS.length && this.#timeS[i]! < toS; i += 1) {
      if (this.#timeS[i]! > fromS) found.push(this.#timeS[i]!);
    }
    return found;
  }

  copy(): RecentTemperatures {
    const copied = new RecentTemperatures(this.spanS);
    copied.#timeS = this.#timeS.slice(this.#first);
    copied.#temperatureK = this.#temperatureK.slice(this.#first);
    return copied;
  }
}
