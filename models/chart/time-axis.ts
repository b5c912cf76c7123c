import type { TimeTick } from './chart.ts';
import type { ClockTime } from './clock-time.ts';
import { hoursWords, timeTicksS } from './ticks.ts';
import type { TimeScale } from './time-scale.ts';

const MOST_TICKS = 9;

/** Ticks on hours from hour 0, with the clock time beneath and the day where it changes. */
export function timeAxis(clock: ClockTime, { zeroMs, fromMs, untilMs }: TimeScale): TimeTick[] {
  const ticksS = timeTicksS((fromMs - zeroMs) / 1000, (untilMs - zeroMs) / 1000, MOST_TICKS);
  const inMinutes = ticksS.every((seconds) => seconds % 60 === 0);
  let day: string | null = null;
  return ticksS.map((seconds) => {
    const ms = zeroMs + seconds * 1000;
    const own = clock.day(ms);
    const isNew = own !== day;
    day = own;
    return {
      atH: seconds / 3600,
      hours: hoursWords(seconds),
      clock: inMinutes ? clock.minute(ms) : clock.time(ms),
      day: isNew ? own : null,
    };
  });
}
