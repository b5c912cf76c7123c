/** A row of figures that grows at its end; only the first `length` of `value` count. */
export class GrowingRow {
  length = 0;
  value = new Float64Array(64);

  push(value: number): void {
    const i = this.length;
    if (i === this.value.length) {
      const grown = new Float64Array(4 * i);
      grown.set(this.value);
      this.value = grown;
    }
    this.value[i] = value;
    this.length = i + 1;
  }
}
