/** Lets through so many a second, and some seconds' worth at once where it was quiet before. */
export interface FloodGate {
  readonly perSecond: number;
  /** Whether `count` more may pass now. */
  admits(count: number, nowMs: number): boolean;
}

const AT_ONCE_S = 10;
const MOST_PER_SECOND = 200;
const TIMES_THE_RATE = 20;

/** Most scans a second that are taken of a source: twenty times as many as it is meant to send, and never above 200. */
export function mostScansPerSecond(intervalS: number): number {
  return Math.min(MOST_PER_SECOND, TIMES_THE_RATE / intervalS);
}

/** A bucket of tokens: Tanenbaum & Wetherall, Computer Networks, 5th ed., 5.4.2. */
export function floodGate(perSecond: number): FloodGate {
  const most = Math.max(1, perSecond * AT_ONCE_S);
  let tokens = most;
  let lastMs = -Infinity;
  return {
    perSecond,
    admits(count, nowMs) {
      tokens = Math.min(most, tokens + (Math.max(0, nowMs - lastMs) / 1000) * perSecond);
      lastMs = nowMs;
      if (count > tokens) return false;
      tokens -= count;
      return true;
    },
  };
}
