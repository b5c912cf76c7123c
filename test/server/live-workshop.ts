import type { LiveScan, LiveSource } from '../../models/log/live-source.ts';
import type { Db } from '../../server/store/database.ts';
import { insertLiveRun } from '../../server/store/live-runs.ts';
import { insertLiveSource, type LiveSettings, requireLiveSource } from '../../server/store/live-sources.ts';
import { insertRun } from '../../server/store/runs.ts';
import { insertVessel, requireVessel } from '../../server/store/vessels.ts';

export const DEED = { at: '2026-03-10T08:00:00.000Z', by: 'operator 1' };
export const BEGUN_MS = Date.parse('2026-03-10T08:00:00.000Z');

/** A push source of part thermocouples, TC1 to TCn, once a second. */
export function pushSource(name: string, channels = 3): LiveSource {
  return {
    format: 'dwellbook-source/1',
    name,
    intervalS: 1,
    reads: { kind: 'push' },
    channels: Array.from({ length: channels }, (_, n) => ({
      column: `t${n + 1}`,
      name: `TC${n + 1}`,
      role: 'part' as const,
      unit: '°C',
    })),
  };
}

/** A vessel with one source. */
export function addLiveVessel(
  db: Db,
  vessel: string,
  document: LiveSource,
): { readonly vesselId: number; readonly settings: LiveSettings } {
  insertVessel(db, { name: vessel, kind: 'autoclave' });
  const vesselId = requireVessel(db, vessel);
  const id = insertLiveSource(db, vesselId, { document, isResting: false, ...DEED });
  return { vesselId, settings: requireLiveSource(db, id).settings };
}

/** A run that is open from an instant on. */
export function openRun(db: Db, vesselId: number, begunMs = BEGUN_MS): number {
  const run = insertRun(db, { vesselId, fromMs: begunMs, untilMs: begunMs, ...DEED });
  insertLiveRun(db, run, vesselId, begunMs);
  return run;
}

export function scanAt(timeMs: number, ...figures: readonly number[]): LiveScan {
  return { timeMs, sequence: null, figures: Float64Array.from(figures) };
}
