import { ROLE_WORDS } from '../words/layouts.ts';
import { readingWords } from '../words/live.ts';
import { LiveFigure } from './live-figure.tsx';
import type { Telling } from './live-outlook.tsx';

/** The latest reading of every channel, as it came. */
export function LiveReadings({ telling: { readings, nowMs, isOld } }: { telling: Telling }) {
  return (
    <section class="section">
      <h2>Readings now</h2>
      <dl class="live-figures readings">
        {readings.map((reading) => (
          <LiveFigure
            key={reading.channel}
            name={
              <>
                <b>{reading.channel}</b> {ROLE_WORDS[reading.role] ?? reading.role}
              </>
            }
            text={readingWords(reading)}
            ageMs={reading.at === null ? null : nowMs - Date.parse(reading.at)}
            isStale={isOld || reading.isStale}
          />
        ))}
      </dl>
    </section>
  );
}
