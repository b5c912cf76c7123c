import type { DrawnChannel } from './drawn-channel.ts';
import { scanAtOrAfter } from './scan-at.ts';

/** How long a channel stayed beyond a level. */
export interface Excursion {
  readonly fromMs: number;
  readonly untilMs: number;
}

/**
 * The stretch around an instant over which a channel stayed on its side of a level, within bounds; its ends lie where
 * the straight line between readings meets the level. Null where it stands on the level, or has no reading there.
 */
export function excursionAround(
  { timeMs, figures, shown }: DrawnChannel,
  level: number,
  atMs: number,
  bounds: Excursion,
): Excursion | null {
  const at = scanAtOrAfter(timeMs, atMs);
  const figure = figures[at] ?? Number.NaN;
  if (Number.isNaN(figure) || shown(figure) === level) return null;
  const side = Math.sign(shown(figure) - level);
  const end = (step: 1 | -1): number => {
    let beyond = at;
    for (let i = at + step; i >= 0 && i < timeMs.length; i += step) {
      if (Number.isNaN(figures[i]!)) continue;
      const value = shown(figures[i]!);
      const t = timeMs[i]!;
      if (Math.sign(value - level) !== side) {
        const last = shown(figures[beyond]!);
        return timeMs[beyond]! + ((level - last) / (value - last)) * (t - timeMs[beyond]!);
      }
      beyond = i;
      if (t < bounds.fromMs || t > bounds.untilMs) break;
    }
    return timeMs[beyond]!;
  };
  return { fromMs: Math.max(bounds.fromMs, end(-1)), untilMs: Math.min(bounds.untilMs, end(1)) };
}
