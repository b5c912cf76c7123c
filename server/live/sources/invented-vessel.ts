import type { ChannelLayout } from '../../../models/log/layout.ts';

/** What an invented vessel is asked to run. */
export interface InventedProgramme {
  readonly cycle: { readonly code: string; readonly issue: string };
  readonly channels: readonly ChannelLayout[];
  /** By the vessel's own time. */
  readonly intervalS: number;
  /** The same seed gives the same figures. */
  readonly seed: number;
}

/** One programme from cold to cold, scan by scan, over and over: no two rounds show the same noise. */
export interface InventedRun {
  readonly scans: number;
  /** [channels], before `scale` and `offset`; NaN is absent. */
  figures(scan: number, round: number): Float64Array;
}

/**
 * Plays a released cycle in an invented vessel. Whoever starts the program hands it in, and only to a practice workshop.
 *
 * @throws {DomainError} where the cycle is not there or not released, or a channel is none a vessel has.
 */
export type InventVessel = (programme: InventedProgramme) => InventedRun;
