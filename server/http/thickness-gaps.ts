import type { ThicknessFound } from './thickness-view.ts';

/** A stretch of the run in which a face is not known from readings. */
export interface ThicknessGap {
  readonly channel: string;
  readonly fromMs: number;
  readonly lastsMs: number;
  /** Whether a straight line stands for it; else the answer does not cover it. */
  readonly isBridged: boolean;
}

/**
 * Holes of the faces' histories that are longer than the cycle's `longestGap` (where none is written, than 5 usual
 * intervals and 60 s), and what they leave out of the run at its ends.
 */
export function thicknessGaps({ cycle, asked: { history, channels, sensors } }: ThicknessFound): ThicknessGap[] {
  const { timeS, beginsMs, longestGaps } = history;
  const intervals = timeS.slice(1).map((at, i) => at - (timeS[i] ?? 0));
  const usualS = intervals.sort()[Math.floor(intervals.length / 2)] ?? 0;
  const written = cycle?.log?.longestGap;
  const longestMs = written === undefined ? 1000 * Math.max(60, 5 * usualS) : 60_000 * written;
  const scansMs = sensors[0]?.readings.timeMs ?? new Float64Array(0);
  const untilMs = beginsMs + 1000 * (timeS.at(-1) ?? 0);
  const [firstMs, lastMs] = [scansMs[0] ?? beginsMs, scansMs.at(-1) ?? untilMs];
  const all = channels.join(', ');
  return [
    { channel: all, fromMs: firstMs, lastsMs: beginsMs - firstMs, isBridged: false },
    ...longestGaps.map((gap, n) => ({ ...gap, channel: channels[n] ?? '', isBridged: true })),
    { channel: all, fromMs: untilMs, lastsMs: lastMs - untilMs, isBridged: false },
  ].filter(({ lastsMs }) => lastsMs > longestMs);
}
