import { instantOfWallClock } from './clock.ts';

/** What a line of a form holds, as the server takes it. */

/** A figure with a point or a comma; null where nothing was typed. */
export function numberIn(typed: string): number | null {
  const text = typed.trim();
  return text === '' ? null : Number(text.replace(',', '.').replace('−', '-'));
}

/** An instant from a wall clock of the shop; null where nothing was typed or the zone has no such time. */
export function instantIn(wall: string, zone: string): string | null {
  const at = wall === '' ? null : instantOfWallClock(wall, zone);
  return at === null ? null : new Date(at).toISOString();
}

/** Pattern of a line that takes a figure. */
export const FIGURE_PATTERN = '-?[0-9]+([.,][0-9]+)?';
