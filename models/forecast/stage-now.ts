import type { Stage } from '../cycle/cycle.ts';
import type { Dwells } from '../evaluation/dwells.ts';
import { heatOnMs } from '../evaluation/events.ts';
import type { Judgement } from '../evaluation/judgement.ts';
import { celsiusFrom } from '../units.ts';

/** Where in its cycle a part is. */
export interface StageNow {
  readonly stage: Stage;
  /** Place among the cycle's stages. */
  readonly index: number;
  /** Place among its dwells of the one it is in, or of the next. */
  readonly dwell: number;
  readonly sinceMs: number;
}

/** The stage a part is in by its own sensors; null before heat-on, and after the last. */
export function stageNow(j: Judgement, dwells: Dwells): StageNow | null {
  const beganMs = heatOnMs(j);
  if (beganMs === null) return null;
  const { stages } = j.cycle;
  let now: StageNow = { stage: stages[0]!, index: 0, dwell: 0, sinceMs: beganMs };
  let dwell = 0;
  for (const [index, stage] of stages.entries()) {
    if (stage.kind !== 'dwell') continue;
    const opensMs = dwells.opensMs(dwell, 'least');
    if (opensMs !== null) {
      now = { stage, index, dwell, sinceMs: opensMs };
      const closedMs = movedOnMs(dwells, dwell);
      const next = stages[index + 1];
      if (closedMs !== null && next === undefined) return null;
      if (closedMs !== null) now = { stage: next!, index: index + 1, dwell: dwell + 1, sinceMs: closedMs };
    }
    dwell++;
  }
  return isOver(j, now) ? null : now;
}

/** A dwell left upwards is behind, for now or for good; one left downwards only once it has cooled. */
function movedOnMs(dwells: Dwells, dwell: number): number | null {
  const { closing } = dwells.at(dwell, 'least').clock;
  return closing !== null && (closing.isUpwards || closing.isFinal) ? closing.ms : null;
}

/** The last cooling is over once every sensor has come down to where it is written to end. */
function isOver(j: Judgement, { stage, index, sinceMs }: StageNow): boolean {
  if (stage.kind !== 'cool' || stage.until === undefined || index < j.cycle.stages.length - 1) return false;
  const untilC = celsiusFrom(stage.until, j.cycle.units.temperature);
  return j.sensors.every(({ track, lastMs }) => track.lastMs > sinceMs && track.valueAt(lastMs) <= untilC);
}
