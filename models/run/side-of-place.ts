import type { ChannelRole } from '../log/layout.ts';

/** Where through the thickness of a part a thermocouple sits; `surface` where its place names no side. */
export const SIDES = ['bag', 'tool', 'surface', 'inside'] as const;
export type Side = (typeof SIDES)[number];

/** Reads the side off the words of a place, as a load names it. Words for a place along the part say no side. */
export function sideOfPlace(place: string | null, role: ChannelRole): Side {
  const words = (place ?? '').toLowerCase();
  if (/\b(inside|embedded|core|mid-?plane|between plies|mid-?thickness)\b/.test(words)) return 'inside';
  if (/\b(tool|mould|mold)\b/.test(words)) return 'tool';
  if (/\b(bag|vacuum side|caul)\b/.test(words)) return 'bag';
  return role === 'tool' ? 'tool' : 'surface';
}
