/** Index of the first scan at or after an instant; the number of scans where there is none. */
export function scanAtOrAfter(timeMs: Float64Array, instantMs: number): number {
  let low = 0;
  let high = timeMs.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (timeMs[mid]! < instantMs) low = mid + 1;
    else high = mid;
  }
  return low;
}
