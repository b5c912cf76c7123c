import type { SOURCE_STATES } from '../contract/live.ts';

export type SourceState = (typeof SOURCE_STATES)[number];

export interface Condition {
  readonly state: SourceState;
  /** Ms since 1970-01-01T00:00:00Z. */
  readonly sinceMs: number;
  readonly because: string | null;
}

/** What is known of a source while the program runs. */
export interface SourceCondition {
  /** A scan was kept. */
  sent(nowMs: number): void;
  told(state: 'reached' | 'cannot-be-reached', because: string | null, nowMs: number): void;
  at(nowMs: number): Condition;
}

/** Silent is what has sent nothing for so many of its intervals. */
const SILENT_INTERVALS = 5;

/** Follows one source by the steady clock. Until five intervals have passed it is not called silent. */
export function sourceCondition(intervalS: number, beganMs: number): SourceCondition {
  const silentAfterMs = SILENT_INTERVALS * intervalS * 1000;
  let lastMs: number | null = null;
  let sendsSinceMs = beganMs;
  let unreachedSinceMs: number | null = null;
  let because: string | null = null;
  return {
    sent(nowMs) {
      if (lastMs === null || nowMs - lastMs > silentAfterMs) sendsSinceMs = nowMs;
      lastMs = nowMs;
    },
    told(state, why, nowMs) {
      because = why;
      if (state === 'reached') unreachedSinceMs = null;
      else unreachedSinceMs ??= nowMs;
    },
    at(nowMs) {
      if (unreachedSinceMs !== null) return { state: 'cannot-be-reached', sinceMs: unreachedSinceMs, because };
      const silentSinceMs = (lastMs ?? beganMs) + silentAfterMs;
      if (nowMs <= silentSinceMs) {
        return {
          state: 'sending',
          sinceMs: sendsSinceMs,
          because: because ?? (lastMs === null ? 'Nothing yet' : null),
        };
      }
      const since = lastMs === null ? 'Nothing since the program began to listen' : 'Nothing for five intervals';
      return { state: 'silent', sinceMs: silentSinceMs, because: because === null ? since : `${since}; ${because}` };
    },
  };
}
