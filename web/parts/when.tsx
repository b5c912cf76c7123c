import { clock, clockWithSeconds, shortDay } from '../words/clock.ts';
import { zone } from '../workshop.ts';

/** A day and a clock time, as they stand in the margin. */
export function When({ at, seconds = false }: { at: string; seconds?: boolean }) {
  return (
    <time dateTime={at}>
      <b>{shortDay(at, zone.value)}</b> {seconds ? clockWithSeconds(at, zone.value) : clock(at, zone.value)}
    </time>
  );
}
