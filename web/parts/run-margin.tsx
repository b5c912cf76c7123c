import type { MarginEntry, RunView } from '../../server/contract/runs.ts';
import { clock, day, weekday } from '../words/clock.ts';
import { marginOf } from '../words/margin.ts';
import { zone } from '../workshop.ts';

/** The run's times as a notebook's margin holds them, for one part where one is looked at; a new day is named. */
export function RunMargin({ run, part }: { run: RunView; part: string | null }) {
  let today = '';
  return (
    <ol class="marks run-marks" aria-label="Times of the run">
      {marginOf(run.margin, run.parts, part).map((entry) => {
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
            <Words entry={entry} />
          </li>
        );
      })}
    </ol>
  );
}

/** A note stands whole among the notes; the margin holds its beginning. */
function Words({ entry }: { entry: MarginEntry }) {
  if (entry.kind !== 'note' || entry.text.length <= 40) return <span>{entry.text}</span>;
  return <a href="#notes">{entry.text.slice(0, 32).trimEnd()} …</a>;
}
