import { FILM_COEFFICIENTS_WM2K } from './materials.ts';

/** Least and greatest film coefficient that air is likely to have at a part's face, W/(m² K). */
export interface FilmRange {
  readonly least: number;
  readonly most: number;
  /** What it is the range of. */
  readonly of: string;
}

/** Where these ranges come from; a vessel's own lag test gives better ones. */
export const FILM_SOURCE = 'from memory, of middling certainty; a lag test of the vessel gives its own';

/**
 * The range for a vessel whose air carries the heat; null where none does.
 *
 * @param vessel   Kind of the vessel.
 * @param gaugeBar Median pressure above ambient over the run, bar; null where none was logged.
 */
export function filmRange(vessel: string, gaugeBar: number | null): FilmRange | null {
  const ranges = FILM_COEFFICIENTS_WM2K;
  const { oven, 'autoclave near ambient pressure': ambient, 'autoclave at 6 to 7 bar': pressed } = ranges;
  if (vessel === 'oven') return { least: oven[0], most: oven[1], of: 'ovens' };
  if (vessel !== 'autoclave') return null;
  if (gaugeBar !== null && gaugeBar < 0.5) {
    return { least: ambient[0], most: ambient[1], of: 'autoclaves near ambient pressure' };
  }
  if (gaugeBar !== null && gaugeBar >= 5)
    return { least: pressed[0], most: pressed[1], of: 'autoclaves at 6 to 7 bar' };
  return { least: ambient[0], most: pressed[1], of: 'autoclaves from ambient pressure to 7 bar' };
}
