import type { Cycle, DwellStage } from '../cycle/cycle.ts';
import { figure, lowerOf, upperOf } from '../cycle/words-of-figures.ts';
import type { PartEvaluation, StageRecord } from '../evaluation/evaluation.ts';
import type { Band, DipArc, Mark } from './chart.ts';
import { type DrawnChannel, shownAt } from './drawn-channel.ts';
import { findingOf, worstOf } from './outcomes.ts';
import { drawn } from './shown-unit.ts';
import { hoursOf, hoursOrEnd, type TimeScale } from './time-scale.ts';
import { wholeMinutes } from './whole-minutes.ts';

/** What is drawn of dwells: the band between opening and closing, the clock's marks, the dips. */
export interface DwellDrawing {
  readonly bands: readonly Band[];
  readonly marks: readonly Mark[];
  readonly dips: readonly DipArc[];
}

export function drawDwells(
  cycle: Cycle,
  part: PartEvaluation,
  channels: readonly DrawnChannel[],
  scale: TimeScale,
): DwellDrawing {
  const bands: Band[] = [];
  const marks: Mark[] = [];
  const dips: DipArc[] = [];
  for (const stage of cycle.stages) {
    const record = part.stages.find(({ name }) => name === stage.name);
    if (stage.kind !== 'dwell' || record === undefined || record.opens === null) continue;
    bands.push(bandOf(stage, record, part, scale));
    marks.push(...marksOf(record, channels, scale));
    dips.push(...dipsOf(stage, record, scale));
  }
  return { bands, marks, dips };
}

function bandOf(stage: DwellStage, record: StageRecord, part: PartEvaluation, scale: TimeScale): Band {
  const limits = ['time', 'longest', 'upper', 'lower'].map((limit) => `${stage.name}/${limit}`);
  return {
    strip: 'temperature',
    kind: 'dwell',
    fromH: hoursOrEnd(scale, record.opens),
    untilH: hoursOrEnd(scale, record.closes),
    low: lowerOf(stage),
    high: upperOf(stage),
    text: bandText(stage, record, part),
    limit: stage.time === undefined ? `${stage.name}/upper` : `${stage.name}/time`,
    outcome: worstOf(part, limits),
  };
}

/** `dwell 2 · 112 of 120 min` where time is short, else `dwell 1 · 78 min`. */
function bandText(stage: DwellStage, record: StageRecord, part: PartEvaluation): string {
  const time = findingOf(part, `${stage.name}/time`);
  const minutes = time?.observed ?? record.minutes;
  if (minutes === null) return stage.name;
  const least = time?.atLeast ?? null;
  const isShort = time !== undefined && time.outcome !== 'met' && least !== null && minutes < least;
  return `${stage.name} · ${wholeMinutes(minutes)}${isShort ? ` of ${figure(least)}` : ''} min`;
}

function marksOf(record: StageRecord, channels: readonly DrawnChannel[], scale: TimeScale): Mark[] {
  const marks: Mark[] = [];
  for (const [kind, instant, sensor] of [
    ['opens', record.opens, record.openedBy],
    ['closes', record.closes, record.closedBy],
  ] as const) {
    const atH = hoursOf(scale, instant);
    if (atH === null || instant === null) continue;
    const channel = channels.find(({ layout }) => layout.name === sensor);
    const value = channel === undefined ? null : shownAt(channel, Date.parse(instant));
    marks.push({
      kind,
      atH,
      strip: 'temperature',
      value: value === null ? null : drawn(value),
      text: sensor === null ? `${record.name} ${kind}` : `${record.name} ${kind}, ${sensor}`,
      sensor,
      limit: `${record.name}/time`,
    });
  }
  return marks;
}

function dipsOf(stage: DwellStage, record: StageRecord, scale: TimeScale): DipArc[] {
  return record.dips.map((dip) => ({
    stage: stage.name,
    fromH: hoursOrEnd(scale, dip.from),
    untilH: hoursOrEnd(scale, dip.until),
    level: lowerOf(stage),
    depth: dip.depth,
    isForgiven: dip.forgiven,
    sensor: dip.sensor,
    text: `${figure(Math.round(dip.minutes * 10) / 10)} min${dip.forgiven ? ', forgiven' : ''}`,
  }));
}
