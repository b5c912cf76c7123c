import type { ChannelLayout, Layout } from './layout.ts';
import type { LiveSource } from './live-source.ts';

/**
 * A source's channels, each with the uncertainty its readings have.
 *
 * A person reads a gauge to within half a division a, either way alike: a rectangular distribution, u = a/√3, which
 * joins the gauge's own as the root of the sum of squares, U = 2·√((U₀/2)² + a²/3).
 *
 * @param source  As `parseLiveSource` returns it.
 * @returns Its channels; those of a gauge with `uncertainty` (expanded, k = 2) in the channel's unit.
 *
 * Source: JCGM 100:2008 (GUM), 4.3.7 and 5.1.2.
 */
export function channelsOfSource({ reads, channels }: LiveSource): readonly ChannelLayout[] {
  if (reads.kind !== 'gauge') return channels;
  return channels.map((channel) => {
    const half = reads.readingError[channel.name];
    if (half === undefined) return channel;
    const uncertainty = Math.sqrt((channel.uncertainty ?? 0) ** 2 + (4 * half ** 2) / 3);
    return { ...channel, uncertainty };
  });
}

/** The channels a file's layout or a live source's document describes, as they are judged. */
export function channelsOf(document: Layout | LiveSource): readonly ChannelLayout[] {
  return document.format === 'dwellbook-source/1' ? channelsOfSource(document) : document.channels;
}
