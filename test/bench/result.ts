/** One measured figure beside its goal. `ratio` is the value over a floor measured in the same run. */
export interface BenchResult {
  readonly name: string;
  readonly value: number;
  readonly unit: string;
  readonly floor: number | null;
  readonly ratio: number | null;
  readonly goal: string;
  readonly holds: boolean;
  readonly note?: string;
}

/** The middle one of some timings, in ms. */
export function medianMs(times: number, work: () => void): number {
  const taken = Array.from({ length: times }, () => {
    const startMs = performance.now();
    work();
    return performance.now() - startMs;
  });
  return taken.sort((a, b) => a - b)[Math.floor(times / 2)]!;
}
