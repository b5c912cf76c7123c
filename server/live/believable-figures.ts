import { believableRange } from '../../models/log/channel-range.ts';
import type { ChannelLayout } from '../../models/log/layout.ts';
import { scaledReading } from '../../models/log/readings.ts';

/** A scan's figures with those that no reading of their channel can be made absent, as in a log that is read. */
export function believableFigures(figures: Float64Array, channels: readonly ChannelLayout[]): Float64Array {
  return figures.map((figure, n) => {
    const channel = channels[n];
    if (channel === undefined || !Number.isFinite(figure)) return Number.NaN;
    const [least, greatest] = believableRange(channel);
    const reading = scaledReading(figure, channel);
    return reading >= least && reading <= greatest ? figure : Number.NaN;
  });
}
