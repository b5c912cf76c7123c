import { temperatureDifferenceFromCelsius } from '../units.ts';
import { cureEstimates, notEstimated } from './cure-estimates.ts';
import { cureLimits } from './cure-limits.ts';
import type { ClockDip } from './dips.ts';
import { dwellLowerLimit, dwellUpperLimit } from './dwell-band-limits.ts';
import { dwellLongestLimit, dwellTimeLimit } from './dwell-time-limit.ts';
import { Dwells } from './dwells.ts';
import type { CureEstimate, Dip, Finding, PartEvaluation, StageRecord, WindowRecord } from './evaluation.ts';
import { type EventSources, eventTime, heatOnMs } from './events.ts';
import { type Found, finding, iso } from './finding.ts';
import { gelTimes } from './gel-times.ts';
import type { Judgement } from './judgement.ts';
import { logGapLimit } from './log-gap-limit.ts';
import { channelsFor } from './pressure-scale.ts';
import { rateLimits } from './rate-limits.ts';
import { recordLimits } from './record-limits.ts';
import { sensorLimits } from './sensor-limits.ts';
import { ceilingLimit, spreadLimit } from './temperature-limits.ts';
import { windowLimit, windowStretch } from './windows.ts';

/** What one part comes to under one set of exclusions: its findings in the order of the cycle. */
export function judgePart(sources: EventSources): Finding[] {
  const { j, dwells } = sources;
  const found: Found[] = [];
  let dwellAt = 0;
  j.cycle.stages.forEach((stage, stageAt) => {
    if (stage.kind !== 'dwell') {
      found.push(...rateLimits(j, dwells, stageAt));
      return;
    }
    const index = dwellAt++;
    found.push(
      ...dwellTimeLimit(j, dwells, index),
      ...dwellLongestLimit(j, dwells, index),
      ...dwellUpperLimit(j, dwells, index),
      ...dwellLowerLimit(j, dwells, index),
    );
  });
  for (const window of j.cycle.windows ?? []) found.push(windowLimit(sources, window));
  found.push(
    ...ceilingLimit(j),
    ...spreadLimit(j, dwells),
    ...sensorLimits(j, dwells),
    ...logGapLimit(sources),
    ...recordLimits(j),
    ...cureLimits(sources),
  );
  return found.map(finding);
}

/** What the limits of a part are worked out from, worked out itself only once. */
export function sourcesOf(j: Judgement): EventSources {
  return { j, dwells: new Dwells(j), gel: gelTimes(j) };
}

/** What a part's record shows besides findings. */
export interface PartRecord {
  readonly stages: readonly StageRecord[];
  readonly windows: readonly WindowRecord[];
  readonly heatOn: string | null;
  readonly cure: readonly CureEstimate[];
  readonly notEstimated: NonNullable<PartEvaluation['notEstimated']>;
}

/** What happened to a part, whatever was asked: stages, windows, heat-on and estimates. */
export function recordPart(sources: EventSources): PartRecord {
  const { j } = sources;
  return {
    stages: stageRecords(j, sources.dwells),
    windows: windowRecords(sources),
    heatOn: iso(heatOnMs(j)),
    cure: cureEstimates(j),
    notEstimated: notEstimated(j),
  };
}

function stageRecords(j: Judgement, dwells: Dwells): StageRecord[] {
  let dwellAt = 0;
  return j.cycle.stages.map(({ name, kind }): StageRecord => {
    if (kind !== 'dwell')
      return { name, kind, opens: null, closes: null, minutes: null, openedBy: null, closedBy: null, dips: [] };
    const { course, time, clock } = dwells.at(dwellAt++, 'least');
    return {
      name,
      kind,
      opens: iso(time.opensMs),
      closes: iso(time.closesMs),
      minutes: Math.round(time.minutes * 1e6) / 1e6,
      openedBy: clock.openedBy,
      closedBy: clock.closing?.by ?? null,
      dips: time.dips.filter(({ depthC }) => depthC !== null).map((dip) => dipRecord(j, dip)),
      sensors: j.sensors.map((sensor, k) => {
        const left = course.left[k];
        return {
          channel: sensor.name,
          entered: iso(course.entered[k] ?? null),
          left: left?.isFinal ? iso(left.ms) : null,
        };
      }),
    };
  });
}

function dipRecord(j: Judgement, dip: ClockDip): Dip {
  return {
    from: iso(dip.from)!,
    until: iso(dip.until)!,
    minutes: Math.round(((dip.until - dip.from) / 60_000) * 1e6) / 1e6,
    depth: Math.round(temperatureDifferenceFromCelsius(dip.depthC!, j.cycle.units.temperature) * 1e6) / 1e6,
    forgiven: dip.isForgiven,
    sensor: dip.sensor,
  };
}

function windowRecords(sources: EventSources): WindowRecord[] {
  const { j } = sources;
  return (j.cycle.windows ?? []).map((window) => {
    const from = eventTime(sources, window.from);
    const until = eventTime(sources, window.until);
    const channels = channelsFor(j, window.quantity).map(({ layout }) => layout.name);
    if (from.earlyMs === null) return { name: window.name, from: null, until: null, channels };
    const { widest, hasClosed } = windowStretch(j, from, until);
    return { name: window.name, from: iso(widest.from), until: hasClosed ? iso(widest.until) : null, channels };
  });
}
