import type { Cycle } from '../cycle/cycle.ts';
import type { Finding, PartEvaluation } from '../evaluation/evaluation.ts';
import type { Breach, Stretch, Strip } from './chart.ts';
import type { DrawnChannel } from './drawn-channel.ts';
import { type Excursion, excursionAround } from './excursion.ts';
import { breachText, edgeOf } from './limit-edges.ts';
import { hoursAt, type TimeScale } from './time-scale.ts';

/** Where each finding looks, and where limits are broken. */
export interface FindingStretches {
  readonly stretches: readonly Stretch[];
  readonly breaches: readonly Breach[];
}

export function findingStretches(
  cycle: Cycle,
  part: PartEvaluation,
  channels: readonly DrawnChannel[],
  inWritten: ReadonlySet<Strip>,
  scale: TimeScale,
): FindingStretches {
  const stretches: Stretch[] = [];
  const breaches: Breach[] = [];
  for (const finding of part.findings) {
    if (finding.from === null) continue;
    const { limit, outcome, sensor } = finding;
    const strip = stripOfLimit(cycle, finding, channels);
    const level = inWritten.has(strip) ? edgeOf(cycle, finding) : null;
    const looked = { fromMs: Date.parse(finding.from), untilMs: Date.parse(finding.until ?? finding.from) };
    const isBroken = outcome === 'not-met' && level !== null;
    const { fromMs, untilMs } = isBroken ? beyond(finding, part, channels, level, looked, scale) : looked;
    const stretch: Stretch = {
      ...{ limit, outcome, sensor, strip },
      fromH: hoursAt(scale, fromMs),
      untilH: hoursAt(scale, untilMs),
    };
    stretches.push(stretch);
    if (isBroken) {
      const { fromH, untilH } = stretch;
      const text = breachText(finding, (untilMs - fromMs) / 60_000);
      breaches.push({ strip, fromH, untilH, level, text, limit, sensor });
    }
  }
  return { stretches, breaches };
}

/** A finding names the worst instant of a reading beyond its limit; the stretch around it is what was broken. */
function beyond(
  { limit, sensor }: Finding,
  part: PartEvaluation,
  channels: readonly DrawnChannel[],
  level: number,
  looked: Excursion,
  scale: TimeScale,
): Excursion {
  const channel = channels.find(({ layout }) => layout.name === sensor);
  if (channel === undefined || looked.untilMs > looked.fromMs) return looked;
  const window = part.windows.find(({ name }) => limit === `window/${name}`);
  const bounds = {
    fromMs: window?.from ? Date.parse(window.from) : scale.logFromMs,
    untilMs: window?.until ? Date.parse(window.until) : scale.logUntilMs,
  };
  return excursionAround(channel, level, looked.fromMs, bounds) ?? looked;
}

function stripOfLimit(cycle: Cycle, { limit, sensor }: Finding, channels: readonly DrawnChannel[]): Strip {
  if (limit === 'cure/degree') return 'cure';
  if (limit === 'cure/tg') return 'tg';
  if (limit === 'cure/pressure-before-gel') return 'pressure';
  if (limit.startsWith('window/')) {
    return cycle.windows?.find(({ name }) => limit === `window/${name}`)?.quantity ?? 'pressure';
  }
  return channels.find(({ layout }) => layout.name === sensor)?.strip ?? 'temperature';
}
