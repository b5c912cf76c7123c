/** The median of the intervals between scans so far, in ms. */
export class MedianInterval {
  readonly #count = new Map<number, number>();
  readonly #rising: number[] = [];
  #total = 0;

  push(intervalMs: number): void {
    const count = this.#count.get(intervalMs);
    this.#count.set(intervalMs, (count ?? 0) + 1);
    this.#total++;
    if (count !== undefined) return;
    let at = this.#rising.length;
    while (at > 0 && this.#rising[at - 1]! > intervalMs) at--;
    this.#rising.splice(at, 0, intervalMs);
  }

  /** Lower median; null before the second scan. */
  medianMs(): number | null {
    let seen = 0;
    for (const intervalMs of this.#rising) {
      seen += this.#count.get(intervalMs)!;
      if (2 * seen >= this.#total) return intervalMs;
    }
    return null;
  }
}
