import { scaledReading } from '../../../models/log/readings.ts';
import { channelsOfSource } from '../../../models/log/source-channels.ts';
import { asTemperature, scanOfEmf } from '../../../models/log/temperatures-of-emf.ts';
import type { LiveReading } from '../../contract/live.ts';
import type { Db } from '../../store/database.ts';
import { isoFromMs } from '../../store/instants.ts';
import { findLastScan } from '../../store/live-readings.ts';
import type { LiveSettings, LiveSourceRow } from '../../store/live-sources.ts';
import type { KeptEvent } from '../journal.ts';

/** A reading older than so many intervals of its source is stale. */
const STALE_INTERVALS = 5;
const STALE_MS = 10_000;

interface Latest {
  /** In the channel's unit. */
  readonly value: number;
  readonly timeMs: number;
}

/** The latest reading of every channel of every source, whether or not a run is open. */
export class LatestReadings {
  readonly #bySource = new Map<number, Map<string, Latest>>();

  /** What was kept last of a source, when the program starts. */
  begin(db: Db, { id, settings }: LiveSourceRow): void {
    const last = findLastScan(db, id);
    if (last !== undefined) this.#note(settings, last.timeMs, last.figures);
  }

  take({ settings, scans }: KeptEvent): void {
    for (const { timeMs, figures } of scans) this.#note(settings, timeMs, figures);
  }

  /** Readings of a source, stale ones told so. */
  of({ id, settings }: LiveSourceRow, nowMs: number): LiveReading[] {
    const latest = this.#bySource.get(id);
    const staleMs = Math.max(STALE_MS, STALE_INTERVALS * 1000 * settings.document.intervalS);
    return channelsOfSource(settings.document).map((channel) => {
      const { name, role, unit } = asTemperature(channel);
      const one = latest?.get(name);
      return {
        channel: name,
        role,
        unit,
        value: one?.value ?? null,
        at: one === undefined ? null : isoFromMs(one.timeMs),
        isStale: one === undefined || nowMs - one.timeMs > staleMs,
      };
    });
  }

  #note({ sourceId, document }: LiveSettings, timeMs: number, figures: ArrayLike<number>): void {
    const latest = this.#bySource.get(sourceId) ?? new Map<string, Latest>();
    this.#bySource.set(sourceId, latest);
    const read = scanOfEmf(document.channels)(figures);
    for (const [n, written] of document.channels.entries()) {
      const channel = asTemperature(written);
      const figure = read[n] ?? Number.NaN;
      const before = latest.get(channel.name);
      if (Number.isNaN(figure) || (before !== undefined && before.timeMs >= timeMs)) continue;
      latest.set(channel.name, { value: scaledReading(figure, channel), timeMs });
    }
  }
}
