import type { PartEvaluation, SensorInDwell } from '../evaluation/evaluation.ts';
import type { LineRole } from './chart.ts';
import { type DrawnChannel, extremesOf } from './drawn-channel.ts';

/** Who leads and who lags, over the whole run. */
export interface LeadAndLag {
  readonly leading: string | null;
  readonly lagging: string | null;
}

/**
 * Leading is the judged sensor that came into the last dwell first, lagging the one that came last. Where no dwell
 * opened, the one that got hottest and the one that stayed coldest. A single judged sensor is neither.
 */
export function leadAndLag(part: PartEvaluation | null, channels: readonly DrawnChannel[]): LeadAndLag {
  if (part === null || part.judgedBy.length < 2) return { leading: null, lagging: null };
  const dwell = part.stages.findLast(({ kind, opens }) => kind === 'dwell' && opens !== null);
  const order = dwell?.sensors === undefined ? byHottest(part, channels) : byEntering(dwell.sensors);
  return { leading: order[0] ?? null, lagging: order.length > 1 ? (order.at(-1) ?? null) : null };
}

function byEntering(sensors: readonly SensorInDwell[]): string[] {
  return sensors
    .flatMap(({ channel, entered }) => (entered === null ? [] : [{ channel, ms: Date.parse(entered) }]))
    .sort((a, b) => a.ms - b.ms)
    .map(({ channel }) => channel);
}

function byHottest(part: PartEvaluation, channels: readonly DrawnChannel[]): string[] {
  return part.judgedBy
    .flatMap((name) => {
      const channel = channels.find(({ layout }) => layout.name === name);
      const extremes = channel && extremesOf(channel, Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY);
      return extremes ? [{ name, highest: extremes.highest }] : [];
    })
    .sort((a, b) => b.highest - a.highest)
    .map(({ name }) => name);
}

export function roleOfLine(
  { layout }: DrawnChannel,
  part: PartEvaluation | null,
  { leading, lagging }: LeadAndLag,
): LineRole {
  if (layout.name === lagging) return 'lagging';
  if (layout.name === leading) return 'leading';
  if (part?.judgedBy.includes(layout.name)) return 'judged';
  switch (layout.role) {
    case 'air':
    case 'setpoint':
    case 'pressure':
    case 'vacuum':
      return layout.role;
    case 'vacuum-source':
      return 'source';
    default:
      return 'other';
  }
}

/** `TC3 lagging`; other lines bear their channel's name. */
export function labelOfLine(channel: string, role: LineRole): string {
  return role === 'leading' || role === 'lagging' ? `${channel} ${role}` : channel;
}
