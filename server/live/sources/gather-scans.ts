import type { LiveScan } from '../../../models/log/live-source.ts';
import type { ChannelFigure } from './mqtt-message.ts';

/** Figures that arrive one by one, made into scans. */
export interface Gathering {
  add(timeMs: number, sequence: number | null, figures: readonly ChannelFigure[]): void;
  /** Makes a scan of what has come so far. */
  flush(): void;
}

/**
 * Makes a scan of the figures that arrive within an interval of the first: at once where every channel has come, and
 * where one comes again or belongs to another instant. A figure is in one scan; what did not come is absent, and is
 * never taken from the scan before. The scan's instant is that of its latest figure.
 */
export function gatherScans(channels: number, intervalMs: number, take: (scan: LiveScan) => void): Gathering {
  let figures = new Float64Array(channels).fill(NaN);
  let come = new Set<number>();
  let latestMs = 0;
  let counted: number | null = null;
  let timer: NodeJS.Timeout | undefined;

  const flush = () => {
    clearTimeout(timer);
    if (come.size === 0) return;
    const scan = { timeMs: latestMs, sequence: counted, figures };
    figures = new Float64Array(channels).fill(NaN);
    come = new Set();
    take(scan);
  };
  return {
    flush,
    add(timeMs, sequence, some) {
      const belongs = Math.abs(timeMs - latestMs) <= intervalMs && some.every(({ channel }) => !come.has(channel));
      if (!belongs) flush();
      if (come.size === 0) {
        latestMs = timeMs;
        counted = sequence;
        timer = setTimeout(flush, intervalMs);
      }
      latestMs = Math.max(latestMs, timeMs);
      if (counted !== sequence) counted = null;
      for (const { channel, figure } of some) {
        figures[channel] = figure;
        come.add(channel);
      }
      if (come.size === channels) flush();
    },
  };
}
