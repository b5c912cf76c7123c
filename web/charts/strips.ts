import type { RunChart, Strip } from '../../models/chart/chart.ts';

/** Heights in px: above each strip there is room for its name. */
const HEIGHT: Readonly<Record<Strip, number>> = {
  temperature: 330,
  pressure: 84,
  vacuum: 64,
  cure: 100,
  viscosity: 110,
  tg: 84,
};
export const NAME_ROOM = 34;
const AXIS_ROOM = 46;

export function stripHeight(strip: Strip, width: number): number {
  return strip === 'temperature' && isNarrow(width) ? 260 : HEIGHT[strip];
}

export function chartHeight(chart: RunChart, width: number): number {
  return chart.strips.reduce((sum, { strip }) => sum + stripHeight(strip, width) + NAME_ROOM, AXIS_ROOM);
}

/** Room left of the strips for their figures, and right of them for the names at the lines' ends. */
export function leftRoom(width: number): number {
  return isNarrow(width) ? 42 : 52;
}

export function rightRoom(width: number): number {
  return isNarrow(width) ? 50 : 104;
}

export function isNarrow(width: number): boolean {
  return width < 520;
}
