import type { Forgiveness } from './cycle.ts';
import { figure } from './words-of-figures.ts';

/** `Forgiven: dips below 175 °C of up to 2 °C for up to 3 min each, at most 2 of them, together up to 5 min.` */
export function forgivenessSentence(what: string, forgiveness: Forgiveness, unit: string): string {
  const { by, for: minutes, times, inTotal } = forgiveness;
  const count = times === undefined ? '' : `, at most ${figure(times)} of them`;
  const total = inTotal === undefined ? '' : `, together up to ${figure(inTotal)} min`;
  return `Forgiven: ${what} of up to ${figure(by)} ${unit} for up to ${figure(minutes)} min each${count}${total}.`;
}
