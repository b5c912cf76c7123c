import type { Cycle } from '../cycle/cycle.ts';
import { figure, lowerOf, upperOf } from '../cycle/words-of-figures.ts';
import type { Finding, PartEvaluation } from '../evaluation/evaluation.ts';
import type { Breach, Stretch, Strip } from './chart.ts';
import type { DrawnChannel } from './drawn-channel.ts';
import { wholeMinutes } from './dwell-drawing.ts';
import { type Conversion, converted, drawn } from './shown-unit.ts';
import { hoursOf, type TimeScale } from './time-scale.ts';

/** Where each finding looks, and where limits are broken. */
export interface FindingStretches {
  readonly stretches: readonly Stretch[];
  readonly breaches: readonly Breach[];
}

export function findingStretches(
  cycle: Cycle,
  part: PartEvaluation,
  channels: readonly DrawnChannel[],
  fromWritten: ReadonlyMap<Strip, Conversion | null>,
  scale: TimeScale,
): FindingStretches {
  const stretches: Stretch[] = [];
  const breaches: Breach[] = [];
  for (const finding of part.findings) {
    const { limit, outcome, sensor } = finding;
    const fromH = hoursOf(scale, finding.from);
    if (fromH === null) continue;
    const stretch: Stretch = {
      ...{ limit, outcome, sensor, fromH },
      strip: stripOfLimit(cycle, finding, channels),
      untilH: hoursOf(scale, finding.until) ?? fromH,
    };
    stretches.push(stretch);
    const level = outcome === 'not-met' ? levelOf(cycle, finding) : null;
    const conversion = fromWritten.get(stretch.strip);
    if (level !== null && conversion) {
      const { strip, untilH } = stretch;
      const at = drawn(converted(level, conversion));
      breaches.push({ ...{ strip, fromH, untilH, limit, sensor }, level: at, text: breachText(finding, stretch) });
    }
  }
  return { stretches, breaches };
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

/** The edge a breach is drawn at, in the written unit; null for what is no edge on a strip. */
function levelOf(cycle: Cycle, finding: Finding): number | null {
  const { limit, observed, atLeast, atMost } = finding;
  if (limit === 'ceiling') return cycle.ceiling ?? null;
  if (limit === 'cure/pressure-before-gel') return atLeast;
  if (limit.startsWith('window/')) {
    return atLeast !== null && observed !== null && observed < atLeast ? atLeast : (atMost ?? atLeast);
  }
  const cut = limit.lastIndexOf('/');
  const stage = cycle.stages.find(({ name }) => name === limit.slice(0, Math.max(0, cut)));
  if (stage === undefined) return null;
  if (stage.kind === 'dwell') return limit.endsWith('/upper') ? upperOf(stage) : lowerOf(stage);
  return stage.rate?.over[0] ?? null;
}

/** `112 of 120 min`, `3.4 °C/min`, or the minutes of the stretch with how far it went: `4.2 min, 187.4 °C`. */
function breachText({ limit, observed, atLeast, atMost, unit }: Finding, { fromH, untilH }: Stretch): string {
  const isTime = limit.endsWith('/time') || limit.endsWith('/longest');
  if (isTime && observed !== null) {
    const asked = atLeast !== null && observed < atLeast ? atLeast : atMost;
    return `${wholeMinutes(observed)}${asked === null ? '' : ` of ${figure(asked)}`} min`;
  }
  const went = observed === null ? '' : `${figure(Math.round(observed * 100) / 100)} ${unit}`.trim();
  if (limit.endsWith('/slowest') || limit.endsWith('/fastest')) return went;
  const minutes = `${figure(Math.round((untilH - fromH) * 600) / 10)} min`;
  return went === '' ? minutes : `${minutes}, ${went}`;
}
