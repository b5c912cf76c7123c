import type { LiveSource } from '../../../models/log/live-source.ts';
import { scaledReading } from '../../../models/log/readings.ts';
import { asTemperature, scanOfEmf } from '../../../models/log/temperatures-of-emf.ts';
import { believableFigures } from '../believable-figures.ts';
import type { OneScan, TriedChannel } from './source.ts';

/** A scan as a person sees it: what came, and what it reads in the channel's unit where that can be a reading. */
export function shownChannels(
  { channels }: Pick<LiveSource, 'channels'>,
  { figures, because }: OneScan,
): TriedChannel[] {
  const read = scanOfEmf(channels)(believableFigures(figures, channels));
  return channels.map((written, n) => {
    const channel = asTemperature(written);
    const raw = figures[n] ?? NaN;
    const figure = read[n] ?? NaN;
    const isOutside = !Number.isNaN(raw) && Number.isNaN(figure);
    return {
      channel: channel.name,
      unit: channel.unit,
      raw: Number.isNaN(raw) ? null : raw,
      value: Number.isNaN(figure) ? null : scaledReading(figure, channel),
      because: because[n] ?? (isOutside ? 'outside what the channel can believably read' : null),
    };
  });
}
