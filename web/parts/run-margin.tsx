import type { RunView } from '../../server/contract/runs.ts';
import { clock, day, weekday } from '../words/clock.ts';
import { zone } from '../workshop.ts';

/** The run's times as a notebook's margin holds them, a new day named where it begins. */
export function RunMargin({ run }: { run: RunView }) {
  let today = '';
  return (
    <ol class="marks run-marks" aria-label="Times of the run">
      {run.margin.map((entry) => {
        const date = day(entry.at, zone.value);
        const isNewDay = date !== today;
        today = date;
        return (
          <li key={entry.at + entry.text}>
            {isNewDay && (
              <p class="new-day">
                <b>{date}</b>
                {weekday(entry.at, zone.value)}
              </p>
            )}
            <time dateTime={entry.at}>{clock(entry.at, zone.value)}</time>
            <span>{entry.text}</span>
          </li>
        );
      })}
    </ol>
  );
}
