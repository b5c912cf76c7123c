import { figure } from '../cycle/words-of-figures.ts';

/** Minutes rounded down, so that 119.8 is not shown as 120; below ten to the tenth. */
export function wholeMinutes(minutes: number): string {
  return figure(minutes < 10 ? Math.floor(minutes * 10 + 1e-6) / 10 : Math.floor(minutes + 1e-6));
}
