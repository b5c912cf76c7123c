import type { LiveScan, LiveSource, SourceKind } from '../../../models/log/live-source.ts';
import type { Pushed } from '../../contract/live.ts';
import type { InventVessel } from './invented-vessel.ts';

/** How a source does: `because` says what is wrong, though it may have been reached; null where nothing is. */
export type Tell = (state: 'reached' | 'cannot-be-reached', because: string | null) => void;

export interface SourceParts {
  readonly document: LiveSource;
  readonly password?: string | undefined;
  /** Takes scans; resolves when they are on the disk. */
  readonly take: (scans: readonly LiveScan[]) => Promise<Pushed>;
  readonly tell: Tell;
  /** Keeps a sentence that someone may want to read later: what was repaired or left out. */
  readonly note: (sentence: string) => void;
  /** Told of a fault of our own, which must not end the program: other vessels are listened to. */
  readonly fault: (error: unknown) => void;
  /** The vessel's time, ms since 1970-01-01T00:00:00Z: the steady clock, or an invented vessel's own. */
  readonly now: () => number;
  /** What is kept of the source already; null where nothing is. */
  readonly kept: KeptScans | null;
  /** Makes invented vessels; null where no practice is to be had. */
  readonly inventVessel: InventVessel | null;
}

export interface KeptScans {
  /** Of an invented vessel the first scan kept under the settings that hold now; else null. */
  readonly firstMs: number | null;
  readonly lastMs: number;
}

export interface RunningSource {
  /** Ends it, once what was begun is done. */
  close(): Promise<void>;
}

/** A channel as it reads now: raw, and in its unit where it is a reading; `because` says why it is absent. */
export interface TriedChannel {
  readonly channel: string;
  readonly unit: string;
  readonly raw: number | null;
  readonly value: number | null;
  readonly because: string | null;
}

/** One scan as a kind of source answers it, and why figures are absent. */
export interface OneScan {
  readonly figures: Float64Array;
  readonly because: readonly (string | null)[];
}

export type ReadOnceParts = Pick<SourceParts, 'document' | 'password' | 'now' | 'inventVessel'>;

/** What a kind of source can do. It reads; there is nothing here by which anything could be told to a vessel. */
export interface SourceDriver {
  start(parts: SourceParts): RunningSource;
  /** One reading, keeping nothing. */
  readOnce(parts: ReadOnceParts): Promise<OneScan>;
}

/** The driver of a kind, loaded when it is first needed; null where the readings come by themselves. */
export async function driverOf(kind: SourceKind): Promise<SourceDriver | null> {
  switch (kind) {
    case 'modbus-tcp':
    case 'modbus-rtu':
      return (await import('./modbus.ts')).modbus;
    case 'mqtt':
      return (await import('./mqtt.ts')).mqtt;
    case 'growing-files':
      return (await import('./growing-files.ts')).growingFiles;
    case 'practice':
      return (await import('./practice.ts')).practice;
    case 'push':
    case 'gauge':
      return null;
  }
}
