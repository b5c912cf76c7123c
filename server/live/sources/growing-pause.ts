const FIRST_MS = 1000;
const LONGEST_MS = 60_000;

/** Pauses between attempts: each twice the one before, up to a minute. */
export interface GrowingPause {
  /** The instant before which nothing is to be tried. */
  readonly untilMs: number;
  failed(nowMs: number): void;
  succeeded(): void;
}

export function growingPause(firstMs = FIRST_MS): GrowingPause {
  let nextMs = firstMs;
  let untilMs = -Infinity;
  return {
    get untilMs() {
      return untilMs;
    },
    failed(nowMs) {
      untilMs = nowMs + nextMs;
      nextMs = Math.min(LONGEST_MS, nextMs * 2);
    },
    succeeded() {
      nextMs = firstMs;
      untilMs = -Infinity;
    },
  };
}
