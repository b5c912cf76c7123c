import { ADVISORY } from '../words/live.ts';

/** What every live page says of itself. */
export function Advisory() {
  return <p class="advisory">{ADVISORY}</p>;
}
