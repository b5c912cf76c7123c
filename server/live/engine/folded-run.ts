import { setImmediate as nextTurn } from 'node:timers/promises';
import type { ChannelLayout } from '../../../models/log/layout.ts';
import { type ReadLog, scaledReading } from '../../../models/log/readings.ts';
import { judgedChannels } from '../../../models/run/channel.ts';
import { beginRun, type RunDigest } from '../../../models/run/digest.ts';
import type { Load } from '../../../models/run/load.ts';
import type { ScanRow } from './scan-order.ts';

/** A run folded as far as it has come, and what its figures are as they are judged. */
export interface FoldedRun {
  readonly digest: RunDigest;
  readonly channels: readonly string[];
  /** Adds a row; answers it as judged: °C, Pa, or the channel's own unit where it is neither. */
  accept(row: ScanRow): Float64Array;
}

/** Scans folded between two turns of the loop: a few ms. */
const SCANS_AT_ONCE = 500;

/** A run with channels of a log and nothing in it yet. */
export function beginFolding({ readings }: ReadLog, load: Load | null): FoldedRun {
  const layouts = readings.channels.map(({ channel }) => channel);
  const digest = beginRun(layouts, load);
  const asJudged = judging(layouts, load);
  return {
    digest,
    channels: layouts.map(({ name }) => name),
    accept({ timeMs, figures }) {
      digest.accept(timeMs, figures);
      return asJudged(figures);
    },
  };
}

/** Rows of a log as they are judged, numbered from 1: those after the first `after`, up to the `until`th. */
export function foldedRows(log: ReadLog, load: Load | null, after: number, until: number) {
  const { timeMs, channels } = log.readings;
  const asJudged = judging(
    channels.map(({ channel }) => channel),
    load,
  );
  return Array.from({ length: Math.max(0, Math.min(until, timeMs.length) - after) }, (_, k) => {
    const scan = after + k;
    const figures = Float64Array.from(channels, ({ value }) => value[scan] ?? Number.NaN);
    return { n: scan + 1, timeMs: timeMs[scan] ?? Number.NaN, values: asJudged(figures) };
  });
}

/** Figures of a scan as they are judged: °C, Pa, or the channel's own unit where it is neither. */
function judging(layouts: readonly ChannelLayout[], load: Load | null) {
  const judged = judgedChannels(layouts, load);
  return (read: ArrayLike<number>) =>
    Float64Array.from(layouts, (layout, n) => {
      const figure = read[n] ?? Number.NaN;
      return judged[n]?.judgedReading(figure) ?? scaledReading(figure, layout);
    });
}

/** Folds what is kept of a run up to an instant, in portions: whatever else there is to do goes on between them. */
export async function foldKept(folded: FoldedRun, { readings }: ReadLog, untilMs: number): Promise<void> {
  const { timeMs, channels } = readings;
  const figures = new Float64Array(channels.length);
  for (let scan = 0; scan < timeMs.length; scan += 1) {
    const at = timeMs[scan] ?? Number.NaN;
    if (at > untilMs) return;
    for (const [n, { value }] of channels.entries()) figures[n] = value[scan] ?? Number.NaN;
    folded.accept({ timeMs: at, figures });
    if (scan % SCANS_AT_ONCE === SCANS_AT_ONCE - 1) await nextTurn();
  }
}
