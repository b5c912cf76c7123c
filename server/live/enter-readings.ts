import { DomainError } from '../../models/errors.ts';
import { believableRange } from '../../models/log/channel-range.ts';
import type { ChannelLayout } from '../../models/log/layout.ts';
import { scaledReading } from '../../models/log/readings.ts';
import { type ActionParts, deedOf } from '../actions/action-parts.ts';
import type { EnterRequest, Pushed } from '../contract/live.ts';
import { appendAudit } from '../store/audit.ts';
import { isoFromMs } from '../store/instants.ts';
import { requireLiveSource } from '../store/live-sources.ts';
import type { LiveLogging } from './live-logging.ts';

export interface EnteringParts extends ActionParts {
  readonly live: Pick<LiveLogging, 'journal' | 'steadyClock'>;
}

/** A person's watch may be this much ahead of ours, ms. */
const AHEAD_MS = 60_000;

/** Takes what a person read off the gauges of a source, by the keys of its channels. */
export async function enterReadings(parts: EnteringParts, sourceId: number, request: EnterRequest): Promise<Pushed> {
  const { db, live } = parts;
  const { name, vesselId, settings } = requireLiveSource(db, sourceId);
  if (settings.document.reads.kind !== 'gauge') {
    throw new DomainError('state-conflict', `"${name}" is not read by a person`, { source: name });
  }
  if (settings.isResting) throw new DomainError('state-conflict', `"${name}" rests`, { source: name });
  const nowMs = live.steadyClock.now(vesselId);
  const timeMs = request.at === undefined ? Math.round(nowMs) : Date.parse(request.at);
  if (timeMs > nowMs + AHEAD_MS) {
    throw new DomainError('option-out-of-range', `${isoFromMs(timeMs)} is still to come`, { at: isoFromMs(timeMs) });
  }
  const figures = figuresOf(settings.document.channels, request.values);
  const pushed = await live.journal.take(sourceId, [{ timeMs, sequence: null, figures }], { settings });
  const [refused] = pushed.refused;
  if (refused !== undefined) throw new DomainError('state-conflict', refused.because, { at: refused.at });
  const details = { at: isoFromMs(timeMs), values: JSON.stringify(request.values) };
  appendAudit(db, { ...deedOf(parts), verb: 'enter-readings', subject: `live-source/${name}`, details });
  return pushed;
}

function figuresOf(channels: readonly ChannelLayout[], values: EnterRequest['values']): Float64Array {
  for (const key of Object.keys(values)) {
    if (channels.some(({ column }) => column === key)) continue;
    const known = channels.map(({ column }) => column).join(', ');
    throw new DomainError('channel-unknown', `There is no "${key}" here; there are ${known}`, { channel: key });
  }
  const figures = Float64Array.from(channels, (channel) => figureOf(channel, values[channel.column] ?? null));
  if (figures.every(Number.isNaN)) throw new DomainError('option-out-of-range', 'Enter at least one reading');
  return figures;
}

/** A slip of the finger is told while the person still stands before the gauge. */
function figureOf(channel: ChannelLayout, figure: number | null): number {
  if (figure === null) return NaN;
  const [least, most] = believableRange(channel);
  const reading = scaledReading(figure, channel);
  if (reading >= least && reading <= most) return figure;
  throw new DomainError(
    'option-out-of-range',
    `${channel.name}: ${reading} ${channel.unit} is outside ${least} to ${most} ${channel.unit}`,
    { channel: channel.name, reading, unit: channel.unit },
  );
}
